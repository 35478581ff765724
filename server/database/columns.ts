import type { ColumnOptions } from "typeorm";

/** Column options that several entities share; every column names its type, as the runners emit no metadata. */
export const idColumn = { type: "bigint", unsigned: true } as const satisfies ColumnOptions;
export const nameColumn = { type: "varchar", length: 120 } as const satisfies ColumnOptions;
export const momentColumn = { type: "datetime", precision: 6 } as const satisfies ColumnOptions;
export const hashColumn = {
  type: "char",
  length: 64,
  charset: "ascii",
  collation: "ascii_bin",
} as const satisfies ColumnOptions;
