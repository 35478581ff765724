import { createColumnHelper, tableFeatures, useTable } from "@tanstack/react-table";
import { type KeyboardEvent, type ReactNode, useEffect, useMemo, useRef, useState } from "react";
import { announce } from "../live-region.tsx";
import { cellStyle, frozenOffsets } from "./cell-places.ts";
import { GridRow } from "./grid-row.tsx";
import { HeadCell } from "./head-cell.tsx";
import { moveBy } from "./keys.ts";
import type { CellPlace, GridColumn, GridSort } from "./types.ts";
import { useRowWindow } from "./use-row-window.ts";

/** Label, unit and picture. */
export const HEAD_HEIGHT = 66;

const features = tableFeatures({});

interface Props<Row> {
  /** Says what the grid holds: "Stars, 412 of 238 448, sorted by merit". */
  label: string;
  columns: readonly GridColumn<Row>[];
  /** Rows of the whole result. */
  count: number;
  /** The row at that place from 0; undefined while it is being read. */
  rowAt: (index: number) => Row | undefined;
  rowKey: (row: Row) => string;
  rowLabel: (row: Row) => string;
  rowHeight: number;
  sort: GridSort | null;
  onSort: (key: string) => void;
  onOpen: (row: Row) => void;
  /** Key of the row that is open beside the grid. */
  openKey: string | null;
  /** Tells which rows are on screen and which holds the focus (−1: the head), so that they can be read. */
  onRange: (first: number, last: number, focused: number) => void;
  /** A row to go to, from 0; another object goes there again. */
  goTo?: { readonly row: number } | null;
  onGoToRow: () => void;
  /** A single letter pressed inside the grid, in lower case, and the cell it was pressed on; no row in the head. */
  onLetter?: (letter: string, cell: { row: Row | undefined; column: string }) => void;
  isBusy?: boolean;
}

/**
 * A table of any length by the ARIA grid pattern: one tab stop, arrows move, the focused row stays mounted, rows are read
 * as they come into view.
 */
export const Grid = <Row,>(props: Props<Row>): ReactNode => {
  const {
    label,
    columns,
    count,
    rowAt,
    rowKey,
    rowLabel,
    rowHeight,
    sort,
    onSort,
    onOpen,
    openKey,
    onRange,
    goTo = null,
    onGoToRow,
    onLetter,
    isBusy,
  } = props;
  const scroller = useRef<HTMLDivElement>(null);
  const [active, setActive] = useState<CellPlace>({ row: -1, column: 0 });
  const wantsFocus = useRef(false);
  const rowsNow = useRef(count);
  rowsNow.current = count;
  // A shorter result must not leave the focus on a row that is gone.
  const activeRow = Math.min(active.row, count - 1);
  const { virtualizer, track, place, toTop, visible } = useRowWindow({
    rows: count,
    rowHeight,
    headHeight: HEAD_HEIGHT,
    scroller,
    focusedRow: activeRow,
  });
  const shown = virtualizer.getVirtualItems();
  const { first, last } = visible;
  useEffect(() => onRange(first, last, activeRow), [first, last, activeRow, onRange]);

  const loaded = shown.flatMap(({ index }) => {
    const row = rowAt(index);
    return row === undefined ? [] : [{ index, row }];
  });
  const definitions = useMemo(() => {
    const helper = createColumnHelper<typeof features, { index: number; row: Row }>();
    return helper.columns(
      columns.map((column) =>
        helper.display({ id: column.key, cell: ({ row }) => column.cell(row.original.row) }),
      ),
    );
  }, [columns]);
  const table = useTable({
    features,
    columns: definitions,
    data: loaded,
    getRowId: ({ index }) => String(index),
  });
  const modelRows = new Map(table.getRowModel().rows.map((row) => [row.original.index, row]));

  // Asked while the row is still there: once it is gone, the browser has forgotten that it held the focus.
  const hadFocus = scroller.current?.contains(document.activeElement) ?? false;
  useEffect(() => {
    if (active.row <= activeRow) return;
    setActive((now) => ({ ...now, row: activeRow }));
    if (!hadFocus) return;
    wantsFocus.current = true;
    announce(`The row is no longer in the table. Row ${activeRow + 1} of ${count}`);
  }, [active.row, activeRow, count, hadFocus]);
  useEffect(() => {
    if (!wantsFocus.current) return;
    const cell = scroller.current?.querySelector<HTMLElement>(
      `[data-row="${activeRow}"][data-column="${active.column}"]`,
    );
    if (!cell) return;
    wantsFocus.current = false;
    cell.focus({ preventScroll: true });
    cell.scrollIntoView({ inline: "nearest", block: "nearest" });
  });
  useEffect(() => {
    if (goTo === null) return;
    const row = Math.max(0, Math.min(rowsNow.current - 1, goTo.row));
    virtualizer.scrollToIndex(row, { align: "center" });
    setActive((now) => ({ ...now, row }));
    wantsFocus.current = true;
  }, [goTo, virtualizer]);
  const order = sort ? `${sort.key} ${sort.direction}` : "";
  const shownOrder = useRef(order);
  // Another order begins at its best row.
  useEffect(() => {
    if (shownOrder.current === order) return;
    shownOrder.current = order;
    toTop();
  }, [order, toTop]);

  const moveTo = (to: CellPlace) => {
    wantsFocus.current = true;
    setActive(to);
    if (to.row >= 0) virtualizer.scrollToIndex(to.row, { align: "auto" });
  };
  const enter = () => {
    const column = columns[active.column];
    if (activeRow < 0 && column?.canSort) onSort(column.key);
    const row = activeRow < 0 ? undefined : rowAt(activeRow);
    if (row !== undefined) onOpen(row);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const isCtrl = event.ctrlKey || event.metaKey;
    const page = Math.max(
      1,
      Math.floor(((scroller.current?.clientHeight ?? 600) - HEAD_HEIGHT) / rowHeight) - 1,
    );
    const to = moveBy(
      event.key,
      isCtrl,
      { row: activeRow, column: active.column },
      { rows: count, columns: columns.length, page },
    );
    if (to) {
      moveTo(to);
      if (to.row !== activeRow) announce(sayRow(to.row));
    } else if (event.key === "Enter" || (event.key === " " && activeRow >= 0)) enter();
    else if (isCtrl && event.key.toLowerCase() === "g") onGoToRow();
    else if (onLetter && !isCtrl && !event.altKey && !event.shiftKey && /^[a-z]$/.test(event.key))
      onLetter(event.key, {
        row: activeRow < 0 ? undefined : rowAt(activeRow),
        column: columns[active.column]?.key ?? "",
      });
    else return;
    event.preventDefault();
    event.stopPropagation();
  };
  const sayRow = (index: number): string => {
    const row = index < 0 ? undefined : rowAt(index);
    return index < 0
      ? "Column heads"
      : `Row ${index + 1} of ${count}${row === undefined ? "" : `, ${rowLabel(row)}`}`;
  };

  const offsets = frozenOffsets(columns);
  const width = columns.reduce((sum, column) => sum + column.width, 0);
  return (
    <div
      ref={scroller}
      role="grid"
      tabIndex={-1}
      aria-label={label}
      aria-rowcount={count + 1}
      aria-colcount={columns.length}
      aria-busy={isBusy || undefined}
      onKeyDown={onKeyDown}
      className="relative min-h-0 grow overflow-auto font-mono text-[12.5px] outline-none"
    >
      <div
        role="row"
        aria-rowindex={1}
        className="sticky top-0 z-10 flex"
        style={{ height: HEAD_HEIGHT, minWidth: width }}
      >
        {columns.map((column, i) => (
          <HeadCell
            key={column.key}
            column={column as unknown as GridColumn<never>}
            index={i}
            sort={sort}
            isActive={activeRow < 0 && active.column === i}
            style={cellStyle(column.width, offsets[i] ?? null, true)}
            onSort={onSort}
            onFocus={() => setActive({ row: -1, column: i })}
          />
        ))}
        <div className="grow border-b border-rule bg-sheet" />
      </div>
      <div role="presentation" className="relative" style={{ height: track, minWidth: width }}>
        {shown.map(({ index, start }) => {
          const row = rowAt(index);
          const cells = modelRows.get(index)?.getAllCells();
          return (
            <GridRow
              key={index}
              index={index}
              top={place(start)}
              height={rowHeight}
              minWidth={width}
              columns={columns}
              offsets={offsets}
              isOpen={row !== undefined && rowKey(row) === openKey}
              focusedColumn={activeRow === index ? active.column : null}
              contents={cells?.map((cell) => <table.FlexRender key={cell.id} cell={cell} />)}
              onFocus={(column) => setActive({ row: index, column })}
              onOpen={() => row !== undefined && onOpen(row)}
            />
          );
        })}
      </div>
    </div>
  );
};
