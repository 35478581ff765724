import { describe, expect, test } from "vitest";
import type { Term } from "#shared/api/merits.ts";
import { compileMerit, scoreStar, shapeValue } from "#shared/merit/score.ts";

const term = (expression: string, shape: Term["shape"], weight: number, more: Partial<Term> = {}): Term => ({
  label: expression,
  expression,
  shape,
  weight,
  blanks: "zero",
  zeroZeroesAll: false,
  ...more,
});

/** The practice figure of merit of PRODUCT's Appendix A. */
const PRACTICE: Term[] = [
  term("r_min", { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 }, 4),
  term("transit_probability", { kind: "ramp", zeroAt: 0.005, oneAt: 0.02 }, 2),
  term("transits", { kind: "ramp", zeroAt: 1, oneAt: 6 }, 2),
  term("light_share", { kind: "ramp", zeroAt: 0.7, oneAt: 1 }, 1),
  term("flags", { kind: "loss", perUnit: 0.25 }, 1),
];

const score = (terms: Term[], star: Record<string, number>) => {
  const compiled = compileMerit(terms);
  if (!compiled.ok) throw new Error("The terms cannot be read.");
  return scoreStar(compiled.terms, (key) => star[key] ?? Number.NaN);
};

const A = { r_min: 0.4957, transit_probability: 0.0138025, transits: 6, light_share: 1, flags: 0 };

describe("the practice figure of merit", () => {
  test.each([
    ["A", A, 91.74],
    ["B", { ...A, r_min: 0.337, transit_probability: 0.017804, transits: 20 }, 97.07],
    ["C", { ...A, r_min: 0.8402, transit_probability: 0.011631, transits: 2 }, 59.23],
    ["A with a neighbour and a flag", { ...A, r_min: 0.5545, light_share: 0.7992, flags: 1 }, 80.34],
  ])("of star %s", (_, star, expected) => {
    const { merit, shares } = score(PRACTICE, star);
    expect(merit).toBeCloseTo(expected, 1);
    expect(shares.reduce((a, b) => a + b, 0)).toBeCloseTo(merit ?? Number.NaN, 9);
  });
});

describe("a blank", () => {
  const star = { transits: 6 };
  const terms = (blanks: Term["blanks"]): Term[] => [
    term("transits", { kind: "ramp", zeroAt: 1, oneAt: 6 }, 3),
    term("r_min", { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 }, 1, { blanks }),
  ];
  test.each([
    ["zero", 75],
    ["neutral", 87.5],
    ["drop-term", 100],
    ["hold", null],
  ] as const)("with %s gives %s", (blanks, expected) => {
    expect(score(terms(blanks), star).merit).toBe(expected);
  });
  test("in every term leaves no merit", () => {
    expect(
      score([term("r_min", { kind: "step", at: 1, above: false }, 1, { blanks: "drop-term" })], {}),
    ).toEqual({
      merit: null,
      shares: [0],
    });
  });
});

test("a zero that zeroes all does so", () => {
  const terms = [
    term("transits", { kind: "ramp", zeroAt: 1, oneAt: 6 }, 3),
    term("flags", { kind: "step", at: 0, above: false }, 1, { zeroZeroesAll: true }),
  ];
  expect(score(terms, { transits: 6, flags: 0 }).merit).toBe(100);
  expect(score(terms, { transits: 6, flags: 1 })).toEqual({ merit: 0, shares: [0, 0] });
});

test("shapes stay within 0 and 1 and are flat outside", () => {
  const table: Term["shape"] = {
    kind: "table",
    points: [
      [2, 1],
      [0, 0],
      [1, 0.8],
    ],
  };
  expect([-1, 0, 0.5, 1, 1.5, 2, 9].map((x) => shapeValue(table, x))).toEqual([0, 0, 0.4, 0.8, 0.9, 1, 1]);
  const hump: Term["shape"] = { kind: "hump", low: 0, peak: 1, high: 3 };
  expect([-1, 0, 0.5, 1, 2, 3, 9].map((x) => shapeValue(hump, x))).toEqual([0, 0, 0.5, 1, 0.5, 0, 0]);
  expect([0, 1, 2].map((x) => shapeValue({ kind: "step", at: 1, above: true }, x))).toEqual([0, 1, 1]);
  expect([0, 1, 9].map((x) => shapeValue({ kind: "loss", perUnit: 0.25 }, x))).toEqual([1, 0.75, 0]);
});

test("terms that cannot be read are named", () => {
  const compiled = compileMerit([
    term("r_min", { kind: "step", at: 1, above: true }, 1),
    term("rmin", { kind: "step", at: 1, above: true }, 1),
  ]);
  expect(compiled).toMatchObject({ ok: false, refusals: [{ term: 1, hint: "Did you mean r_min?" }] });
});
