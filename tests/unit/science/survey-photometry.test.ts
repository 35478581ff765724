import { expect, test } from "vitest";
import { BRIGHTEST_MAG, unsaturatedG } from "#shared/science/survey-photometry.ts";

/** Computed from Riello et al. 2021, A&A 649, A3, eq. C.1. */
test.each([
  [6, 6.009754],
  [7, 7.004341],
  [7.5, 7.501889],
])("G %d is corrected for saturation", (g, corrected) => {
  expect(unsaturatedG(g)).toBeCloseTo(corrected, 6);
});

test("colours are taken from these magnitudes on", () => {
  // Program of Casagrande et al. 2021.
  expect(BRIGHTEST_MAG).toEqual({ g: 6, bp: 5, rp: 5, j: 5, h: 4.8, ks: 4.2 });
});

test("G of 8 and fainter stays, and stars brighter than 6 give none", () => {
  expect(unsaturatedG(8)).toBe(8);
  expect(unsaturatedG(12.3)).toBe(12.3);
  for (const g of [BRIGHTEST_MAG.g - 0.001, Number.NaN]) expect(unsaturatedG(g)).toBeNaN();
});
