import { massFromSpectrum, SPECTRAL_ZERO_POINT } from "./sunlike.ts";

/** Constant, X, X², X³, (log g)², (log g)³ and [Fe/H] in log R: Torres et al. 2010, Table 4. */
export const SPECTRAL_RADIUS_COEFFICIENTS = [
  2.4427, 0.6679, 0.1771, 0.705, -0.21415, 0.02306, 0.04173,
] as const;

/** Scatter of {@link radiusFromSpectrum}, relative (0.014 dex). */
export const SPECTRAL_RADIUS_SCATTER = 0.032;

/**
 * Radius of a star like the Sun, R☉, from temperature, gravity and iron content: `log R = b₁ + b₂ X + b₃ X² + b₄ X³ + b₅ (log
 * g)² + b₆ (log g)³ + b₇ [Fe/H]`, X = log Teff − 4.1; scatter 0.014 dex (3.2 %).
 *
 * @param teffK K
 * @param logg dex of cm/s², 3.2 or more
 * @param feh [Fe/H]
 * @returns NaN where the mass of the same relations does not hold: 0.6 M☉ and below, and giants (log g below 3.2)
 * @see Torres, Andersen & Giménez 2010, A&A Rev. 18, 67, eq. 6 and Table 4
 * @example radiusFromSpectrum(5772, 4.438, 0) // 1.0168
 */
export const radiusFromSpectrum = (teffK: number, logg: number, feh: number): number => {
  if (Number.isNaN(massFromSpectrum(teffK, logg, feh))) return Number.NaN;
  const b = SPECTRAL_RADIUS_COEFFICIENTS;
  const x = Math.log10(teffK) - SPECTRAL_ZERO_POINT;
  const powers = b[0] + x * (b[1] + x * (b[2] + x * b[3]));
  return 10 ** (powers + logg * logg * (b[4] + b[5] * logg) + b[6] * feh);
};

/** d ln R / dTeff (per K), / dlog g and / d[Fe/H] (per dex) of {@link radiusFromSpectrum}. */
export const spectralRadiusTeffSlope = (teffK: number): number => {
  const b = SPECTRAL_RADIUS_COEFFICIENTS;
  const x = Math.log10(teffK) - SPECTRAL_ZERO_POINT;
  return (b[1] + x * (2 * b[2] + x * 3 * b[3])) / teffK;
};
export const spectralRadiusLoggSlope = (logg: number): number =>
  Math.LN10 * logg * (2 * SPECTRAL_RADIUS_COEFFICIENTS[4] + 3 * SPECTRAL_RADIUS_COEFFICIENTS[5] * logg);
export const SPECTRAL_RADIUS_FEH_SLOPE = Math.LN10 * SPECTRAL_RADIUS_COEFFICIENTS[6];
