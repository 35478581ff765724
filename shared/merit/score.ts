import type { Shape, Term } from "../api/merits.ts";
import { evaluateNumber, type Values } from "../expression/evaluate.ts";
import { parseNumber } from "../expression/parse.ts";
import type { Refusal } from "../expression/refusal.ts";
import type { NumberTree } from "../expression/tree.ts";

/**
 * A figure of merit ready for use. merit = 100 · Σ w·s / Σ w, where s is what the shape makes of a term's value.
 * `scan/merit-sql.ts` says the same in SQL, in the same order of operations.
 */
export interface ScoringTerm extends Omit<Term, "expression"> {
  readonly tree: NumberTree;
}

export interface Score {
  /** 0 to 100; null where a blank holds the star or no term is left. */
  readonly merit: number | null;
  /** What each term adds, in its order; they add up to the merit. All zero where there is none. */
  readonly shares: number[];
}

export type CompiledMerit =
  | { readonly ok: true; readonly terms: readonly ScoringTerm[] }
  | { readonly ok: false; readonly refusals: readonly ({ readonly term: number } & Refusal)[] };

/** Reads the expressions of all terms, or says which cannot be read. */
export const compileMerit = (terms: readonly Term[]): CompiledMerit => {
  const ready: ScoringTerm[] = [];
  const refusals: ({ term: number } & Refusal)[] = [];
  terms.forEach(({ expression, ...term }, index) => {
    const parsed = parseNumber(expression);
    if (parsed.ok) ready.push({ ...term, tree: parsed.tree });
    else {
      const { message, hint, position } = parsed;
      refusals.push({ term: index, message, hint, position });
    }
  });
  return refusals.length > 0 ? { ok: false, refusals } : { ok: true, terms: ready };
};

const between = (value: number, from: number, to: number): number =>
  Math.max(0, Math.min(1, (value - from) / (to - from)));

/** Straight lines between the points, in order of their value; flat outside. */
const interpolate = (points: readonly (readonly [number, number])[], value: number): number => {
  const sorted = sortedPoints(points);
  let result = sorted[0]?.[1] ?? 0;
  for (let i = 1; i < sorted.length; i++) {
    const [x0, y0] = sorted[i - 1] ?? [0, 0];
    const [x1, y1] = sorted[i] ?? [0, 0];
    if (value >= x1) result = y1;
    else if (value > x0) return y0 + ((y1 - y0) * (value - x0)) / (x1 - x0);
  }
  return result;
};

export const sortedPoints = (
  points: readonly (readonly [number, number])[],
): readonly (readonly [number, number])[] => [...points].sort((a, b) => a[0] - b[0]);

/** What a shape makes of a value: 0 to 1. */
export const shapeValue = (shape: Shape, value: number): number => {
  switch (shape.kind) {
    case "ramp":
      return between(value, shape.zeroAt, shape.oneAt);
    case "step":
      return (shape.above ? value >= shape.at : value <= shape.at) ? 1 : 0;
    case "hump":
      return value <= shape.peak
        ? between(value, shape.low, shape.peak)
        : between(value, shape.high, shape.peak);
    case "table":
      return interpolate(shape.points, value);
    case "loss":
      return Math.max(0, Math.min(1, 1 - shape.perUnit * value));
  }
};

const HELD = "held";
const LEFT_OUT = "left out";

const termValue = (term: ScoringTerm, values: Values): number | typeof HELD | typeof LEFT_OUT => {
  const value = evaluateNumber(term.tree, values);
  if (!Number.isNaN(value)) return shapeValue(term.shape, value);
  if (term.blanks === "zero") return 0;
  if (term.blanks === "neutral") return 0.5;
  return term.blanks === "hold" ? HELD : LEFT_OUT;
};

/** The merit of one star, and what each term adds to it. */
export const scoreStar = (terms: readonly ScoringTerm[], values: Values): Score => {
  const none = terms.map(() => 0);
  const found = terms.map((term) => termValue(term, values));
  if (found.includes(HELD)) return { merit: null, shares: none };
  let sum = 0;
  let weights = 0;
  let isZeroed = false;
  const weighed = terms.map((term, i) => {
    const s = found[i];
    if (typeof s !== "number") return 0;
    if (s === 0 && term.zeroZeroesAll) isZeroed = true;
    sum += term.weight * s;
    weights += term.weight;
    return term.weight * s;
  });
  if (weights === 0) return { merit: null, shares: none };
  if (isZeroed) return { merit: 0, shares: none };
  return { merit: (100 * sum) / weights, shares: weighed.map((w) => (100 * w) / weights) };
};
