import type { Shape } from "#shared/api/merits.ts";
import { numberToSql, type Parameters } from "#shared/expression/to-sql.ts";
import { type ScoringTerm, sortedPoints } from "#shared/merit/score.ts";

/** The figure of merit in SQL: the same operations in the same order as shared/merit/score.ts, so that both agree. */

const between = (v: string, from: string, to: string): string =>
  `greatest(0, least(1, (${v} - ${from}) / (${to} - ${from})))`;

const tableSql = (points: readonly (readonly [number, number])[], v: string, p: Parameters): string => {
  const sorted = sortedPoints(points);
  let sql = p.place(sorted[0]?.[1] ?? 0);
  for (let i = 1; i < sorted.length; i++) {
    const [x0, y0] = (sorted[i - 1] ?? [0, 0]).map((n) => p.place(n));
    const [x1, y1] = (sorted[i] ?? [0, 0]).map((n) => p.place(n));
    sql = `CASE WHEN ${v} >= ${x1} THEN ${y1} WHEN ${v} > ${x0} THEN ${y0} + ((${y1} - ${y0}) * (${v} - ${x0})) / (${x1} - ${x0}) ELSE ${sql} END`;
  }
  return sql;
};

const shapeSql = (shape: Shape, v: string, p: Parameters): string => {
  switch (shape.kind) {
    case "ramp":
      return between(v, p.place(shape.zeroAt), p.place(shape.oneAt));
    case "step":
      return `CASE WHEN ${v} ${shape.above ? ">=" : "<="} ${p.place(shape.at)} THEN 1 ELSE 0 END`;
    case "hump": {
      const [low, peak, high] = [p.place(shape.low), p.place(shape.peak), p.place(shape.high)];
      return `CASE WHEN ${v} <= ${peak} THEN ${between(v, low, peak)} ELSE ${between(v, high, peak)} END`;
    }
    case "table":
      return tableSql(shape.points, v, p);
    case "loss":
      return `greatest(0, least(1, 1 - ${p.place(shape.perUnit)} * ${v}))`;
  }
};

/** What a blank gives; null where it holds the star or leaves the term out. */
const BLANK_VALUE = { zero: "0", neutral: "0.5", "drop-term": "NULL", hold: "NULL" } as const;

const sumOf = (texts: readonly string[]): string => texts.reduce((sum, text) => `(${sum} + ${text})`, "0e0");

/**
 * A relation with every column of `star` and `merit`. Each stage names what the next one uses, so that nothing is
 * written twice.
 */
export const meritSource = (terms: readonly ScoringTerm[], p: Parameters): string => {
  const values = terms.map((t, i) => `${numberToSql(t.tree, p)} AS v${i}`);
  const shaped = terms.map(
    (t, i) =>
      `CAST(CASE WHEN v${i} IS NULL THEN ${BLANK_VALUE[t.blanks]} ELSE ${shapeSql(t.shape, `v${i}`, p)} END AS DOUBLE) AS s${i}`,
  );
  const weighed = sumOf(terms.map((t, i) => `coalesce(${p.place(t.weight)} * s${i}, 0)`));
  const weights = sumOf(terms.map((t, i) => `CASE WHEN s${i} IS NULL THEN 0 ELSE ${p.place(t.weight)} END`));
  const held = terms.flatMap((t, i) => (t.blanks === "hold" ? [`s${i} IS NULL`] : []));
  const zeroed = terms.flatMap((t, i) => (t.zeroZeroesAll ? [`s${i} = 0`] : []));
  const any = (conditions: readonly string[]): string =>
    conditions.length ? conditions.join(" OR ") : "false";
  const merit = `CASE WHEN ${any(held)} THEN NULL WHEN weights = 0 THEN NULL WHEN ${any(zeroed)} THEN 0 ELSE 100 * weighed / weights END`;
  const valued = `SELECT *, ${values.join(", ")} FROM star`;
  const shapes = `SELECT *, ${shaped.join(", ")} FROM (${valued})`;
  const sums = `SELECT *, ${weighed} AS weighed, ${weights} AS weights FROM (${shapes})`;
  return `(SELECT *, CAST(${merit} AS DOUBLE) AS merit FROM (${sums}))`;
};
