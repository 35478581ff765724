import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { declinationText, rightAscensionText } from "#shared/format/sexagesimal.ts";

const MINUS = "\u2212";

describe("right ascension", () => {
  test.each([
    [217.425, "14 29 42.0000"],
    [179.999999999, "12 00 00.0000"],
    [359.9999999999, "00 00 00.0000"],
    [0, "00 00 00.0000"],
    [360, "00 00 00.0000"],
    [-15, "23 00 00.0000"],
  ])("%d°", (degrees, text) => {
    expect(rightAscensionText(degrees)).toBe(text);
  });
});

describe("declination", () => {
  test.each([
    [-0.2041572, `${MINUS}00 12 14.966`],
    [-0, `${MINUS}00 00 00.000`],
    [0, "+00 00 00.000"],
    [12.5822722, "+12 34 56.180"],
    [89.9999999999, "+90 00 00.000"],
    [-90, `${MINUS}90 00 00.000`],
  ])("%d°", (degrees, text) => {
    expect(declinationText(degrees)).toBe(text);
  });

  test("has the minus of files where it goes into one", () => {
    expect(declinationText(-1.5, 2, "-")).toBe("-01 30 00.00");
  });
});

test("60 seconds or minutes never occur, and a position reads back to its last digit", () => {
  fc.assert(
    fc.property(
      fc.double({ min: -90, max: 90, noNaN: true }),
      fc.integer({ min: 0, max: 5 }),
      (dec, decimals) => {
        const [, sign, d, m, s] = /^(.)(\d\d) ([0-5]\d) ([0-5]\d(?:\.\d+)?)$/.exec(
          declinationText(dec, decimals, "-"),
        ) ?? ["", "", "NaN", "", ""];
        const back = (sign === "-" ? -1 : 1) * (Number(d) + Number(m) / 60 + Number(s) / 3600);
        expect(Math.abs(back - dec)).toBeLessThanOrEqual((0.5 * 10 ** -decimals) / 3600 + 1e-12);
      },
    ),
  );
});
