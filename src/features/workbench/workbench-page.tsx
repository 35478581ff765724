import { useQuery } from "@tanstack/react-query";
import { Link } from "react-router-dom";
import { programmeOptions } from "#src/api/programmes.ts";
import { summaryOptions } from "#src/api/stars.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { FindResult } from "./find-result.tsx";
import { Ladder } from "./ladder.tsx";
import { StarSheet } from "./star-sheet.tsx";
import { StarTable } from "./star-table.tsx";
import { useWorkbench } from "./use-workbench.ts";

const NoStars = ({ programmeId }: { programmeId: string }) => (
  <EmptyState
    title="No stars yet."
    actions={
      <Link className="underline" to={`/programmes/${programmeId}/extracts`}>
        Read file
      </Link>
    }
  >
    Bring a catalogue file; its stars appear here with what follows from them.
  </EmptyState>
);

/** The catalogue: cuts at the left, the ranked table, one star at the right. All of it stands in the address. */
export const WorkbenchPage = () => {
  const programmeId = useProgrammeId();
  const workbench = useWorkbench(programmeId);
  const { view, screen, ask, show, unread } = workbench;
  const { data: programme } = useQuery(programmeOptions(programmeId));
  const summary = useQuery({ ...summaryOptions(programmeId, view), enabled: !workbench.isPending });
  if (programme && programme.edition === null) return <NoStars programmeId={programmeId} />;
  if (summary.isPending)
    return <Loading what={summary.failureCount > 0 ? "Preparing the table" : "Loading"} />;
  if (summary.isError && !summary.data)
    return <ErrorNotice error={summary.error} onRetry={() => void summary.refetch()} isPage />;
  const ignored = [...unread, ...summary.data.ignored];
  return (
    <div className="grid min-h-full grid-cols-[minmax(0,1fr)] lg:h-full lg:grid-cols-[268px_minmax(0,1fr)] xl:grid-cols-[268px_minmax(0,1fr)_auto]">
      <aside className="overflow-y-auto border-rule lg:border-r">
        <Ladder programmeId={programmeId} view={view} summary={summary.data} ask={ask} />
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
            onOpen={(star) => show({ star, find: "" }, true)}
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
          failure={summary.error}
        />
      </section>
      {screen.star ? (
        <aside className="overflow-y-auto border-t border-rule bg-sheet lg:col-span-2 xl:col-span-1 xl:w-[396px] xl:border-t-0 xl:border-l">
          <StarSheet
            programmeId={programmeId}
            view={view}
            starId={screen.star}
            onClose={() => show({ star: null })}
          />
        </aside>
      ) : null}
    </div>
  );
};
