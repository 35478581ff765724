import { type DuckDBConnection, DuckDBInstance } from "@duckdb/node-api";
import { NUMBER_KEYS } from "#server/scan/index-columns.ts";

export type Star = Readonly<Record<string, number | null>>;

/** A `star` table as a scan index has it, holding these stars in order. */
export const starTable = async (stars: readonly Star[]): Promise<DuckDBConnection> => {
  const connection = await (await DuckDBInstance.create(":memory:", { threads: "1" })).connect();
  const columns = NUMBER_KEYS.map((key) => `"${key}" DOUBLE`).join(", ");
  await connection.run(`CREATE TABLE star (row_number INTEGER, ${columns})`);
  const rows = stars.map(
    (star, i) => `(${[i, ...NUMBER_KEYS.map((key) => star[key] ?? "NULL")].join(", ")})`,
  );
  await connection.run(`INSERT INTO star VALUES ${rows.join(", ")}`);
  return connection;
};

/** Reads one expression for every star, in order. */
export const column = async (
  connection: DuckDBConnection,
  sql: string,
  values: number[],
  source = "star",
): Promise<unknown[]> => {
  const result = await connection.runAndReadAll(`SELECT ${sql} FROM ${source} ORDER BY row_number`, values);
  return result.getRowsJS().map((row) => row[0]);
};

/** Value of a column of a star, NaN where blank, as the evaluation of expressions asks for it. */
export const valuesOf =
  (star: Star) =>
  (key: string): number =>
    star[key] ?? Number.NaN;
