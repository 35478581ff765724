import type { ReactNode } from "react";

/** A column of the grid: what stands in its head and in a row's cell. The grid knows nothing of what it means. */
export interface GridColumn<Row> {
  readonly key: string;
  readonly label: string;
  /** Under the label, in the quieter face. */
  readonly unit?: string;
  /** Long name and definition, for the head's tooltip. */
  readonly description?: string;
  readonly width: number;
  readonly isText?: boolean;
  /** Stays in place while the rest scrolls sideways; frozen columns come first. */
  readonly isFrozen?: boolean;
  /** Names the row for a screen reader. */
  readonly isRowHeader?: boolean;
  readonly canSort?: boolean;
  /** A small picture under the unit. */
  readonly picture?: ReactNode;
  readonly cell: (row: Row) => ReactNode;
}

export interface GridSort {
  readonly key: string;
  readonly direction: "asc" | "desc";
}

/** A cell by row (−1 is the head) and column. */
export interface CellPlace {
  readonly row: number;
  readonly column: number;
}
