import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  EXTINCTION_COEFFICIENTS,
  type ExtinctionBand,
  extinction,
  extinctionSlope,
} from "#shared/science/extinction.ts";
import { slopeOf } from "./slope.ts";

const BANDS = Object.keys(EXTINCTION_COEFFICIENTS) as ExtinctionBand[];

describe("extinction", () => {
  /** Computed from the coefficients of Casagrande et al. 2021 for E(B − V) = 0.1 and BP − RP 0.90, that is c₀ = 0.82. */
  test.each([
    ["g", 0.1 * (2.609 - 0.475 * 0.82 + 0.053 * 0.82 ** 2)],
    ["bp", 0.1 * (2.998 - 0.14 * 0.82 - 0.175 * 0.82 ** 2 + 0.062 * 0.82 ** 3)],
    ["rp", 0.1 * (1.689 - 0.059 * 0.82)],
    ["j", 0.0719],
    ["h", 0.0455],
    ["ks", 0.0306],
  ] as const)("in %s", (band, expected) => {
    expect(extinction(band, 0.1, 0.9)).toBeCloseTo(expected, 12);
  });

  test("without dust there is none, and twice the dust gives twice of it in the infrared", () => {
    for (const band of BANDS) expect(extinction(band, 0, 0.8)).toBe(0);
    for (const band of ["j", "h", "ks"] as const)
      expect(extinction(band, 0.4, Number.NaN)).toBeCloseTo(2 * extinction(band, 0.2, Number.NaN), 12);
  });

  test("bluer bands lose more light, over all colours", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.45, max: 2.55, noNaN: true }), (colour) => {
        const lost = (["bp", "rp", "j", "h", "ks"] as const).map((band) => extinction(band, 0.3, colour));
        expect(lost).toEqual([...lost].sort((a, b) => b - a));
      }),
    );
  });

  test("a negative reddening and colours outside give none", () => {
    for (const band of BANDS) expect(extinction(band, -0.01, 0.8)).toBeNaN();
    for (const colour of [0.2, 2.55]) expect(extinction("g", 0, colour)).toBe(0);
    for (const colour of [0.19, 2.56, Number.NaN])
      for (const band of ["g", "bp", "rp"] as const) expect(extinction(band, 0, colour)).toBeNaN();
  });

  test.each(["g", "bp", "rp", "ks"] as const)("its slope in %s follows the value", (band) => {
    const slope = slopeOf((ebv) => extinction(band, ebv, 1.1), 0.2);
    expect(extinctionSlope(band, 0.2, 1.1)).toBeCloseTo(slope, 6);
    expect(extinctionSlope(band, -0.1, 1.1)).toBeNaN();
  });
});
