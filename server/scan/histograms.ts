import type { DuckDBConnection } from "@duckdb/node-api";
import type { Histogram } from "#shared/api/stars.ts";
import { HISTOGRAM_KEYS } from "./index-columns.ts";
import { BINS, binSql } from "./summarise.ts";

interface Kept {
  column_key: string;
  low: number;
  high: number;
  is_log: boolean;
  stars: number[];
  blanks: number;
}

/** The bins of the selection, within the limits that were kept for the whole catalogue. */
const selectedBins = async (
  connection: DuckDBConnection,
  kept: Kept,
  where: string,
  values: number[],
): Promise<number[]> => {
  const bins = new Array<number>(BINS).fill(0);
  if (!kept.stars.some((n) => n > 0)) return bins;
  const bin = binSql(kept.column_key, kept.low, kept.high, kept.is_log);
  const result = await connection.runAndReadAll(
    `SELECT ${bin} AS bin, count(*)::DOUBLE FROM star
     WHERE "${kept.column_key}" IS NOT NULL AND ${where} GROUP BY bin`,
    values,
  );
  for (const [index, n] of result.getRowsJS() as [number, number][]) bins[index] = n;
  return bins;
};

/** The whole catalogue, and the stars of the selection, by value. Keys that are no numeric column are left out. */
export const readHistograms = async (
  connection: DuckDBConnection,
  keys: readonly string[],
  where: string,
  values: number[],
): Promise<Histogram[]> => {
  const result = await connection.runAndReadAll("SELECT * FROM histogram");
  const all = new Map((result.getRowObjectsJS() as unknown as Kept[]).map((kept) => [kept.column_key, kept]));
  const histograms: Histogram[] = [];
  for (const key of new Set(keys.filter((k) => HISTOGRAM_KEYS.includes(k)))) {
    const kept = all.get(key);
    if (!kept) continue;
    histograms.push({
      key,
      low: kept.low,
      high: kept.high,
      isLog: kept.is_log,
      all: kept.stars,
      selected: await selectedBins(connection, kept, where, values),
      blanks: kept.blanks,
    });
  }
  return histograms;
};
