import { createHash } from "node:crypto";
import type { DuckDBConnection } from "@duckdb/node-api";
import type { LadderStep } from "#shared/api/stars.ts";
import type { Cut } from "#shared/catalogue/view.ts";
import { Parameters } from "#shared/expression/to-sql.ts";
import { type CompiledCut, compileCuts, passes, whereSql } from "./compile.ts";

/** Which stars a view holds, as numbers. */
export interface Tally {
  total: number;
  count: number;
  /** SHA-256 of the set of stars. */
  hash: string;
}

/** What each cut does. Labels are not part of it: they change no star. */
export type Steps = Omit<LadderStep, "label">[];

/** Number, exclusive or and sum of the stars' identity hashes: the same in whatever order they are met. */
const hashOf = (count: bigint, xor: bigint, sum: bigint): string =>
  createHash("sha256").update(`${count}:${xor}:${sum}`).digest("hex");

export const EMPTY_TALLY: Tally = { total: 0, count: 0, hash: hashOf(0n, 0n, 0n) };

type Row = Record<string, bigint | number>;

const readRows = async (connection: DuckDBConnection, sql: string, values: number[]): Promise<Row[]> =>
  (await connection.runAndReadAll(sql, values)).getRowObjectsJS() as unknown as Row[];

export const readTally = async (connection: DuckDBConnection, cuts: readonly Cut[]): Promise<Tally> => {
  const p = new Parameters();
  const where = whereSql(compileCuts(cuts, p));
  const [row] = await readRows(
    connection,
    `SELECT (SELECT count(*) FROM star) AS total, count(*) AS stars, coalesce(bit_xor(identity_hash), 0) AS xor_of_hashes,
       coalesce(sum(identity_hash), 0) AS sum_of_hashes FROM star WHERE ${where}`,
    p.values,
  );
  const big = (name: string): bigint => BigInt(row?.[name] ?? 0);
  return {
    total: Number(big("total")),
    count: Number(big("stars")),
    hash: hashOf(big("stars"), big("xor_of_hashes"), big("sum_of_hashes")),
  };
};

interface UsedCut {
  sql: string;
  cut: Cut;
  i: number;
}

const usedCuts = (cuts: readonly CompiledCut[]): UsedCut[] =>
  cuts.flatMap(({ sql, cut }, i) => (sql === null ? [] : [{ sql, cut, i }]));

/**
 * Stars by the first cut that drops them, and of those how many are known and how many hold, cut by cut: counts
 * of plain columns in one pass, from which everything the ladder says follows.
 */
const ladderSql = (used: readonly UsedCut[]): string => {
  const tested = used.map(({ sql, i }) => `${sql} AS c${i}`);
  const dropping = used.map(({ cut, i }, n) => `WHEN NOT ${passes(`c${i}`, cut)} THEN ${n}`);
  const counts = used.flatMap(({ i }) => [`count(c${i}) AS known${i}`, `count_if(c${i}) AS holds${i}`]);
  return `SELECT ${["first_drop", "count(*) AS stars", ...counts].join(", ")}
    FROM (SELECT *, CASE ${dropping.join(" ")} ELSE ${used.length} END AS first_drop
      FROM (SELECT ${tested.join(", ")} FROM star)) GROUP BY first_drop`;
};

const refusedStep = ({ cut, refusal }: CompiledCut, left: number): Steps[number] => ({
  expression: cut.expression,
  blanks: cut.blanks,
  left,
  fell: 0,
  alone: 0,
  blank: 0,
  error: refusal && {
    message: refusal.message,
    hint: refusal.hint,
    ...(refusal.position === null ? {} : { position: refusal.position }),
  },
});

const stepsOf = (cuts: readonly CompiledCut[], rows: readonly Row[]): Steps => {
  const sum = (name: string): number => rows.reduce((all, row) => all + Number(row[name] ?? 0), 0);
  const total = sum("stars");
  let left = total;
  let n = 0;
  return cuts.map((compiled, i) => {
    const { cut, sql } = compiled;
    if (sql === null) return refusedStep(compiled, left);
    const fell = Number(rows.find((row) => Number(row.first_drop) === n)?.stars ?? 0);
    n++;
    left -= fell;
    const blank = total - sum(`known${i}`);
    const passing = sum(`holds${i}`) + (cut.blanks === "keep" ? blank : 0);
    const { expression, blanks } = cut;
    return { expression, blanks, left, fell, alone: total - passing, blank, error: null };
  });
};

/** Without a connection there are no stars, and the cuts are still read. */
export const readLadder = async (
  connection: DuckDBConnection | null,
  cuts: readonly Cut[],
  total: number,
): Promise<Steps> => {
  const p = new Parameters();
  const compiled = compileCuts(cuts, p);
  const used = usedCuts(compiled);
  const isAsked = connection !== null && used.length > 0;
  const rows = isAsked ? await readRows(connection, ladderSql(used), p.values) : [{ stars: total }];
  return stepsOf(compiled, rows);
};
