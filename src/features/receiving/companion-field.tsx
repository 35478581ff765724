import { useState } from "react";
import type { Extract } from "#shared/api/extracts.ts";
import { LIMITS } from "#shared/limits.ts";
import { companionAddress, type ExtractShown, removeCompanion, sendCompanion } from "#src/api/extracts.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { sizeOf } from "./extract-words.ts";

interface Props {
  extract: Extract;
  /** Takes what the server says after another description has come. */
  onShown: (shown: ExtractShown) => void;
}

/** The file that describes the columns: to be had again, and while the plan is open to be brought or replaced. */
export const CompanionField = ({ extract, onShown }: Props) => {
  const programmeId = useProgrammeId();
  const can = useCan();
  const [isBusy, setBusy] = useState(false);
  const [problem, setProblem] = useState<unknown>(null);
  const [refusal, setRefusal] = useState("");
  const { companion, state } = extract;
  const isOpen = (state === "receiving" || state === "planning") && can("extract.edit");
  const act = async (change: Promise<ExtractShown>): Promise<void> => {
    setBusy(true);
    setProblem(null);
    try {
      onShown(await change);
    } catch (error) {
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };
  const send = (file: File): void => {
    const isTooLarge = file.size > LIMITS.companionBytes;
    setRefusal(
      isTooLarge ? `${file.name} has ${sizeOf(file.size)}; a description may have at most 8 MiB.` : "",
    );
    if (!isTooLarge) void act(sendCompanion(programmeId, extract.id, file));
  };
  return (
    <>
      {companion ? (
        <a
          href={companionAddress(programmeId, extract.id)}
          className="block min-h-6 w-fit wrap-anywhere text-ink underline underline-offset-4"
        >
          Download the description, {companion.fileName}
        </a>
      ) : null}
      {isOpen ? (
        <label className="flex min-h-6 w-fit cursor-pointer items-center underline decoration-edge underline-offset-4 has-focus-visible:outline-2 has-focus-visible:outline-mark hover:decoration-ink">
          {isBusy
            ? "Sending the description…"
            : companion
              ? "Bring another description"
              : "Bring a description of the columns"}
          <input
            type="file"
            className="sr-only"
            disabled={isBusy}
            onChange={(event) => {
              const file = event.target.files?.[0];
              event.target.value = "";
              if (file) send(file);
            }}
          />
        </label>
      ) : null}
      {isOpen && companion ? (
        <Button
          kind="plain"
          className="px-0!"
          disabled={isBusy}
          onClick={() => void act(removeCompanion(programmeId, extract.id))}
        >
          Leave the description out
        </Button>
      ) : null}
      {refusal ? (
        <p role="alert" className="text-xs text-mark">
          ◆ {refusal}
        </p>
      ) : null}
      <ErrorNotice error={problem} />
    </>
  );
};
