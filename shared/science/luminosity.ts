import { SOLAR_MBOL, SOLAR_TEFF_K } from "./constants.ts";

/** Luminosity from radius and temperature, L☉: `R² (T / 5772 K)⁴` (Stefan–Boltzmann in solar units). */
export const luminosityFromRadius = (radiusSolar: number, teffK: number): number =>
  radiusSolar * radiusSolar * (teffK / SOLAR_TEFF_K) ** 4;

/** Radius from luminosity and temperature, R☉: `√L (5772 K / T)²`. */
export const radiusFromLuminosity = (luminositySolar: number, teffK: number): number =>
  Math.sqrt(luminositySolar) * (SOLAR_TEFF_K / teffK) ** 2;

/** Luminosity from an absolute magnitude and its bolometric correction, L☉: `10^(0.4 (4.74 − M − BC))` (IAU 2015 B2). */
export const luminosityFromMagnitude = (absoluteMag: number, bolometricCorrection: number): number =>
  10 ** (0.4 * (SOLAR_MBOL - absoluteMag - bolometricCorrection));

/** Mean density relative to the Sun: `M / R³`. */
export const densityFromMassRadius = (massSolar: number, radiusSolar: number): number =>
  massSolar / radiusSolar ** 3;
