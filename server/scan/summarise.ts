import type { DuckDBConnection } from "@duckdb/node-api";
import { findColumn } from "#shared/catalogue/columns.ts";
import { HISTOGRAM_KEYS } from "./index-columns.ts";

export const BINS = 26;
/** Tails beyond these shares of the stars are counted in the first and the last bin, so that one outlier does not flatten the rest. */
const [LOW_SHARE, HIGH_SHARE] = [0.005, 0.995];

/** SQL of the bin, from 0, of a column between its kept limits; null for a blank. */
export const binSql = (key: string, low: number, high: number, isLog: boolean): string => {
  const value = isLog ? `log10(greatest("${key}", ${low}))` : `"${key}"`;
  const [from, to] = isLog ? [Math.log10(low), Math.log10(high)] : [low, high];
  const width = (to - from) / BINS;
  if (!(width > 0)) return `CASE WHEN "${key}" IS NOT NULL THEN 0 END`;
  // Clamped before the cast: a far outlier would not fit into an integer.
  return `CAST(floor(greatest(0, least(${BINS - 1}, (${value} - ${from}) / ${width}))) AS INTEGER)`;
};

interface Range {
  stars: number;
  low: number | null;
  high: number | null;
}

const rangeOf = async (connection: DuckDBConnection, key: string, isLog: boolean): Promise<Range> => {
  const where = isLog ? `FILTER ("${key}" > 0)` : "";
  const result = await connection.runAndReadAll(
    `SELECT count("${key}")::DOUBLE AS stars, approx_quantile("${key}", ${LOW_SHARE}) ${where} AS low,
       approx_quantile("${key}", ${HIGH_SHARE}) ${where} AS high FROM star`,
  );
  return (result.getRowObjectsJS()[0] ?? { stars: 0, low: null, high: null }) as unknown as Range;
};

/** Writes the histogram of the whole catalogue, column by column, into the index beside its stars. */
export const writeHistograms = async (connection: DuckDBConnection): Promise<void> => {
  await connection.run(
    `CREATE TABLE histogram (column_key VARCHAR, low DOUBLE, high DOUBLE, is_log BOOLEAN, stars DOUBLE[], blanks DOUBLE)`,
  );
  const [total] = (await connection.runAndReadAll("SELECT count(*)::DOUBLE FROM star")).getRowsJS();
  for (const key of HISTOGRAM_KEYS) {
    const isLog = findColumn(key)?.logAxis ?? false;
    const { stars, low, high } = await rangeOf(connection, key, isLog);
    const bins = new Array<number>(BINS).fill(0);
    if (low !== null && high !== null) {
      const counted = await connection.runAndReadAll(
        `SELECT ${binSql(key, low, high, isLog)} AS bin, count(*)::DOUBLE AS n FROM star WHERE "${key}" IS NOT NULL GROUP BY bin`,
      );
      for (const [bin, n] of counted.getRowsJS() as [number, number][]) bins[bin] = n;
    }
    await connection.run(
      `INSERT INTO histogram VALUES ('${key}', ${low ?? 0}, ${high ?? 0}, ${isLog}, [${bins.join(", ")}], ${Number(total?.[0]) - stars})`,
    );
  }
};
