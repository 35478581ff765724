import { describe, expect, test } from "vitest";
import {
  radiusFromSpectrum,
  SPECTRAL_RADIUS_FEH_SLOPE,
  spectralRadiusLoggSlope,
  spectralRadiusTeffSlope,
} from "#shared/science/spectral-radius.ts";
import { slopeOf } from "./slope.ts";

describe("radius from Teff, log g and [Fe/H]", () => {
  /** Computed from Torres, Andersen & Giménez 2010, A&A Rev. 18, 67, Table 4. */
  test.each([
    [5772, 4.438, 0, 1.0168],
    [6065, 4.361, 0, 1.1641],
    [5040, 4.587, -0.03, 0.7575],
    [6550, 4.3, 0, 1.3339],
    [5290, 4.55, 0, 0.8268],
    [6000, 4.0, 0, 1.8708],
  ])("%d K, %d, %d gives %d", (teff, logg, feh, radius) => {
    expect(radiusFromSpectrum(teff, logg, feh)).toBeCloseTo(radius, 4);
  });

  test("HD 209458 falls within the published 1.16 to 1.20", () => {
    expect(radiusFromSpectrum(6065, 4.361, 0)).toBeGreaterThan(1.16);
    expect(radiusFromSpectrum(6065, 4.361, 0)).toBeLessThan(1.2);
  });

  test("where the mass does not hold, neither does the radius", () => {
    for (const [teff, logg] of [
      [3500, 4.8],
      [4500, 2.5],
      [Number.NaN, 4.4],
      [5800, Number.NaN],
    ] as const)
      expect(radiusFromSpectrum(teff, logg, 0)).toBeNaN();
    expect(radiusFromSpectrum(5800, 4.4, Number.NaN)).toBeNaN();
  });

  test("the slopes are those of its logarithm", () => {
    const log = (teff: number, logg: number, feh: number): number =>
      Math.log(radiusFromSpectrum(teff, logg, feh));
    const [t, g, m] = [5600, 4.4, 0.1];
    const wanted = [
      slopeOf((v) => log(v, g, m), t, 0.1),
      slopeOf((v) => log(t, v, m), g),
      slopeOf((v) => log(t, g, v), m),
    ] as const;
    expect(spectralRadiusTeffSlope(t)).toBeCloseTo(wanted[0], 8);
    expect(spectralRadiusLoggSlope(g)).toBeCloseTo(wanted[1], 6);
    expect(SPECTRAL_RADIUS_FEH_SLOPE).toBeCloseTo(wanted[2], 6);
  });
});
