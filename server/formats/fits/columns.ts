import type { ColumnType, ColumnValues, TableColumn } from "../table.ts";
import type { FitsHeader } from "./header.ts";

/** Whole rows of a table as the file has them. */
export interface RowBlock {
  readonly bytes: Buffer;
  readonly view: DataView;
  readonly rows: number;
  readonly rowBytes: number;
  /** Number of the first row in the table, from 1. */
  readonly firstRow: number;
  /** Rows of this block that cannot be read, from 0, and why. */
  readonly refused: Map<number, string>;
}

/** A column that is read, and how its values come out of rows. */
export interface ColumnReader {
  readonly column: TableColumn;
  /** Bytes of one cell in its row. */
  readonly bytes: number;
  readonly read: (block: RowBlock) => ColumnValues;
}

/** Comments that programs put beside every TTYPE and that describe nothing. */
const BOILERPLATE =
  /^(?:(?:label|name|title|column)\b.{0,30}\b(?:field|column)\b|(?:field|column) (?:name|label))/i;

const descriptionOf = (header: FitsHeader, place: number): string => {
  const described = header.text(`TCOMM${place}`);
  if (described !== null) return described;
  const comment = header.comment(`TTYPE${place}`);
  return BOILERPLATE.test(comment) ? "" : comment;
};

export const columnName = (header: FitsHeader, place: number): string =>
  header.text(`TTYPE${place}`) ?? `column ${place}`;

/**
 * @param place - Number of the column in its table, from 1.
 */
export const describeColumn = (
  header: FitsHeader,
  place: number,
  type: ColumnType,
  nullMark: string | null,
): TableColumn => ({
  name: columnName(header, place),
  type,
  unit: header.text(`TUNIT${place}`) ?? "",
  ucd: header.text(`TUCD${place}`) ?? "",
  description: descriptionOf(header, place),
  nullMark,
  frame: null,
});
