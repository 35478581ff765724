/** Errors of mass and radius from temperature, gravity and iron content: Torres, Andersen & Giménez 2010, A&A Rev. 18, 67. */
import {
  SPECTRAL_RADIUS_FEH_SLOPE,
  SPECTRAL_RADIUS_SCATTER,
  spectralRadiusLoggSlope,
  spectralRadiusTeffSlope,
} from "./spectral-radius.ts";
import {
  SPECTRAL_MASS_FEH_SLOPE,
  SPECTRAL_MASS_SCATTER,
  spectralMassLoggSlope,
  spectralMassTeffSlope,
} from "./sunlike.ts";

/**
 * Errors of the coefficients, in their order (Table 4; from memory). The coefficients are correlated, so that these do not add
 * up to the error of a mass or radius: the scatter stands for them.
 */
export const SPECTRAL_MASS_COEFFICIENT_ERRORS = [0.058, 0.029, 0.029, 0.24, 0.011, 0.0019, 0.014] as const;
export const SPECTRAL_RADIUS_COEFFICIENT_ERRORS = [
  0.038, 0.016, 0.027, 0.13, 0.0075, 0.0013, 0.0082,
] as const;

/**
 * Relative error of the mass: what temperature, gravity and iron content bring, and the scatter of 6.4 %, in quadrature. An error
 * of 0.1 dex in log g alone is 26 % of a mass made from log g and radius, but 2.5 % of this one.
 */
export const spectralMassError = (
  teffK: number,
  teffError: number,
  logg: number,
  loggError: number,
  fehError: number,
): number =>
  Math.sqrt(
    (spectralMassTeffSlope(teffK) * teffError) ** 2 +
      (spectralMassLoggSlope(logg) * loggError) ** 2 +
      (SPECTRAL_MASS_FEH_SLOPE * fehError) ** 2 +
      SPECTRAL_MASS_SCATTER ** 2,
  );

/** Relative error of the radius, in the same way with the scatter of 3.2 %. */
export const spectralRadiusError = (
  teffK: number,
  teffError: number,
  logg: number,
  loggError: number,
  fehError: number,
): number =>
  Math.sqrt(
    (spectralRadiusTeffSlope(teffK) * teffError) ** 2 +
      (spectralRadiusLoggSlope(logg) * loggError) ** 2 +
      (SPECTRAL_RADIUS_FEH_SLOPE * fehError) ** 2 +
      SPECTRAL_RADIUS_SCATTER ** 2,
  );
