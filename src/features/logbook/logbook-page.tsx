import { useInfiniteQuery } from "@tanstack/react-query";
import type { LogbookLine } from "#shared/api/programmes.ts";
import { count } from "#shared/format/numbers.ts";
import { logbookOptions } from "#src/api/programmes.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Page } from "#src/ui/page.tsx";
import { LogbookRow } from "./logbook-row.tsx";

const HEADS = [
  { label: "Line", isNumber: true, isWideOnly: true },
  { label: "When" },
  { label: "Who" },
  { label: "What" },
  { label: "Before and after" },
];

const Lines = ({ lines }: { lines: readonly LogbookLine[] }) => (
  <LedgerTable caption="Lines of the logbook, newest first" heads={HEADS}>
    {lines.map((line) => (
      <LogbookRow key={line.id} line={line} />
    ))}
  </LedgerTable>
);

const Content = () => {
  const programmeId = useProgrammeId();
  const logbook = useInfiniteQuery(logbookOptions(programmeId));
  if (logbook.isPending) return <Loading />;
  if (!logbook.data) return <ErrorNotice error={logbook.error} onRetry={() => void logbook.refetch()} />;
  const lines = logbook.data.pages.flatMap((page) => page.lines);
  if (lines.length === 0)
    return <EmptyState title="Nothing has happened yet.">Every change leaves a line here.</EmptyState>;
  return (
    <>
      <Lines lines={lines} />
      <ErrorNotice error={logbook.error} />
      <p className="mt-4 flex flex-wrap items-center gap-4 text-soft">
        <span>
          <span className="font-mono">{count(lines.length)}</span>{" "}
          {logbook.hasNextPage ? "newest lines shown" : "lines, all of them"}
        </span>
        {logbook.hasNextPage ? (
          <Button isBusy={logbook.isFetchingNextPage} onClick={() => void logbook.fetchNextPage()}>
            Show older lines
          </Button>
        ) : null}
      </p>
    </>
  );
};

/** Who did what and when; nothing here can be changed or taken away. */
export const LogbookPage = () => (
  <Page
    title="Logbook"
    lede="Every change of this programme, newest first. Lines are only ever added, and each carries a fingerprint of all before it."
  >
    <Content />
  </Page>
);
