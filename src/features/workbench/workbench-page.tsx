import { useQuery } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { Link } from "react-router-dom";
import { programmeOptions } from "#src/api/programmes.ts";
import { summaryOptions } from "#src/api/stars.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { FindResult } from "./find-result.tsx";
import { Ladder } from "./ladder.tsx";
import { StarSheet } from "./star-sheet.tsx";
import { StarTable } from "./star-table.tsx";
import { useWorkbench } from "./use-workbench.ts";

const NoStars = ({ programmeId }: { programmeId: string }) => {
  const can = useCan();
  return (
    <EmptyState
      title="No stars yet."
      actions={
        can("extract.edit") ? (
          <Link className="underline underline-offset-4" to={`/programmes/${programmeId}/extracts`}>
            Read file
          </Link>
        ) : null
      }
    >
      {can("extract.edit")
        ? "Bring a catalogue file; its stars appear here with what follows from them."
        : "A curator brings in catalogue files; their stars then appear here with what follows from them."}
    </EmptyState>
  );
};

/** Where the keyboard stands in the table: closing what lies beside it leads back there. */
const focusTable = () => document.querySelector<HTMLElement>('[role="grid"] [tabindex="0"]')?.focus();

/** Esc closes the star, unless it closes something nearer or ends what is being typed. */
const useEscape = (isOpen: boolean, close: () => void): void => {
  useEffect(() => {
    if (!isOpen) return;
    const onKey = (event: KeyboardEvent) => {
      const isTyping = event.target instanceof Element && event.target.matches("input, textarea, select");
      if (event.key !== "Escape" || event.defaultPrevented || isTyping) return;
      if (!document.querySelector("dialog[open]")) close();
    };
    window.addEventListener("keydown", onKey);
    return () => window.removeEventListener("keydown", onKey);
  }, [isOpen, close]);
};

/** The catalogue: cuts at the left, the ranked table, one star at the right. All of it stands in the address. */
export const WorkbenchPage = () => {
  const programmeId = useProgrammeId();
  const workbench = useWorkbench(programmeId);
  const { view, screen, ask, show, unread } = workbench;
  const [goTo, setGoTo] = useState<{ row: number } | null>(null);
  const [isLadderShown, setLadderShown] = useState(false);
  const { data: programme } = useQuery(programmeOptions(programmeId));
  const summary = useQuery({ ...summaryOptions(programmeId, view), enabled: !workbench.isPending });
  const closeStar = () => {
    show({ star: null });
    focusTable();
  };
  useEscape(screen.star !== null, closeStar);
  if (programme && programme.edition === null) return <NoStars programmeId={programmeId} />;
  if (summary.isPending)
    return <Loading what={summary.failureCount > 0 ? "Preparing the table" : "Loading"} />;
  if (summary.isError && !summary.data)
    return <ErrorNotice error={summary.error} onRetry={() => void summary.refetch()} isPage />;
  const ignored = [...unread, ...summary.data.ignored];
  const cuts = view.cuts.length;
  return (
    <main className="relative grid min-h-full grid-cols-[minmax(0,1fr)] lg:h-full lg:grid-cols-[268px_minmax(0,1fr)] xl:grid-cols-[268px_minmax(0,1fr)_auto]">
      <title>Catalogue · Shortlight</title>
      <aside aria-label="Cuts" className="min-h-0 overflow-y-auto border-rule lg:border-r">
        <button
          type="button"
          aria-expanded={isLadderShown}
          onClick={() => setLadderShown(!isLadderShown)}
          className="flex min-h-11 w-full items-center gap-2 px-5 text-left lg:hidden"
        >
          <span aria-hidden="true">{isLadderShown ? "▾" : "▸"}</span>
          {cuts === 0 ? "No cuts" : cuts === 1 ? "1 cut" : `${cuts} cuts`}
        </button>
        <div className={isLadderShown ? "" : "max-lg:hidden"}>
          <Ladder programmeId={programmeId} view={view} summary={summary.data} ask={ask} />
        </div>
      </aside>
      <section
        aria-label="Catalogue"
        className="flex h-[85dvh] min-h-0 min-w-0 flex-col border-t border-rule lg:h-auto lg:border-t-0"
      >
        {screen.find ? (
          <FindResult
            programmeId={programmeId}
            view={view}
            text={screen.find}
            onOpen={(star, place) => {
              show({ star, find: "" }, true);
              if (place !== null) setGoTo({ row: place - 1 });
            }}
            onClose={() => show({ find: "" })}
          />
        ) : null}
        {ignored.length > 0 ? (
          <p role="status" className="border-b border-rule bg-sel px-5 py-2 text-[13px]">
            Not everything this link asks for can be shown: {ignored.join(", ")}. The rest is here.
          </p>
        ) : null}
        <StarTable
          programmeId={programmeId}
          workbench={workbench}
          summary={summary.data}
          isStale={summary.isPlaceholderData}
          isPreparing={summary.isPlaceholderData && summary.failureCount > 0}
          failure={summary.error}
          goTo={goTo}
          onGoTo={(row) => setGoTo({ row })}
        />
      </section>
      {screen.star ? (
        <aside
          aria-label="Star"
          className="min-h-0 overflow-y-auto border-t border-rule bg-sheet lg:absolute lg:inset-y-0 lg:right-0 lg:z-20 lg:w-[396px] lg:border-t-0 lg:border-l xl:static"
        >
          <StarSheet programmeId={programmeId} view={view} starId={screen.star} onClose={closeStar} />
        </aside>
      ) : null}
    </main>
  );
};
