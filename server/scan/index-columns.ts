import { BIGINT, DOUBLE, type DuckDBType, INTEGER, UBIGINT, VARCHAR } from "@duckdb/node-api";
import { REACH_ERROR_KEY } from "#server/derive/star-columns.ts";
import { COLUMNS, type Column, columnsOf, errorKey, isNumeric } from "#shared/catalogue/columns.ts";

const withErrors = (columns: readonly Column[]): string[] =>
  columns.filter((c) => isNumeric(c)).flatMap((c) => (c.hasError ? [c.key, errorKey(c.key)] : [c.key]));

/** Numbers that MariaDB keeps of a star, by their common name in both. */
export const STORED_KEYS: readonly string[] = [...withErrors(columnsOf("given", "stellar")), REACH_ERROR_KEY];
/** Numbers that depend on the instrument; blank throughout where none is chosen. */
export const INSTRUMENT_KEYS: readonly string[] = withErrors(columnsOf("instrument"));
export const NUMBER_KEYS: readonly string[] = [...STORED_KEYS, ...INSTRUMENT_KEYS];

/** What people sort by as text. */
export const TEXT_KEYS = ["designation", "source_id"] as const;

export interface IndexColumn {
  name: string;
  type: DuckDBType;
}

/** The `star` table of an index, in the order in which rows are appended. */
export const INDEX_COLUMNS: readonly IndexColumn[] = [
  { name: "star_id", type: BIGINT },
  { name: "designation", type: VARCHAR },
  { name: "source_id", type: VARCHAR },
  { name: "identity_hash", type: UBIGINT },
  { name: "flags_bits", type: INTEGER },
  ...NUMBER_KEYS.map((name) => ({ name, type: DOUBLE })),
];

export const HISTOGRAM_KEYS: readonly string[] = COLUMNS.filter((c: Column) => isNumeric(c)).map(
  (c: Column) => c.key,
);
