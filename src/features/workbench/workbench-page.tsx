import { useQuery } from "@tanstack/react-query";
import { useCallback, useEffect, useRef, useState } from "react";
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
import { useWorkbench, type Workbench } from "./use-workbench.ts";

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

/** Esc closes what is open beside the table, unless it closes something nearer or ends what is being typed. */
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

/** Opens and closes workings; closing them leads back to the cell or to the line of the sheet they were opened from. */
const useWorkingsTrail = ({ screen, show }: Workbench) => {
  const isFromTable = useRef(false);
  const cameFrom = useRef<string | null>(null);
  const takeCameFrom = useCallback(() => {
    const key = cameFrom.current;
    cameFrom.current = null;
    return key;
  }, []);
  return {
    takeCameFrom,
    openFromTable: (star: string, key: string) => {
      isFromTable.current = true;
      show({ star, workings: [key] }, true);
    },
    followWorkings: (trail: readonly string[]) => {
      const isOpening = screen.workings.length === 0;
      if (isOpening) isFromTable.current = false;
      show({ workings: trail }, isOpening);
    },
    closeWorkings: () => {
      cameFrom.current = isFromTable.current ? null : (screen.workings[0] ?? null);
      show({ workings: [] });
      if (isFromTable.current) focusTable();
    },
  };
};

/** Between 1024 and 1279 px there is no room for three columns: beside an open star the cuts fold up over the table. */
const layoutOf = (hasStar: boolean): string =>
  hasStar
    ? "lg:grid-cols-[minmax(0,1fr)_396px] lg:grid-rows-[auto_minmax(0,1fr)] xl:grid-cols-[268px_minmax(0,1fr)_396px] xl:grid-rows-[minmax(0,1fr)]"
    : "lg:grid-cols-[268px_minmax(0,1fr)]";

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
    show({ star: null, workings: [] });
    focusTable();
  };
  const { takeCameFrom, openFromTable, followWorkings, closeWorkings } = useWorkingsTrail(workbench);
  const stepBack = () => {
    if (screen.workings.length > 1) followWorkings(screen.workings.slice(0, -1));
    else if (screen.workings.length === 1) closeWorkings();
    else closeStar();
  };
  useEscape(screen.star !== null, stepBack);
  if (programme && programme.edition === null) return <NoStars programmeId={programmeId} />;
  if (summary.isPending)
    return <Loading what={summary.failureCount > 0 ? "Preparing the table" : "Loading"} />;
  if (summary.isError && !summary.data)
    return <ErrorNotice error={summary.error} onRetry={() => void summary.refetch()} isPage />;
  const ignored = [...unread, ...summary.data.ignored];
  const cuts = view.cuts.length;
  const folded = screen.star
    ? { button: "xl:hidden", ladder: "max-xl:hidden" }
    : { button: "lg:hidden", ladder: "max-lg:hidden" };
  return (
    <main className={`grid min-h-full grid-cols-[minmax(0,1fr)] lg:h-full ${layoutOf(screen.star !== null)}`}>
      <title>Catalogue · Shortlight</title>
      <aside
        aria-label="Cuts"
        className={`min-h-0 overflow-y-auto border-rule lg:border-r ${screen.star ? "lg:max-xl:max-h-[40dvh] lg:max-xl:border-r-0" : ""}`}
      >
        <button
          type="button"
          aria-expanded={isLadderShown}
          onClick={() => setLadderShown(!isLadderShown)}
          className={`flex min-h-11 w-full items-center gap-2 px-5 text-left ${folded.button}`}
        >
          <span aria-hidden="true">{isLadderShown ? "▾" : "▸"}</span>
          {cuts === 0 ? "No cuts" : cuts === 1 ? "1 cut" : `${cuts} cuts`}
        </button>
        <div className={isLadderShown ? "" : folded.ladder}>
          <Ladder programmeId={programmeId} view={view} summary={summary.data} ask={ask} />
        </div>
      </aside>
      <section
        aria-label="Catalogue"
        className={`flex h-[85dvh] min-h-0 min-w-0 flex-col border-t border-rule lg:h-auto ${screen.star ? "xl:border-t-0" : "lg:border-t-0"}`}
      >
        {screen.find ? (
          <FindResult
            programmeId={programmeId}
            view={view}
            text={screen.find}
            onOpen={(star, place) => {
              show({ star, workings: [], find: "" }, true);
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
          onWorkings={openFromTable}
        />
      </section>
      {screen.star ? (
        <aside
          aria-label="Star"
          className="min-h-0 overflow-y-auto border-t border-rule bg-sheet lg:col-start-2 lg:row-span-2 lg:row-start-1 lg:border-t-0 lg:border-l xl:col-start-3 xl:row-span-1"
        >
          <StarSheet
            programmeId={programmeId}
            view={view}
            starId={screen.star}
            columns={screen.columns}
            workings={screen.workings}
            takeCameFrom={takeCameFrom}
            onWorkings={followWorkings}
            onCloseWorkings={closeWorkings}
            onClose={closeStar}
          />
        </aside>
      ) : null}
    </main>
  );
};
