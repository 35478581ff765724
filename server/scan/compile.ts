import type { Cut, Sort } from "#shared/catalogue/view.ts";
import { parseCondition } from "#shared/expression/parse.ts";
import type { Refusal } from "#shared/expression/refusal.ts";
import { conditionToSql, type Parameters } from "#shared/expression/to-sql.ts";
import type { ScoringTerm } from "#shared/merit/score.ts";
import { NUMBER_KEYS, TEXT_KEYS } from "./index-columns.ts";
import { meritSource } from "./merit-sql.ts";

/** Cuts, order and figure of merit as parts of SQL; the constants of all of them stand in `parameters`. */

export interface CompiledCut {
  cut: Cut;
  /** True, false, or null where blank; absent where the expression cannot be used. */
  sql: string | null;
  refusal: Refusal | null;
}

export const compileCuts = (cuts: readonly Cut[], parameters: Parameters): CompiledCut[] =>
  cuts.map((cut) => {
    const parsed = parseCondition(cut.expression);
    if (parsed.ok) return { cut, sql: conditionToSql(parsed.tree, parameters), refusal: null };
    const { message, hint, position } = parsed;
    return { cut, sql: null, refusal: { message, hint, position } };
  });

/** Blank counts as the cut says. */
export const passes = (sql: string, cut: Cut): string =>
  `coalesce(${sql}, ${cut.blanks === "keep" ? "true" : "false"})`;

/** The condition that all usable cuts together make. A bare condition drops blanks, and is the quickest. */
export const whereSql = (cuts: readonly CompiledCut[]): string =>
  cuts
    .flatMap(({ sql, cut }) => {
      if (sql === null) return [];
      return [cut.blanks === "drop" ? sql : passes(sql, cut)];
    })
    .join(" AND ") || "true";

/** Whether the index can sort by it; merit needs a figure of merit. */
export const canSortBy = (key: string, hasMerit: boolean): boolean =>
  key === "merit" ? hasMerit : NUMBER_KEYS.includes(key) || (TEXT_KEYS as readonly string[]).includes(key);

/** Blanks last both ways; equals by the rank of ties, which is the same on any machine. */
export const orderSql = (sort: Sort): string => {
  const column = sort.key === "designation" ? "name_rank" : `"${sort.key}"`;
  return `${column} ${sort.direction === "desc" ? "DESC" : "ASC"} NULLS LAST, tie`;
};

/** A relation of the stars that pass, with `merit` only where the order needs it. */
export const sourceSql = (
  sort: Sort,
  terms: readonly ScoringTerm[] | null,
  parameters: Parameters,
): string => (sort.key === "merit" && terms ? meritSource(terms, parameters) : "star");
