import { useQuery } from "@tanstack/react-query";
import { useCallback, useEffect, useMemo, useState } from "react";
import type { StarRow, ViewSummary } from "#shared/api/stars.ts";
import { findColumn } from "#shared/catalogue/columns.ts";
import { count } from "#shared/format/numbers.ts";
import { meritsOptions } from "#src/api/merits.ts";
import { histogramsOptions, readWindow, windowKey } from "#src/api/stars.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { GoToRowDialog } from "#src/ui/grid/go-to-row-dialog.tsx";
import { Grid } from "#src/ui/grid/grid.tsx";
import { useBlocks } from "#src/ui/grid/use-blocks.ts";
import { announce } from "#src/ui/live-region.tsx";
import { ColumnsDialog } from "./columns-dialog.tsx";
import { Lede } from "./lede.tsx";
import { ListDialog } from "./list-dialog.tsx";
import { NoStarPasses } from "./no-star-passes.tsx";
import { PlainPages } from "./plain-pages.tsx";
import { starColumns } from "./star-columns.tsx";
import { TableFooter } from "./table-footer.tsx";
import { hasWorkings } from "./told.ts";
import { useRemembered } from "./use-remembered.ts";
import type { Workbench } from "./use-workbench.ts";

interface Props {
  programmeId: string;
  workbench: Workbench;
  summary: ViewSummary;
  /** A newer answer is on its way; what is shown still holds for the question before. */
  isStale: boolean;
  /** The server makes the table ready for this card, campaign and edition. */
  isPreparing: boolean;
  failure: Error | null;
  goTo: { row: number } | null;
  onGoTo: (row: number) => void;
  /** The workings of a cell are asked for. */
  onWorkings: (starId: string, key: string) => void;
}

/** px; the first is the usual one. */
const ROW_HEIGHTS = ["28", "36", "24"] as const;
type RowHeight = (typeof ROW_HEIGHTS)[number];
const nextHeight = (height: RowHeight): RowHeight =>
  ROW_HEIGHTS[(ROW_HEIGHTS.indexOf(height) + 1) % ROW_HEIGHTS.length] ?? "28";

const labelOf = (key: string): string => (key === "merit" ? "merit" : (findColumn(key)?.label ?? key));

const useTerms = (programmeId: string, summary: ViewSummary, shares: number): readonly string[] => {
  const { data: merits } = useQuery({ ...meritsOptions(programmeId), enabled: summary.merit !== null });
  const chosen = merits?.find((m) => m.versionId === summary.merit?.versionId);
  if (chosen) return chosen.terms.map((t) => t.label);
  // An older version, or one that may not be read: its shares are there, its words are not.
  return summary.merit ? Array.from({ length: Math.max(1, shares) }, (_, i) => `term ${i + 1}`) : [];
};

/** The sentence, the table and what stands under it. */
export const StarTable = ({
  programmeId,
  workbench,
  summary,
  isStale,
  isPreparing,
  failure,
  goTo,
  onGoTo,
  onWorkings,
}: Props) => {
  const { view, screen, ask, show } = workbench;
  const can = useCan();
  const [dialog, setDialog] = useState<"columns" | "list" | "row" | null>(null);
  const [layout, setLayout] = useRemembered("shortlight-table", ["grid", "pages"]);
  const isPlain = layout === "pages";
  const [height, setHeight] = useRemembered("shortlight-row-height", ROW_HEIGHTS);
  const [range, setRange] = useState({ first: 0, last: 0 });
  const histogramKeys = screen.columns.filter((key) => findColumn(key)?.kind !== "text");
  const { data: histograms = [] } = useQuery(histogramsOptions(programmeId, view, histogramKeys));
  const read = useCallback(
    (offset: number, limit: number, signal: AbortSignal) =>
      readWindow(programmeId, view, offset, limit, signal),
    [programmeId, view],
  );
  const blocks = useBlocks<StarRow>({ queryKey: windowKey(programmeId, view), count: summary.count, read });
  const terms = useTerms(programmeId, summary, blocks.rowAt(0)?.shares.length ?? 0);
  const columns = useMemo(
    () => starColumns({ keys: screen.columns, terms, isSexagesimal: screen.isSexagesimal, histograms }),
    [screen.columns, terms, screen.isSexagesimal, histograms],
  );
  const { onRange } = blocks;
  const tellRange = useCallback(
    (first: number, last: number, focused: number) => {
      onRange(first, last, focused);
      setRange({ first, last });
    },
    [onRange],
  );
  useEffect(
    () => announce(`${count(summary.count)} of ${count(summary.total)} stars`),
    [summary.count, summary.total],
  );
  const sortBy = (key: string) => {
    if (key === "place") return;
    const isSame = view.sort.key === key;
    const direction = isSame
      ? view.sort.direction === "asc"
        ? "desc"
        : "asc"
      : key === "merit"
        ? "desc"
        : "asc";
    announce(`Sorted by ${labelOf(key)}, ${direction === "desc" ? "highest" : "lowest"} first`);
    ask({ sort: { key, direction } });
  };
  const openStar = (row: StarRow) => show({ star: row.id, workings: [] }, screen.star === null);
  const openWorkings = (row: StarRow, key: string) => {
    if (!hasWorkings(key)) {
      announce(
        `${labelOf(key)} has no workings: only what is worked out has. The star is open beside the table`,
      );
      openStar(row);
      return;
    }
    onWorkings(row.id, key);
  };
  const sortWords = `sorted by ${labelOf(view.sort.key)}, ${view.sort.direction === "desc" ? "highest" : "lowest"} first`;
  const label = `Stars, ${count(summary.count)} of ${count(summary.total)}, ${sortWords}`;
  return (
    <>
      <div className="flex flex-wrap items-end gap-x-5 gap-y-2 px-5 pt-4 pb-3">
        <div className="min-w-0 grow basis-80">
          <Lede programmeId={programmeId} view={view} summary={summary} ask={ask} />
        </div>
        <Button onClick={() => setDialog("columns")}>Columns</Button>
        {can("list.make") ? (
          <Button kind="main" disabled={summary.count === 0} onClick={() => setDialog("list")}>
            Make a target list
          </Button>
        ) : null}
      </div>
      {failure || blocks.error ? (
        <div className="px-5 pb-3">
          <ErrorNotice error={failure ?? blocks.error} />
        </div>
      ) : null}
      {isPreparing ? (
        <p role="status" className="px-5 pb-3 text-soft">
          Preparing the table for this question; what is shown answers the one before…
        </p>
      ) : null}
      {isPlain ? null : (
        <button
          type="button"
          onClick={() => setLayout("pages")}
          className="sr-only focus:not-sr-only focus:px-5 focus:pb-2 focus:text-left focus:underline"
        >
          Show as plain pages instead of a grid
        </button>
      )}
      <div
        className={`flex min-h-0 grow flex-col border-t border-rule ${isStale || blocks.isOld ? "opacity-60" : ""}`}
      >
        {summary.count === 0 ? (
          <NoStarPasses summary={summary} />
        ) : isPlain ? (
          <PlainPages
            programmeId={programmeId}
            view={view}
            total={summary.count}
            label={label}
            columns={columns}
            sort={view.sort}
            onSort={sortBy}
            onOpen={openStar}
          />
        ) : (
          <Grid
            label={label}
            columns={columns}
            count={summary.count}
            rowAt={blocks.rowAt}
            rowKey={(row) => row.id}
            rowLabel={(row) =>
              `${row.designation}${row.merit === null ? "" : `, merit ${row.merit.toFixed(1)}`}`
            }
            rowHeight={Number(height)}
            sort={view.sort}
            onSort={sortBy}
            onOpen={openStar}
            openKey={screen.star}
            onRange={tellRange}
            goTo={goTo}
            onGoToRow={() => setDialog("row")}
            onLetter={(letter, cell) => {
              if (letter === "d") show({ isSexagesimal: !screen.isSexagesimal });
              if (letter === "m" && cell.row) openWorkings(cell.row, cell.column);
            }}
            isBusy={blocks.isReading}
          />
        )}
      </div>
      <TableFooter
        summary={summary}
        range={range}
        sortWords={sortWords}
        isPlain={isPlain}
        onPlain={() => setLayout(isPlain ? "grid" : "pages")}
        rowHeight={height}
        onRowHeight={() => setHeight(nextHeight(height))}
        isSexagesimal={screen.isSexagesimal}
        onPositions={() => show({ isSexagesimal: !screen.isSexagesimal })}
      />
      {dialog === "columns" ? (
        <ColumnsDialog
          shown={screen.columns}
          onChange={(next) => show({ columns: next })}
          onClose={() => setDialog(null)}
        />
      ) : null}
      {dialog === "list" ? (
        <ListDialog
          programmeId={programmeId}
          view={view}
          available={summary.count}
          onClose={() => setDialog(null)}
        />
      ) : null}
      {dialog === "row" ? (
        <GoToRowDialog
          rows={summary.count}
          word="row"
          onGo={(index) => {
            onGoTo(index);
            setDialog(null);
          }}
          onClose={() => setDialog(null)}
        />
      ) : null}
    </>
  );
};
