import { createHash } from "node:crypto";
import type { DuckDBConnection } from "@duckdb/node-api";
import type { LadderStep } from "#shared/api/stars.ts";
import type { Cut } from "#shared/catalogue/view.ts";
import { Parameters } from "#shared/expression/to-sql.ts";
import { type CompiledCut, compileCuts, passes } from "./compile.ts";

/** What one pass over the index says of the cuts of a view. Labels are not part of it: they change no star. */
export interface Tally {
  total: number;
  count: number;
  /** SHA-256 of the set of stars. */
  hash: string;
  steps: Omit<LadderStep, "label">[];
}

/** Number, exclusive or and sum of the stars' identity hashes: the same in whatever order they are met. */
const hashOf = (count: bigint, xor: bigint, sum: bigint): string =>
  createHash("sha256").update(`${count}:${xor}:${sum}`).digest("hex");

/** `p0`, `p1` … say whether each cut in turn lets a star pass, `b0` … whether it is blank there. */
const tallySql = (cuts: readonly CompiledCut[]): string => {
  const used = cuts.flatMap(({ sql, cut }, i) => (sql === null ? [] : [{ sql, cut, i }]));
  const tested = used.map(({ sql, i }) => `${sql} AS c${i}`);
  const decided = used.flatMap(({ cut, i }) => [
    `${passes(`c${i}`, cut)} AS p${i}`,
    `c${i} IS NULL AS b${i}`,
  ]);
  const reached = used.map((_, n) =>
    used
      .slice(0, n + 1)
      .map(({ i }) => `p${i}`)
      .join(" AND "),
  );
  const all = reached.at(-1) ?? "true";
  const columns = [
    "count(*) AS total",
    `count(*) FILTER (${all}) AS stars`,
    `coalesce(bit_xor(identity_hash) FILTER (${all}), 0) AS xor_of_hashes`,
    `coalesce(sum(identity_hash) FILTER (${all}), 0) AS sum_of_hashes`,
    ...used.flatMap(({ i }, n) => [
      `count(*) FILTER (${reached[n]}) AS left${i}`,
      `count(*) FILTER (NOT p${i}) AS alone${i}`,
      `count(*) FILTER (b${i}) AS blank${i}`,
    ]),
  ];
  const inner = `SELECT ${["identity_hash", ...tested].join(", ")} FROM star`;
  return `SELECT ${columns.join(", ")} FROM (SELECT ${["identity_hash", ...decided].join(", ")} FROM (${inner}))`;
};

const stepsOf = (
  cuts: readonly CompiledCut[],
  total: number,
  number: (name: string) => number,
): Tally["steps"] => {
  let before = total;
  return cuts.map(({ cut, sql, refusal }, i) => {
    const step = { expression: cut.expression, blanks: cut.blanks };
    if (sql === null)
      return {
        ...step,
        left: before,
        fell: 0,
        alone: 0,
        blank: 0,
        error: refusal && {
          message: refusal.message,
          hint: refusal.hint,
          ...(refusal.position === null ? {} : { position: refusal.position }),
        },
      };
    const left = number(`left${i}`);
    const fell = before - left;
    before = left;
    return { ...step, left, fell, alone: number(`alone${i}`), blank: number(`blank${i}`), error: null };
  });
};

export const readTally = async (connection: DuckDBConnection, cuts: readonly Cut[]): Promise<Tally> => {
  const p = new Parameters();
  const compiled = compileCuts(cuts, p);
  const result = await connection.runAndReadAll(tallySql(compiled), p.values);
  const row = (result.getRowObjectsJS()[0] ?? {}) as Record<string, bigint>;
  const big = (name: string): bigint => BigInt(row[name] ?? 0);
  const number = (name: string): number => Number(big(name));
  return {
    total: number("total"),
    count: number("stars"),
    hash: hashOf(big("stars"), big("xor_of_hashes"), big("sum_of_hashes")),
    steps: stepsOf(compiled, number("total"), number),
  };
};

/** Before the first edition there are no stars, and the cuts are still read. */
export const emptyTally = (cuts: readonly Cut[]): Tally => ({
  total: 0,
  count: 0,
  hash: hashOf(0n, 0n, 0n),
  steps: stepsOf(compileCuts(cuts, new Parameters()), 0, () => 0),
});
