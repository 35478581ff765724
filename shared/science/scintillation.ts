/**
 * Scintillation: the flicker that the air lends to a star. Both laws overestimate below apertures of about 0.1 m. It falls
 * with the root of the exposure, as photon noise does.
 */

export type ScintillationLaw = "young" | "osborn";

/** Height over which turbulence falls off, m. */
const SCALE_HEIGHT_M = 8000;

/**
 * Scintillation of one exposure as a fraction: `0.09 D^(−2/3) X^1.75 exp(−h/8000 m) (2 t)^(−1/2)`, D in cm, t in s. The
 * exponent 1.75 lies between 1.5 across the wind and 2 along it. At good sites it underestimates (Kornilov et al. 2012, A&A
 * 546, A41).
 *
 * @see Young 1967, AJ 72, 747; Dravins et al. 1998, PASP 110, 610, eq. 10
 * @example 1e6 * youngScintillation(0.5, 1, 0, 60) // 605.35 ppm
 */
export const youngScintillation = (
  apertureM: number,
  airmass: number,
  altitudeM: number,
  exposureS: number,
): number =>
  (0.09 * (100 * apertureM) ** (-2 / 3) * airmass ** 1.75 * Math.exp(-altitudeM / SCALE_HEIGHT_M)) /
  Math.sqrt(2 * exposureS);

/** Customary site coefficient C_Y of {@link osbornScintillation}; medians of sites lie between 1.30 and 1.67. */
export const OSBORN_COEFFICIENT = 1.5;

/**
 * Scintillation of one exposure as a fraction, by the median profiles of sites:
 * `√(10⁻⁵ C_Y² D^(−4/3) t^(−1) X³ exp(−2h/8000 m))`, D in m, t in s.
 *
 * @see Osborn et al. 2015, MNRAS 452, 1707, eq. 7; the airmass exponent is 1.5 here, not Young's 1.75
 * @example 1e6 * osbornScintillation(0.5, 1.5, 2400, 60) // 1322.97 ppm
 */
export const osbornScintillation = (
  apertureM: number,
  airmass: number,
  altitudeM: number,
  exposureS: number,
  coefficient: number = OSBORN_COEFFICIENT,
): number =>
  (Math.sqrt(1e-5) *
    coefficient *
    apertureM ** (-2 / 3) *
    airmass ** 1.5 *
    Math.exp(-altitudeM / SCALE_HEIGHT_M)) /
  Math.sqrt(exposureS);

/**
 * Factor by which photon noise and scintillation of a differential light curve exceed those of the star alone, with n equal
 * comparison stars outside the isoplanatic patch: `√(1 + 1/n)`.
 *
 * @returns NaN for n that is not above 0
 */
export const comparisonFactor = (comparisonStars: number): number =>
  comparisonStars > 0 ? Math.sqrt(1 + 1 / comparisonStars) : Number.NaN;
