import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { quickNumber } from "#server/formats/quick-number.ts";

describe("quickNumber", () => {
  test("reads to the same bits as the language does, with either decimal mark", () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.integer({ min: 0, max: 20 }),
        (value, decimals) => {
          for (const text of [String(value), value.toFixed(decimals), value.toExponential()]) {
            expect(quickNumber(text, ".")).toBe(Number(text));
            expect(quickNumber(text.replace(".", ","), ",")).toBe(Number(text));
          }
        },
      ),
    );
  });

  test.each([
    ["+5", 5],
    [".5", 0.5],
    ["-.25", -0.25],
    ["5.", 5],
    ["-0", -0],
    ["1e5", 100_000],
    ["1.5E-3", 0.0015],
    ["0000000000000000001", 1],
    ["45.00432028915398", 45.00432028915398],
  ])("%s is %d", (text, value) => expect(quickNumber(text, ".")).toBe(value));

  test.each([
    "",
    " 5",
    "5 ",
    "-",
    ".",
    "1e",
    "1e+",
    "e5",
    "1.2.3",
    "0x10",
    "Infinity",
    "1,5",
    "1_000",
    "−5",
    "1.5D3",
  ])("“%s” is left to the slow way", (text) => expect(quickNumber(text, ".")).toBeNaN());
});
