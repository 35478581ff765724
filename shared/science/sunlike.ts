/** F, G and K stars: temperature from colour, bolometric correction, radius from light and temperature. */

/** Dwarf colours of the relation below: BP − RP. */
export const SUNLIKE_BP_RP = { bluest: 0.2, reddest: 2.0 } as const;
/** Brightest BP and RP with which the relation is used, mag: the photometry of brighter stars saturates. */
export const SUNLIKE_BRIGHTEST_MAG = 5;
/** Zero point of the scale, K (Casagrande et al. 2021), and scatter about the fit (30 to 80 K by colour, from memory). */
export const SUNLIKE_TEFF_SCATTER_K = Math.hypot(20, 60);

/**
 * Effective temperature from dereddened BP − RP, log g and [Fe/H], K; note X⁵ has no coefficient in this colour.
 *
 * @param bpRp BP − RP, mag, 0.20 to 2.00 (dwarfs, log g > 3.2)
 * @param logg log g, dex of cm/s², 3.2 to 5
 * @param feh [Fe/H], −4 to 0.6
 * @returns NaN outside
 * @see Casagrande et al. 2021, MNRAS 507, 2684; coefficients of the third release
 * @example sunlikeTeff(0.82, 4.44, 0) // 5761.6 to 0.1 K
 */
export const sunlikeTeff = (bpRp: number, logg: number, feh: number): number => {
  if (!(bpRp >= SUNLIKE_BP_RP.bluest && bpRp <= SUNLIKE_BP_RP.reddest)) return Number.NaN;
  if (!(logg > 3.2 && logg <= 5) || !(feh >= -4 && feh <= 0.6)) return Number.NaN;
  return (
    7980.8845 +
    bpRp * (-4138.3457 + bpRp * (1264.9366 - 130.4388 * bpRp)) +
    logg * (285.8393 + bpRp * (-324.2196 + bpRp * (106.8511 - 4.9825 * bpRp))) +
    feh * (4.5138 + bpRp * (-203.7774 + bpRp * (126.6981 - 14.7442 * bpRp))) +
    40.7376 * feh * logg * bpRp
  );
};

/** dTeff / d(BP − RP) of {@link sunlikeTeff}, K per mag. */
export const sunlikeTeffSlope = (bpRp: number, logg: number, feh: number): number =>
  -4138.3457 +
  bpRp * (2529.8732 - 391.3164 * bpRp) +
  logg * (-324.2196 + bpRp * (213.7022 - 14.9475 * bpRp)) +
  feh * (-203.7774 + bpRp * (253.3962 - 44.2326 * bpRp)) +
  40.7376 * feh * logg;

/** dTeff / dlog g and dTeff / d[Fe/H] of {@link sunlikeTeff}, K per dex. */
export const sunlikeTeffLoggSlope = (bpRp: number, feh: number): number =>
  285.8393 + bpRp * (-324.2196 + bpRp * (106.8511 - 4.9825 * bpRp)) + 40.7376 * feh * bpRp;
export const sunlikeTeffFehSlope = (bpRp: number, logg: number): number =>
  4.5138 + bpRp * (-203.7774 + bpRp * (126.6981 - 14.7442 * bpRp)) + 40.7376 * logg * bpRp;

/** Temperatures in which the correction to G holds, K. */
export const BC_G_TEFF_K = { coolest: 3300, hottest: 8000 } as const;

/**
 * Bolometric correction to G, mag: a quartic in `Teff − 5772`, one branch for 4000 to 8000 K and one for 3300 to 4000 K.
 *
 * @returns NaN outside 3300 to 8000 K
 * @see Andrae et al. 2018, A&A 616, A8, eq. 7 and Table 4
 * @example bolometricCorrectionG(5772) // 0.06
 */
export const bolometricCorrectionG = (teffK: number): number => {
  const t = teffK - 5772;
  if (!(teffK >= BC_G_TEFF_K.coolest && teffK <= BC_G_TEFF_K.hottest)) return Number.NaN;
  return teffK >= 4000
    ? 6.0e-2 + t * (6.731e-5 + t * (-6.647e-8 + t * (2.859e-11 - 7.197e-15 * t)))
    : 1.749 + t * (1.977e-3 + t * (3.737e-7 + t * (-8.966e-11 - 4.183e-14 * t)));
};

/** dBC_G / dTeff of {@link bolometricCorrectionG}, mag per K. */
export const bolometricCorrectionGSlope = (teffK: number): number => {
  const t = teffK - 5772;
  return teffK >= 4000
    ? 6.731e-5 + t * (-1.3294e-7 + t * (8.577e-11 - 2.8788e-14 * t))
    : 1.977e-3 + t * (7.474e-7 + t * (-2.6898e-10 - 1.6732e-13 * t));
};

/**
 * Least log g of the relation below. The paper speaks of the main sequence and stars mildly evolved; the number is a
 * judgement of this project, the border of dwarfs in the temperature relation above.
 */
export const SPECTRAL_MASS_LEAST_LOGG = 3.2;

/**
 * Mass of a star like the Sun, M☉, from temperature, gravity and iron content; scatter 0.027 dex (6.4 %). It gives the
 * Sun 1.049: a known feature of the relation.
 *
 * @param teffK K; @param logg dex of cm/s²; @param feh [Fe/H]
 * @returns NaN where the relation gives 0.6 M☉ or less, below its calibration, and for giants (log g below 3.2)
 * @see Torres, Andersen & Giménez 2010, A&A Rev. 18, 67, eq. 5 and Table 4
 */
export const massFromSpectrum = (teffK: number, logg: number, feh: number): number => {
  if (!(logg >= SPECTRAL_MASS_LEAST_LOGG)) return Number.NaN;
  const x = Math.log10(teffK) - 4.1;
  const g = logg;
  const log =
    1.5689 + x * (1.3787 + x * (0.4243 + x * 1.139)) + g * g * (-0.1425 + 0.01969 * g) + 0.101 * feh;
  const mass = 10 ** log;
  return mass > 0.6 ? mass : Number.NaN;
};

/** Scatter of {@link massFromSpectrum}, relative. */
export const SPECTRAL_MASS_SCATTER = 0.064;

/** d ln M / dTeff (per K), / dlog g and / d[Fe/H] (per dex) of {@link massFromSpectrum}. */
export const spectralMassTeffSlope = (teffK: number): number => {
  const x = Math.log10(teffK) - 4.1;
  return (1.3787 + x * (0.8486 + x * 3.417)) / teffK;
};
export const spectralMassLoggSlope = (logg: number): number => Math.LN10 * logg * (-0.285 + 0.05907 * logg);
export const SPECTRAL_MASS_FEH_SLOPE = Math.LN10 * 0.101;
