import type { ReactNode } from "react";
import { cellStyle } from "./cell-places.ts";
import type { GridColumn } from "./types.ts";

interface Props<Row> {
  /** From 0. */
  index: number;
  /** Place on the track, px. */
  top: number;
  height: number;
  minWidth: number;
  columns: readonly GridColumn<Row>[];
  offsets: readonly (number | null)[];
  isOpen: boolean;
  /** The column of the grid's one tab stop, where it is in this row. */
  focusedColumn: number | null;
  /** One per column; absent while the row is being read. */
  contents: readonly ReactNode[] | undefined;
  onFocus: (column: number) => void;
  onOpen: () => void;
}

/** One row, drawn at its place on the track; its keys are the grid's. */
export const GridRow = <Row,>(props: Props<Row>): ReactNode => {
  const { index, top, height, minWidth, columns, offsets, isOpen, focusedColumn, contents } = props;
  const ground = isOpen ? "bg-sel" : "bg-paper";
  return (
    <div
      role="row"
      tabIndex={-1}
      aria-rowindex={index + 2}
      aria-selected={isOpen}
      onClick={props.onOpen}
      className={`absolute top-0 left-0 flex w-full cursor-pointer border-b border-hair ${ground}`}
      style={{ height, transform: `translateY(${top}px)`, minWidth }}
    >
      {columns.map((column, i) => (
        <div
          key={column.key}
          role={column.isRowHeader ? "rowheader" : "gridcell"}
          tabIndex={focusedColumn === i ? 0 : -1}
          aria-colindex={i + 1}
          data-row={index}
          data-column={i}
          onFocus={() => props.onFocus(i)}
          style={cellStyle(column.width, offsets[i] ?? null, false)}
          className={`flex-none overflow-hidden px-2.5 whitespace-nowrap -outline-offset-2 ${ground} ${column.isText ? "text-left" : "text-right"}`}
        >
          <span
            className="flex h-full items-center"
            style={{ justifyContent: column.isText ? "flex-start" : "flex-end" }}
          >
            {contents?.[i] ?? (column.isRowHeader ? <span className="text-faint">loading</span> : null)}
          </span>
        </div>
      ))}
    </div>
  );
};
