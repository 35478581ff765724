import type { ColumnOptions } from "typeorm";

/** Column options that several entities share; every column names its type, as the runners emit no metadata. */
export const idColumn: ColumnOptions = { type: "bigint", unsigned: true };
export const nameColumn: ColumnOptions = { type: "varchar", length: 120 };
export const momentColumn: ColumnOptions = { type: "datetime", precision: 6 };
export const hashColumn: ColumnOptions = { type: "char", length: 64, charset: "ascii", collation: "ascii_bin" };
