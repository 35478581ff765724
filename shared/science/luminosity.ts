import {
  PARSEC_M,
  SOLAR_LOGG,
  SOLAR_LUMINOSITY_W,
  SOLAR_MBOL,
  SOLAR_TEFF_K,
  ZERO_FLUX,
} from "./constants.ts";

/** Luminosity from radius and temperature, L☉: `R² (T / 5772 K)⁴` (Stefan–Boltzmann in solar units). */
export const luminosityFromRadius = (radiusSolar: number, teffK: number): number =>
  radiusSolar * radiusSolar * (teffK / SOLAR_TEFF_K) ** 4;

/** Radius from luminosity and temperature, R☉: `√L (5772 K / T)²`. */
export const radiusFromLuminosity = (luminositySolar: number, teffK: number): number =>
  Math.sqrt(luminositySolar) * (SOLAR_TEFF_K / teffK) ** 2;

/** Luminosity from an absolute magnitude and its bolometric correction, L☉: `10^(0.4 (4.74 − M − BC))` (IAU 2015 B2). */
export const luminosityFromMagnitude = (absoluteMag: number, bolometricCorrection: number): number =>
  10 ** (0.4 * (SOLAR_MBOL - absoluteMag - bolometricCorrection));

/**
 * Luminosity from the bolometric flux at Earth, L☉: `4 π d² F / L☉`.
 *
 * @param flux W m⁻²
 * @param distancePc pc
 */
export const luminosityFromFlux = (flux: number, distancePc: number): number =>
  (4 * Math.PI * (distancePc * PARSEC_M) ** 2 * flux) / SOLAR_LUMINOSITY_W;

/** Apparent bolometric magnitude from the flux at Earth in W m⁻²: `−2.5 log(F / 2.518021002e-8)` (IAU 2015 B2). */
export const bolometricMagnitude = (flux: number): number => -2.5 * Math.log10(flux / ZERO_FLUX);

/** Mean density relative to the Sun: `M / R³`. */
export const densityFromMassRadius = (massSolar: number, radiusSolar: number): number =>
  massSolar / radiusSolar ** 3;

/** Surface gravity, log of cm s⁻²: `4.438068 + log M − 2 log R`, solar units. */
export const loggFromMassRadius = (massSolar: number, radiusSolar: number): number =>
  SOLAR_LOGG + Math.log10(massSolar / (radiusSolar * radiusSolar));
