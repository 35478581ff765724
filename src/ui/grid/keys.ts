import type { CellPlace } from "./types.ts";

/** What the keys of the grid pattern move by. */
export interface GridExtent {
  readonly rows: number;
  readonly columns: number;
  /** Rows in one view. */
  readonly page: number;
}

const clamp = (value: number, least: number, most: number): number => Math.max(least, Math.min(most, value));

/**
 * Where a key leads from a cell; null for keys that do not move. The head is row −1.
 */
export const moveBy = (
  key: string,
  isCtrl: boolean,
  from: CellPlace,
  { rows, columns, page }: GridExtent,
): CellPlace | null => {
  const last = rows - 1;
  const to = (row: number, column: number): CellPlace => ({
    row: clamp(row, -1, last),
    column: clamp(column, 0, columns - 1),
  });
  switch (key) {
    case "ArrowDown":
      return to(from.row + 1, from.column);
    case "ArrowUp":
      return to(from.row - 1, from.column);
    case "ArrowRight":
      return to(from.row, from.column + 1);
    case "ArrowLeft":
      return to(from.row, from.column - 1);
    case "Home":
      return isCtrl ? to(0, 0) : to(from.row, 0);
    case "End":
      return isCtrl ? to(last, columns - 1) : to(from.row, columns - 1);
    case "PageDown":
      return to(from.row + page, from.column);
    case "PageUp":
      return to(Math.max(0, from.row - page), from.column);
    default:
      return null;
  }
};
