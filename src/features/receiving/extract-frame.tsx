import { type ReactNode, useState } from "react";
import type { Extract } from "#shared/api/extracts.ts";
import { originalAddress, useKeepExtract } from "#src/api/extracts.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { CompanionField } from "./companion-field.tsx";
import { DeleteDialog } from "./delete-dialog.tsx";
import { Steps } from "./steps.tsx";

interface Props {
  extract: Extract;
  planNote: string;
  /** Below the steps: where the stars fall, for example. */
  below?: ReactNode;
  /** After another description of the columns has come. */
  onDescribed?: () => void;
  /** Panel at the right. */
  aside?: ReactNode;
  children: ReactNode;
}

/** The frame of an extract: how far it is at the left, its matter in the middle, what is asked at the right. */
export const ExtractFrame = ({ extract, planNote, below, aside, onDescribed, children }: Props) => {
  const programmeId = useProgrammeId();
  const can = useCan();
  const keep = useKeepExtract(programmeId);
  const [isDeleting, setDeleting] = useState(false);
  const isDeletable = extract.state === "receiving" || extract.state === "planning";
  const columns = aside
    ? "xl:grid-cols-[260px_minmax(0,1fr)_330px] 2xl:grid-cols-[300px_minmax(0,1fr)_370px]"
    : "xl:grid-cols-[300px_minmax(0,1fr)]";
  return (
    <div className={`grid grid-cols-1 xl:h-full xl:min-h-0 ${columns}`}>
      <title>{`Extract ${extract.number} · Shortlight`}</title>
      <section
        aria-label="Steps"
        className="border-rule p-[18px] max-xl:border-b xl:overflow-auto xl:border-r"
      >
        <Steps extract={extract} planNote={planNote} />
        <div className="border-t border-rule pt-3 text-[13px] text-soft">
          {extract.sha256 === null ? (
            <p className="wrap-anywhere">{extract.fileName}</p>
          ) : (
            <a
              href={originalAddress(programmeId, extract.id)}
              className="block min-h-6 w-fit wrap-anywhere text-ink underline underline-offset-4"
            >
              Download the original
            </a>
          )}
          <CompanionField
            extract={extract}
            onShown={(shown) => {
              keep(shown);
              onDescribed?.();
            }}
          />
          <p>
            Brought by {extract.uploadedBy.name}, <Moment at={extract.createdAt} isShort />
          </p>
          {extract.origin ? <p className="mt-1 wrap-anywhere">Origin: {extract.origin}</p> : null}
          {isDeletable && can("extract.edit") ? (
            <Button kind="plain" className="mt-1 px-0!" onClick={() => setDeleting(true)}>
              Delete extract
            </Button>
          ) : null}
        </div>
        {below}
      </section>
      <main className="min-w-0 px-[18px] py-5 max-xl:order-3 xl:overflow-auto xl:px-[26px]">{children}</main>
      {aside ? (
        <aside className="border-rule bg-sheet p-[18px] max-xl:border-b xl:overflow-auto xl:border-l xl:px-[22px]">
          {aside}
        </aside>
      ) : null}
      <DeleteDialog extract={extract} isOpen={isDeleting} onClose={() => setDeleting(false)} />
    </div>
  );
};
