import { describe, expect, test } from "vitest";
import {
  INTERFEROMETRIC_ROWS,
  interferometricTeff,
  interferometricTeffSlope,
} from "#shared/science/interferometric-colours.ts";
import {
  interferometricRadiusFromMass,
  interferometricRadiusFromTeff,
} from "#shared/science/interferometric-radii.ts";
import { slopeOf } from "./slope.ts";

const ROWS = Object.values(INTERFEROMETRIC_ROWS);

describe("temperatures on the interferometric scale", () => {
  /** Computed from Boyajian et al. 2013, ApJ 771, 40, Table 8. */
  test.each([
    ["b-v", 0.65, 5764],
    ["b-v, cubic", 0.65, 5707],
    ["b-v", 1, 4794],
    ["b-v, cubic", 1, 4786],
    ["v-k", 1.55, 5703.5],
    ["v-j", 1.198, 5611],
    ["v-h", 1.484, 5691],
    ["g-i", 0.5, 5859.8],
    ["g-r", 0.45, 5657.4],
    ["g-h", 1.9, 5529.6],
    ["g-k", 1.95, 5567.5],
  ] as const)("%s %d gives %d K", (key, colour, teff) => {
    expect(Math.abs(interferometricTeff(INTERFEROMETRIC_ROWS[key], colour) - teff)).toBeLessThan(0.51);
  });

  test("the colours of the Sun give 5600 to 5770 K: the scale is cooler than 5772 K", () => {
    for (const [key, colour] of [
      ["b-v", 0.65],
      ["v-j", 1.198],
      ["v-h", 1.484],
      ["v-k", 1.55],
    ] as const) {
      const teff = interferometricTeff(INTERFEROMETRIC_ROWS[key], colour);
      expect(teff).toBeGreaterThan(5600);
      expect(teff).toBeLessThan(5772);
    }
  });

  test("every colour holds between the limits of the table", () => {
    const limits = Object.entries(INTERFEROMETRIC_ROWS).map(([key, row]) => [key, row.bluest, row.reddest]);
    expect(limits).toEqual([
      ["b-v", -0.02, 1.73],
      ["b-v, cubic", -0.02, 1.73],
      ["v-j", -0.12, 4.24],
      ["v-h", -0.13, 4.77],
      ["v-k", -0.15, 5.04],
      ["g-r", -0.23, 1.4],
      ["g-i", -0.43, 2.78],
      ["g-h", -0.12, 5.59],
      ["g-k", -0.01, 5.86],
    ]);
  });

  test("at both ends the temperatures are those of A and M stars, and outside there are none", () => {
    for (const row of ROWS) {
      expect(interferometricTeff(row, row.bluest)).toBeGreaterThan(8500);
      expect(interferometricTeff(row, row.reddest)).toBeLessThan(4000);
      for (const colour of [row.bluest - 0.001, row.reddest + 0.001, Number.NaN])
        expect(interferometricTeff(row, colour)).toBeNaN();
    }
  });

  test("redder is cooler, and the slopes are those of the rows", () => {
    for (const row of ROWS)
      for (const share of [0.2, 0.4, 0.6]) {
        const colour = row.bluest + share * (row.reddest - row.bluest);
        expect(interferometricTeffSlope(row, colour)).toBeLessThan(0);
        expect(interferometricTeffSlope(row, colour)).toBeCloseTo(
          slopeOf((x) => interferometricTeff(row, x), colour),
          2,
        );
      }
  });
});

describe("interferometric radii", () => {
  /** Computed from Boyajian et al. 2012, ApJ 757, 112. */
  test.each([
    [3500, 0.39256],
    [4000, 0.59777],
    [5000, 0.7608],
    [5500, 0.87998],
  ])("%d K gives %d", (teff, radius) => {
    expect(interferometricRadiusFromTeff(teff)).toBeCloseTo(radius, 5);
  });

  test("half a solar mass is 0.474 solar radii", () => {
    // Computed.
    expect(interferometricRadiusFromMass(0.5)).toBeCloseTo(0.0906 + 0.30315 + 0.08, 12);
  });

  test("outside 3200 to 5500 K and 0.13 to 0.90 solar masses there is none", () => {
    for (const teff of [3199, 5501, Number.NaN]) expect(interferometricRadiusFromTeff(teff)).toBeNaN();
    for (const mass of [0.129, 0.901, Number.NaN]) expect(interferometricRadiusFromMass(mass)).toBeNaN();
  });
});
