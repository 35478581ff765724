import type { CSSProperties } from "react";
import type { GridColumn } from "./types.ts";

/** Where each frozen column stands from the left, px; null for those that scroll. */
export const frozenOffsets = <Row>(columns: readonly GridColumn<Row>[]): readonly (number | null)[] => {
  let left = 0;
  return columns.map((column) => {
    if (!column.isFrozen) return null;
    const at = left;
    left += column.width;
    return at;
  });
};

/** Width of a cell, and its place where it is frozen. */
export const cellStyle = (width: number, left: number | null, isHead: boolean): CSSProperties => ({
  width,
  minWidth: width,
  ...(left === null ? {} : { position: "sticky", left, zIndex: isHead ? 3 : 1 }),
});
