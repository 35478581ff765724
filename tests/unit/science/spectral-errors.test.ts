import { describe, expect, test } from "vitest";
import {
  SPECTRAL_MASS_COEFFICIENT_ERRORS,
  SPECTRAL_RADIUS_COEFFICIENT_ERRORS,
  spectralMassError,
  spectralRadiusError,
} from "#shared/science/spectral-errors.ts";
import { radiusFromSpectrum, SPECTRAL_RADIUS_COEFFICIENTS } from "#shared/science/spectral-radius.ts";
import { massFromSpectrum, SPECTRAL_MASS_COEFFICIENTS } from "#shared/science/sunlike.ts";
import { normalDeviates, spreadOf } from "./random.ts";

describe("errors of mass and radius from spectra", () => {
  const [teff, teffError, logg, loggError, feh, fehError] = [5800, 60, 4.4, 0.08, 0.05, 0.1];

  test.each([
    ["mass", massFromSpectrum, spectralMassError, 0.064],
    ["radius", radiusFromSpectrum, spectralRadiusError, 0.032],
  ] as const)("drawing agrees: %s", (_, relation, errorOf, scatter) => {
    const normal = normalDeviates(11);
    const { mean, deviation } = spreadOf(
      100_000,
      () =>
        relation(teff + teffError * normal(), logg + loggError * normal(), feh + fehError * normal()) *
        (1 + scatter * normal()),
    );
    const linear = errorOf(teff, teffError, logg, loggError, fehError);
    expect(Math.abs(linear / (deviation / mean) - 1)).toBeLessThan(0.02);
  });

  test("without errors of the star the scatter remains: 6.4 % and 3.2 %", () => {
    expect(spectralMassError(teff, 0, logg, 0, 0)).toBe(0.064);
    expect(spectralRadiusError(teff, 0, logg, 0, 0)).toBe(0.032);
  });

  test("every coefficient has its error, and is well determined by it", () => {
    for (const [coefficients, errors] of [
      [SPECTRAL_MASS_COEFFICIENTS, SPECTRAL_MASS_COEFFICIENT_ERRORS],
      [SPECTRAL_RADIUS_COEFFICIENTS, SPECTRAL_RADIUS_COEFFICIENT_ERRORS],
    ] as const) {
      expect(errors).toHaveLength(coefficients.length);
      for (const [i, error] of errors.entries())
        expect(Math.abs(coefficients[i] as number)).toBeGreaterThan(3 * error);
    }
  });
});
