import fc from "fast-check";
import { expect, test } from "vitest";
import { meritSource } from "#server/scan/merit-sql.ts";
import type { Shape, Term } from "#shared/api/merits.ts";
import { Parameters } from "#shared/expression/to-sql.ts";
import { compileMerit, scoreStar } from "#shared/merit/score.ts";
import { column, type Star, starTable, valuesOf } from "#tests/support/star-table.ts";

const KEYS = ["r_min", "transits", "light_share", "flags"] as const;
const VALUES = [null, 0, 0.5, 1, 1.5, 2, 6, 0.7, 0.123];
const SKY: Star[] = VALUES.flatMap((a, i) =>
  VALUES.map((b, j) => ({
    r_min: a,
    transits: b,
    light_share: VALUES[(i + 2 * j) % VALUES.length] ?? null,
    flags: VALUES[(4 * i + j) % VALUES.length] ?? null,
  })),
);
const end = fc.constantFrom(0, 0.5, 1, 1.5, 2.25, 6);
const shape: fc.Arbitrary<Shape> = fc.oneof(
  fc
    .record({ kind: fc.constant("ramp" as const), zeroAt: end, oneAt: end })
    .filter((s) => s.zeroAt !== s.oneAt),
  fc.record({ kind: fc.constant("step" as const), at: end, above: fc.boolean() }),
  fc.constant({ kind: "hump" as const, low: 0, peak: 1, high: 3 }),
  fc.record({ kind: fc.constant("loss" as const), perUnit: fc.constantFrom(0.25, 0.5, 2) }),
  fc.record({
    kind: fc.constant("table" as const),
    points: fc.array(fc.tuple(end, fc.constantFrom(0, 0.3, 1)), { minLength: 2, maxLength: 5 }),
  }),
);
const term: fc.Arbitrary<Term> = fc.record({
  label: fc.constant("term"),
  expression: fc.constantFrom(...KEYS, "light_share / flags", "sqrt(transits - 1)"),
  shape,
  weight: fc.constantFrom(0, 1, 2, 0.3),
  blanks: fc.constantFrom("zero", "neutral", "drop-term", "hold"),
  zeroZeroesAll: fc.boolean(),
});

test("the index and the score of one star agree on every figure of merit", async () => {
  const connection = await starTable(SKY);
  await fc.assert(
    fc.asyncProperty(fc.array(term, { minLength: 1, maxLength: 6 }), async (terms) => {
      const compiled = compileMerit(terms);
      if (!compiled.ok) throw new Error("The terms cannot be read.");
      const p = new Parameters();
      const found = await column(connection, "merit", p.values, meritSource(compiled.terms, p));
      expect(found).toEqual(SKY.map((star) => scoreStar(compiled.terms, valuesOf(star)).merit));
    }),
    { numRuns: 100 },
  );
}, 120_000);
