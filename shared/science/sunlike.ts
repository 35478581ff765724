/** F, G and K stars: temperature from colour, bolometric correction, radius from light and temperature. */

/** Dwarf colours of the relation below: BP − RP. */
export const SUNLIKE_BP_RP = { bluest: 0.2, reddest: 2.0 } as const;
/** Zero point of the scale, K (Casagrande et al. 2021), and scatter about the fit (30 to 80 K by colour, from memory). */
export const SUNLIKE_TEFF_SCATTER_K = Math.hypot(20, 60);

/** The fifteen coefficients of the BP − RP row of Casagrande et al. 2021 in the order of {@link sunlikeTeff}. */
export const SUNLIKE_TEFF_COEFFICIENTS = [
  7980.8845, -4138.3457, 1264.9366, -130.4388, 0, 285.8393, -324.2196, 106.8511, -4.9825, 0, 4.5138,
  -203.7774, 126.6981, -14.7442, 40.7376,
] as const;

/**
 * Effective temperature from dereddened BP − RP, log g and [Fe/H], K: `a₀ + a₁ X + a₂ X² + a₃ X³ + a₄ X⁵ + log g (a₅ +
 * a₆ X + a₇ X² + a₈ X³ + a₉ X⁵) + [Fe/H] (a₁₀ + a₁₁ X + a₁₂ X² + a₁₃ X³) + a₁₄ log g [Fe/H] X`. In this colour X⁵ has no
 * coefficient.
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
  const a = SUNLIKE_TEFF_COEFFICIENTS;
  return (
    a[0] +
    bpRp * (a[1] + bpRp * (a[2] + a[3] * bpRp)) +
    logg * (a[5] + bpRp * (a[6] + bpRp * (a[7] + a[8] * bpRp))) +
    feh * (a[10] + bpRp * (a[11] + bpRp * (a[12] + a[13] * bpRp))) +
    a[14] * feh * logg * bpRp
  );
};

/** dTeff / d(BP − RP) of {@link sunlikeTeff}, K per mag. */
export const sunlikeTeffSlope = (bpRp: number, logg: number, feh: number): number => {
  const a = SUNLIKE_TEFF_COEFFICIENTS;
  return (
    a[1] +
    bpRp * (2 * a[2] + 3 * a[3] * bpRp) +
    logg * (a[6] + bpRp * (2 * a[7] + 3 * a[8] * bpRp)) +
    feh * (a[11] + bpRp * (2 * a[12] + 3 * a[13] * bpRp)) +
    a[14] * feh * logg
  );
};

/** dTeff / dlog g and dTeff / d[Fe/H] of {@link sunlikeTeff}, K per dex. */
export const sunlikeTeffLoggSlope = (bpRp: number, feh: number): number => {
  const a = SUNLIKE_TEFF_COEFFICIENTS;
  return a[5] + bpRp * (a[6] + bpRp * (a[7] + a[8] * bpRp)) + a[14] * feh * bpRp;
};
export const sunlikeTeffFehSlope = (bpRp: number, logg: number): number => {
  const a = SUNLIKE_TEFF_COEFFICIENTS;
  return a[10] + bpRp * (a[11] + bpRp * (a[12] + a[13] * bpRp)) + a[14] * logg * bpRp;
};

/** Temperatures in which the correction to G holds, K. */
export const BC_G_TEFF_K = { coolest: 3300, hottest: 8000 } as const;
/** Where its two branches meet, K: this temperature belongs to the hot one. */
export const BC_G_BRANCH_K = 4000;
/** Temperature from which the powers count, K. */
export const BC_G_ZERO_POINT_K = 5772;

type Quartic = readonly [number, number, number, number, number];

/** Powers of Teff − 5772 K, 0 to 4, in Table 4 of Andrae et al. 2018: 4000 to 8000 K and 3300 to 4000 K. */
export const BC_G_HOT_COEFFICIENTS: Quartic = [6.0e-2, 6.731e-5, -6.647e-8, 2.859e-11, -7.197e-15];
export const BC_G_COOL_COEFFICIENTS: Quartic = [1.749, 1.977e-3, 3.737e-7, -8.966e-11, -4.183e-14];

const branchOf = (teffK: number): Quartic =>
  teffK >= BC_G_BRANCH_K ? BC_G_HOT_COEFFICIENTS : BC_G_COOL_COEFFICIENTS;

/**
 * Bolometric correction to G, mag: a quartic in `Teff − 5772`, one branch for 4000 to 8000 K and one for 3300 to 4000 K.
 *
 * @returns NaN outside 3300 to 8000 K
 * @see Andrae et al. 2018, A&A 616, A8, eq. 7 and Table 4
 * @example bolometricCorrectionG(5772) // 0.06
 */
export const bolometricCorrectionG = (teffK: number): number => {
  if (!(teffK >= BC_G_TEFF_K.coolest && teffK <= BC_G_TEFF_K.hottest)) return Number.NaN;
  const c = branchOf(teffK);
  const t = teffK - BC_G_ZERO_POINT_K;
  return c[0] + t * (c[1] + t * (c[2] + t * (c[3] + c[4] * t)));
};

/** dBC_G / dTeff of {@link bolometricCorrectionG}, mag per K. */
export const bolometricCorrectionGSlope = (teffK: number): number => {
  const c = branchOf(teffK);
  const t = teffK - BC_G_ZERO_POINT_K;
  return c[1] + t * (2 * c[2] + t * (3 * c[3] + 4 * c[4] * t));
};

/**
 * Least log g of the relation below. The paper speaks of the main sequence and stars mildly evolved; the number is a
 * judgement of this project, the border of dwarfs in the temperature relation above.
 */
export const SPECTRAL_MASS_LEAST_LOGG = 3.2;
/** Least mass of the calibration stars, M☉. */
export const SPECTRAL_LEAST_MASS = 0.6;
/** log Teff from which the powers of the relation count. */
export const SPECTRAL_ZERO_POINT = 4.1;
/** Constant, X, X², X³, (log g)², (log g)³ and [Fe/H] in log M: Torres et al. 2010, Table 4. */
export const SPECTRAL_MASS_COEFFICIENTS = [1.5689, 1.3787, 0.4243, 1.139, -0.1425, 0.01969, 0.101] as const;

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
  const a = SPECTRAL_MASS_COEFFICIENTS;
  const x = Math.log10(teffK) - SPECTRAL_ZERO_POINT;
  const powers = a[0] + x * (a[1] + x * (a[2] + x * a[3]));
  const mass = 10 ** (powers + logg * logg * (a[4] + a[5] * logg) + a[6] * feh);
  return mass > SPECTRAL_LEAST_MASS ? mass : Number.NaN;
};

/** Scatter of {@link massFromSpectrum}, relative. */
export const SPECTRAL_MASS_SCATTER = 0.064;

/** d ln M / dTeff (per K), / dlog g and / d[Fe/H] (per dex) of {@link massFromSpectrum}. */
export const spectralMassTeffSlope = (teffK: number): number => {
  const a = SPECTRAL_MASS_COEFFICIENTS;
  const x = Math.log10(teffK) - SPECTRAL_ZERO_POINT;
  return (a[1] + x * (2 * a[2] + x * 3 * a[3])) / teffK;
};
export const spectralMassLoggSlope = (logg: number): number =>
  Math.LN10 * logg * (2 * SPECTRAL_MASS_COEFFICIENTS[4] + 3 * SPECTRAL_MASS_COEFFICIENTS[5] * logg);
export const SPECTRAL_MASS_FEH_SLOPE = Math.LN10 * SPECTRAL_MASS_COEFFICIENTS[6];
