import type { DuckDBConnection } from "@duckdb/node-api";
import fc from "fast-check";
import { beforeAll, describe, expect, test } from "vitest";
import { evaluateCondition, evaluateNumber } from "#shared/expression/evaluate.ts";
import { parseCondition, parseNumber } from "#shared/expression/parse.ts";
import { conditionToSql, numberToSql, Parameters } from "#shared/expression/to-sql.ts";
import { column, type Star, starTable, valuesOf } from "#tests/support/star-table.ts";

const KEYS = ["ruwe", "light_share", "flags", "transits"] as const;
const VALUES = [null, 0, 1, -1, 2, 0.5, -3.25, 1e6, 1e-9, 1.4, 12, 700];

/** Every pair of values in the first two columns, the rest scattered: blanks of each kind are among them. */
const STARS: Star[] = VALUES.flatMap((ruwe, i) =>
  VALUES.map((light_share, j) => ({
    ruwe,
    light_share,
    flags: VALUES[(i * 5 + j * 3) % VALUES.length] ?? null,
    transits: VALUES[(i + j * 7) % VALUES.length] ?? null,
  })),
);

/** Hundreds of questions to the index, on whatever machine. */
const PATIENCE_MS = 120_000;

let connection: DuckDBConnection;
beforeAll(async () => {
  connection = await starTable(STARS);
});

const { number, condition } = fc.letrec<{ number: string; condition: string }>((tie) => ({
  number: fc.oneof(
    { maxDepth: 4, depthSize: "small" },
    fc.constantFrom(...KEYS),
    fc.constantFrom("0", "1", "2", "0.5", "1.4", "3", "1e3"),
    fc
      .tuple(tie("number"), fc.constantFrom("+", "-", "*", "/", "^"), tie("number"))
      .map(([a, op, b]) => `(${a} ${op} ${b})`),
    fc.tuple(fc.constantFrom("abs", "sqrt", "log10", "exp"), tie("number")).map(([f, a]) => `${f}(${a})`),
    fc
      .tuple(fc.constantFrom("min", "max", "pow"), tie("number"), tie("number"))
      .map(([f, a, b]) => `${f}(${a}, ${b})`),
    tie("number").map((a) => `(-${a})`),
    fc.tuple(tie("condition"), tie("number"), tie("number")).map(([c, a, b]) => `((${c}) ? (${a}) : (${b}))`),
  ),
  condition: fc.oneof(
    { maxDepth: 4, depthSize: "small" },
    fc
      .tuple(tie("number"), fc.constantFrom("<", "<=", ">", ">=", "==", "!="), tie("number"))
      .map(([a, op, b]) => `(${a} ${op} ${b})`),
    fc.tuple(tie("number"), tie("number"), tie("number")).map(([a, b, c]) => `(${a} <= ${b} < ${c})`),
    fc
      .tuple(tie("condition"), fc.constantFrom("and", "or"), tie("condition"))
      .map(([a, op, b]) => `(${a} ${op} ${b})`),
    tie("condition").map((c) => `(not ${c})`),
  ),
}));

/** Powers and logarithms of two mathematical libraries may differ in the last place. */
const isAlike = (a: number, b: number): boolean =>
  Object.is(a, b) || a === b || Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b), 1e-300);

describe("the index and the evaluation of one star agree", () => {
  test(
    "on conditions without powers and logarithms, exactly, blanks among them",
    async () => {
      let taken = 0;
      await fc.assert(
        fc.asyncProperty(
          condition.filter((text) => !/\^|pow|exp|log10/.test(text)),
          async (text) => {
            const parsed = parseCondition(text);
            if (!parsed.ok) return;
            taken++;
            const p = new Parameters();
            const found = await column(connection, conditionToSql(parsed.tree, p), p.values);
            expect(found).toEqual(STARS.map((star) => evaluateCondition(parsed.tree, valuesOf(star))));
          },
        ),
        { numRuns: 150 },
      );
      expect(taken).toBeGreaterThan(80);
    },
    PATIENCE_MS,
  );

  test(
    "on numbers, to the last places, blanks among them",
    async () => {
      let taken = 0;
      await fc.assert(
        fc.asyncProperty(number, async (text) => {
          const parsed = parseNumber(text);
          if (!parsed.ok) return;
          taken++;
          const p = new Parameters();
          const found = await column(connection, numberToSql(parsed.tree, p), p.values);
          found.forEach((value, i) => {
            const expected = evaluateNumber(parsed.tree, valuesOf(STARS[i] ?? {}));
            const actual = value === null ? Number.NaN : Number(value);
            if (!isAlike(actual, expected))
              throw new Error(
                `${text}: ${actual} in the index, ${expected} alone, for ${JSON.stringify(STARS[i])}`,
              );
          });
        }),
        { numRuns: 150 },
      );
      expect(taken).toBeGreaterThan(80);
    },
    PATIENCE_MS,
  );
});

test.each([
  ["ruwe < 1.4 or light_share > 0.9", { ruwe: 1, light_share: null }, null],
  ["not (ruwe < 1.4)", { ruwe: null }, null],
  ["sqrt(ruwe) < 2", { ruwe: -1 }, null],
  ["1 / flags > 0", { flags: 0 }, null],
  ["flags == 0", { flags: 0 }, true],
  ["2 <= transits < 3", { transits: 3 }, false],
])("%s of %o is %s", (text, star, expected) => {
  const parsed = parseCondition(text);
  expect(parsed.ok && evaluateCondition(parsed.tree, valuesOf(star as Star))).toBe(expected);
});
