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

const BLANK_BIN = -1;

/**
 * The bins of the selection, within the limits that were kept for the whole catalogue: one pass for all columns. Each
 * row of the answer has the bin of exactly one of them.
 */
const selectedBins = async (
  connection: DuckDBConnection,
  kept: readonly Kept[],
  where: string,
  values: number[],
): Promise<number[][]> => {
  const bins = kept.map(() => new Array<number>(BINS).fill(0));
  const filled = kept.flatMap((k, i) => (k.stars.some((n) => n > 0) ? [{ ...k, i }] : []));
  if (filled.length === 0) return bins;
  // Greatest and least pass over a blank; it is set apart before them.
  const binned = filled.map(
    (k, n) =>
      `CASE WHEN "${k.column_key}" IS NULL THEN ${BLANK_BIN} ELSE ${binSql(k.column_key, k.low, k.high, k.is_log)} END AS b${n}`,
  );
  const names = filled.map((_, n) => `b${n}`);
  const result = await connection.runAndReadAll(
    `SELECT count(*)::DOUBLE, ${names.join(", ")} FROM (SELECT ${binned.join(", ")} FROM star WHERE ${where})
     GROUP BY GROUPING SETS (${names.map((name) => `(${name})`).join(", ")})`,
    values,
  );
  for (const [stars, ...cells] of result.getRowsJS() as [number, ...(number | null)[]][]) {
    const n = cells.findIndex((bin) => bin !== null);
    const [column, bin] = [bins[filled[n]?.i ?? -1], cells[n] ?? BLANK_BIN];
    if (column && bin !== BLANK_BIN) column[bin] = stars;
  }
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
  const wanted = [...new Set(keys)].filter((key) => HISTOGRAM_KEYS.includes(key));
  const kept = wanted.flatMap((key) => all.get(key) ?? []);
  const selected = await selectedBins(connection, kept, where, values);
  return kept.map((k, i) => ({
    key: k.column_key,
    low: k.low,
    high: k.high,
    isLog: k.is_log,
    all: k.stars,
    selected: selected[i] ?? [],
    blanks: k.blanks,
  }));
};
