import type { CSSProperties } from "react";
import type { GridColumn, GridSort } from "./types.ts";

interface Props {
  column: GridColumn<never>;
  index: number;
  sort: GridSort | null;
  isActive: boolean;
  style: CSSProperties;
  onSort: (key: string) => void;
  onFocus: () => void;
}

const ariaSort = (column: string, sort: GridSort | null) =>
  sort?.key === column ? (sort.direction === "asc" ? "ascending" : "descending") : undefined;

/** Label, unit and small picture of a column; sorts where it can. */
export const HeadCell = ({ column, index, sort, isActive, style, onSort, onFocus }: Props) => {
  const direction = ariaSort(column.key, sort);
  return (
    <div
      role="columnheader"
      tabIndex={isActive ? 0 : -1}
      aria-colindex={index + 1}
      aria-sort={direction}
      data-row={-1}
      data-column={index}
      title={column.description}
      style={style}
      onFocus={onFocus}
      onClick={column.canSort ? () => onSort(column.key) : undefined}
      className={`flex flex-none flex-col justify-end -outline-offset-2 gap-0.5 border-b border-rule bg-sheet px-2.5 pt-2 pb-1 text-xs ${column.isText ? "text-left" : "text-right"} ${column.canSort ? "cursor-pointer" : ""}`}
    >
      <span className="font-medium whitespace-nowrap">
        {direction ? (
          <span aria-hidden="true" className="text-mark">
            {direction === "ascending" ? "▲ " : "▼ "}
          </span>
        ) : null}
        {column.label}
      </span>
      <span className="text-[11px] whitespace-nowrap text-faint">{column.unit || "\u00a0"}</span>
      <span aria-hidden="true" className="block h-5 w-full">
        {column.picture}
      </span>
    </div>
  );
};
