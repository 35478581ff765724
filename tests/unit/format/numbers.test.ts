import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Column, findColumn } from "#shared/catalogue/columns.ts";
import { cellText, fixed, formatCell, plainNumber, withError, withoutError } from "#shared/format/numbers.ts";

const THIN = "\u2009";
const MINUS = "\u2212";

const column = (key: string): Column => {
  const found = findColumn(key);
  if (!found) throw new Error(`No column ${key}.`);
  return found;
};

describe("a value with its error", () => {
  // The rule of the Particle Data Group: 100 to 354 two digits, 355 to 949 one, 950 to 999 rounded up.
  test.each([
    [0.3344, 0.0097, "0.334", "0.010"],
    [0.827, 0.119, "0.83", "0.12"],
    [0.827, 0.367, "0.8", "0.4"],
    [12.3456, 0.0354, "12.346", "0.035"],
    [12.3456, 0.0355, "12.35", "0.04"],
    [12.3456, 0.0949, "12.35", "0.09"],
    [12.3456, 0.095, "12.35", "0.10"],
    [1234.5, 120, `1${THIN}230`, "120"],
    [3350, 60, `3${THIN}350`, "60"],
    [-0.21, 0.05, `${MINUS}0.21`, "0.05"],
    [-0.001, 0.2, "0.00", "0.20"],
    [5, 0.0009999, "5.0000", "0.0010"],
  ])("%d ± %d", (value, error, text, errorText) => {
    expect(withError(value, error, 3)).toEqual({ value: text, error: errorText });
  });

  test("stops both at the same place, and the error keeps one or two digits", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e5, max: 1e5, noNaN: true }),
        fc.double({ min: 1e-6, max: 1e4, noNaN: true }),
        (value, error) => {
          const shown = withError(value, error, 3);
          const decimals = (text: string | null) => text?.split(".")[1]?.length ?? 0;
          expect(decimals(shown.value)).toBe(decimals(shown.error));
          const digits = (shown.error ?? "").replace(/\D/g, "").replace(/^0+/, "");
          expect(Number(digits)).toBeGreaterThan(0);
          expect(digits.replace(/0+$/, "").length).toBeLessThanOrEqual(2);
        },
      ),
    );
  });

  test.each([undefined, 0, -1, Number.NaN, Number.POSITIVE_INFINITY])("has none that is %d", (error) => {
    expect(withError(0.334, error, 3)).toEqual({ value: "0.334", error: null });
  });
});

describe("a value without an error", () => {
  test.each([
    [13.3088, 3, "13.31"],
    [9.8765, 3, "9.877"],
    [0.99996, 4, "1.000"],
    [9999.6, 2, `10${THIN}000`],
    [123456, 2, `123${THIN}500`],
    [0, 3, "0"],
    [-5.5, 1, `${MINUS}5.5`],
    [0.0009999, 4, "1.00 × 10⁻³"],
    [0.0000127, 5, "1.27 × 10⁻⁵"],
    [-1234567, 0, `${MINUS}1.23 × 10⁶`],
  ])("%d with at most %i decimals", (value, decimals, text) => {
    expect(withoutError(value, decimals)).toBe(text);
  });

  test("never shows more than four digits that count", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e6, noNaN: true }), (value) => {
        const digits = withoutError(value, 9).split(" × ")[0]?.replace(/\D/g, "").replace(/^0+/, "") ?? "";
        // Zeros that only hold the place of a whole number do not count.
        expect(value >= 1e4 ? digits.replace(/0+$/, "").length : digits.length).toBeLessThanOrEqual(4);
      }),
    );
  });
});

describe("a cell", () => {
  test.each([
    ["radius", 0.3344, 0.0097, "0.334 ± 0.010"],
    ["transit_probability", 0.0138, undefined, "1.38"],
    ["transit_probability", 0.1234, undefined, "12.3"],
    ["transit_probability", 0.0138, 0.0004, "1.38 ± 0.04"],
    ["noise_1h", 102.8, undefined, "103"],
    ["noise_1h", 64.72, undefined, "64.7"],
    ["noise_1h", 99.97, undefined, "100"],
    ["earth_period", 24.547, undefined, "24.55"],
    ["earth_period", 173.012, undefined, "173.0"],
    ["transits", 12345, undefined, `12${THIN}345`],
    ["parallax", -0.3, undefined, `${MINUS}0.300`],
    ["epoch", 2016, undefined, "2016.00"],
  ] as const)("%s %d ± %d", (key, value, error, text) => {
    expect(cellText(column(key), value, error)).toBe(text);
  });

  test("has the digits of its column where positions line up", () => {
    expect(formatCell(column("ra"), 217.425)).toEqual({ value: "217.42500", error: null });
    expect(formatCell(column("dec"), -0.2041572).value).toBe(`${MINUS}0.20416`);
  });
});

test("a number that rounds to nothing has no sign", () => {
  expect(fixed(-0.0001, 2)).toBe("0.00");
});

test("a number in a file reads back to the same bits, with a plain minus", () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      const text = plainNumber(value);
      expect(text).toMatch(/^-?[\d.]+(e[+-]\d+)?$/);
      expect(Number(text)).toBe(value === 0 ? 0 : value);
    }),
  );
});
