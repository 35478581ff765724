import type { PoolConnection } from "mysql2";
import type { DataSource } from "typeorm";
import type { Value } from "./bulk.ts";

/** Rows as bare arrays in the order of the columns: a name for each of a hundred values costs more than the values. */
export const readArrays = async (
  db: DataSource,
  sql: string,
  values: readonly unknown[],
): Promise<Value[][]> => {
  const runner = db.createQueryRunner();
  try {
    const connection = (await runner.connect()) as PoolConnection;
    return await new Promise<Value[][]>((resolve, reject) => {
      connection.query({ sql, values: [...values], rowsAsArray: true }, (error, rows) =>
        error ? reject(error) : resolve(rows as unknown as Value[][]),
      );
    });
  } finally {
    await runner.release();
  }
};
