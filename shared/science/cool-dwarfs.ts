/**
 * Cool dwarfs (M and late K): radius and mass from the absolute Ks magnitude, temperature from colour. Single
 * main-sequence stars only.
 */

/** Range of M_Ks in which both relations are used. Radius holds for 4.6 to 9.8 (Mann et al. 2015). */
export const COOL_DWARF_ABS_KS = { brightest: 4.6, faintest: 9.8 } as const;
/** [Fe/H] of the calibration stars; the metallicity terms hold inside (radius: Mann et al. 2015; mass: Mann et al. 2019). */
export const RADIUS_FEH = { least: -0.6, most: 0.5 } as const;
export const MASS_FEH = { least: -0.6, most: 0.4 } as const;
/** Scatter of eq. 4 and eq. 5 of Mann et al. 2015, relative. */
export const RADIUS_SCATTER = 0.0289;
export const RADIUS_FEH_SCATTER = 0.027;

/** Powers of M_Ks, 0 to 2, in eq. 4 of Mann et al. 2015. */
export const RADIUS_COEFFICIENTS = [1.9515, -0.352, 0.0168] as const;
/** The same in eq. 5, and its term of [Fe/H], which multiplies. */
export const RADIUS_FEH_COEFFICIENTS = [1.9305, -0.3466, 0.01647] as const;
export const RADIUS_FEH_TERM = 0.04458;
/** M_Ks from which the mass polynomials count. */
export const MASS_ZERO_POINT = 7.5;
/** Powers of M_Ks − 7.5, 0 to 5, in eq. 4 of Mann et al. 2019. */
export const MASS_COEFFICIENTS = [-0.642, -0.208, -8.43e-4, 7.87e-3, 1.42e-4, -2.13e-4] as const;
/** The same in eq. 5, and its term of [Fe/H], which multiplies. */
export const MASS_FEH_COEFFICIENTS = [-0.647, -0.207, -6.53e-4, 7.13e-3, 1.84e-4, -1.6e-4] as const;
export const MASS_FEH_TERM = -0.0035;

const isInRange = (absKs: number): boolean =>
  absKs >= COOL_DWARF_ABS_KS.brightest && absKs <= COOL_DWARF_ABS_KS.faintest;

type Parabola = readonly [number, number, number];

const parabola = (c: Parabola, x: number): number => c[0] + c[1] * x + c[2] * x * x;
const slopeOfParabola = (c: Parabola, x: number): number => c[1] + 2 * c[2] * x;

/**
 * Radius, R☉: `1.9515 − 0.3520 M + 0.01680 M²`; scatter 2.89 %.
 *
 * @param absKs absolute Ks (Vega), 4.6 to 9.8
 * @returns NaN outside; the parabola turns at M_Ks 10.476 and is never carried on
 * @see Mann et al. 2015, ApJ 804, 64, Table 1, eq. 4, with the erratum 2016, ApJ 819, 87
 * @example radiusFromAbsKs(7.5) // 0.2565
 */
export const radiusFromAbsKs = (absKs: number): number =>
  isInRange(absKs) ? parabola(RADIUS_COEFFICIENTS, absKs) : Number.NaN;

/** dR/dM_Ks of {@link radiusFromAbsKs}, R☉ per mag. */
export const radiusSlope = (absKs: number): number => slopeOfParabola(RADIUS_COEFFICIENTS, absKs);

/**
 * Radius with the metallicity term, R☉: `(1.9305 − 0.3466 M + 0.01647 M²)(1 + 0.04458 [Fe/H])`; scatter 2.70 %. The
 * term multiplies.
 *
 * @param absKs absolute Ks (Vega), 4.6 to 9.8
 * @param feh [Fe/H], −0.6 to 0.5
 * @see Mann et al. 2015, ApJ 804, 64, Table 1, eq. 5, with the erratum 2016, ApJ 819, 87
 */
export const radiusFromAbsKsFeh = (absKs: number, feh: number): number =>
  isInRange(absKs) && feh >= RADIUS_FEH.least && feh <= RADIUS_FEH.most
    ? parabola(RADIUS_FEH_COEFFICIENTS, absKs) * (1 + RADIUS_FEH_TERM * feh)
    : Number.NaN;

/** dR/dM_Ks of {@link radiusFromAbsKsFeh}, R☉ per mag. */
export const radiusFehSlope = (absKs: number, feh: number): number =>
  slopeOfParabola(RADIUS_FEH_COEFFICIENTS, absKs) * (1 + RADIUS_FEH_TERM * feh);

type Quintic = readonly [number, number, number, number, number, number];

/** The quintic of Mann et al. 2019 in x = M_Ks − 7.5, by Horner. */
const quintic = (c: Quintic, x: number): number =>
  c[0] + x * (c[1] + x * (c[2] + x * (c[3] + x * (c[4] + x * c[5]))));

const slopeOfQuintic = (c: Quintic, x: number): number =>
  c[1] + x * (2 * c[2] + x * (3 * c[3] + x * (4 * c[4] + x * 5 * c[5])));

/** M_Ks for which the mass relations are published; the radius relations hold in a part of it. */
export const MASS_ABS_KS = { brightest: 4, faintest: 11 } as const;

/**
 * Mass over the whole range of the paper, M☉: `log M = −0.642 − 0.208 x − 8.43e−4 x² + 7.87e−3 x³ + 1.42e−4 x⁴ − 2.13e−4
 * x⁵`, x = M_Ks − 7.5; scatter 2.0 %, more towards the ends.
 *
 * @param absKs absolute Ks (Vega), 4 to 11
 * @returns NaN outside
 * @see Mann et al. 2019, ApJ 871, 63, eq. 4 and Table 6
 * @example massOverWholeRange(11) // 0.073542
 */
export const massOverWholeRange = (absKs: number): number =>
  absKs >= MASS_ABS_KS.brightest && absKs <= MASS_ABS_KS.faintest
    ? 10 ** quintic(MASS_COEFFICIENTS, absKs - MASS_ZERO_POINT)
    : Number.NaN;

/**
 * The same with the metallicity term, M☉, for [Fe/H] −0.6 to 0.4; scatter 2.1 %.
 *
 * @see Mann et al. 2019, ApJ 871, 63, eq. 5 and Table 6
 */
export const massFehOverWholeRange = (absKs: number, feh: number): number =>
  absKs >= MASS_ABS_KS.brightest &&
  absKs <= MASS_ABS_KS.faintest &&
  feh >= MASS_FEH.least &&
  feh <= MASS_FEH.most
    ? (1 + MASS_FEH_TERM * feh) * 10 ** quintic(MASS_FEH_COEFFICIENTS, absKs - MASS_ZERO_POINT)
    : Number.NaN;

/**
 * Mass, M☉: `log M = −0.642 − 0.208 x − 8.43e−4 x² + 7.87e−3 x³ + 1.42e−4 x⁴ − 2.13e−4 x⁵`, x = M_Ks − 7.5; scatter 2.0 %.
 * Published for 4 < M_Ks < 11; used here where the radius holds too, 4.6 to 9.8.
 *
 * @see Mann et al. 2019, ApJ 871, 63, eq. 4 and Table 6
 * @example massFromAbsKs(7.5) // 0.22803420720004194
 */
export const massFromAbsKs = (absKs: number): number =>
  isInRange(absKs) ? 10 ** quintic(MASS_COEFFICIENTS, absKs - MASS_ZERO_POINT) : Number.NaN;

/** d ln M / dM_Ks of {@link massFromAbsKs}, per mag. */
export const logMassSlope = (absKs: number): number =>
  Math.LN10 * slopeOfQuintic(MASS_COEFFICIENTS, absKs - MASS_ZERO_POINT);

/**
 * Mass with the metallicity term, M☉, for [Fe/H] −0.6 to 0.4: `(1 − 0.0035 [Fe/H]) 10^(−0.647 − 0.207 x − 6.53e−4 x² +
 * 7.13e−3 x³ + 1.84e−4 x⁴ − 1.60e−4 x⁵)`; scatter 2.1 %.
 *
 * @see Mann et al. 2019, ApJ 871, 63, eq. 5 and Table 6
 */
export const massFromAbsKsFeh = (absKs: number, feh: number): number =>
  isInRange(absKs) && feh >= MASS_FEH.least && feh <= MASS_FEH.most
    ? (1 + MASS_FEH_TERM * feh) * 10 ** quintic(MASS_FEH_COEFFICIENTS, absKs - MASS_ZERO_POINT)
    : Number.NaN;

/** d ln M / dM_Ks of {@link massFromAbsKsFeh}, per mag. */
export const logMassFehSlope = (absKs: number): number =>
  Math.LN10 * slopeOfQuintic(MASS_FEH_COEFFICIENTS, absKs - MASS_ZERO_POINT);

/** BP − RP of the calibration stars of the temperature relation, and its temperatures. */
export const COOL_DWARF_BP_RP = { bluest: 1.9, reddest: 4.75 } as const;
/** Temperatures in which the colours of cool dwarfs tell one, K. */
export const COOL_DWARF_TEFF_K = { coolest: 2700, hottest: 4100 } as const;
/** The unit of the temperature relations, K. */
export const COOL_DWARF_TEFF_UNIT_K = 3500;
/** Powers of BP − RP, 0 to 4, in the first row of Table 2 of Mann et al. 2015. */
export const COOL_DWARF_TEFF_COEFFICIENTS = [3.245, -2.4309, 1.043, -0.2127, 0.01649] as const;
/** Scatter of the fit (52 K) and zero point of the spectroscopic scale (60 K) in quadrature. */
export const COOL_DWARF_TEFF_SCATTER_K = Math.hypot(52, 60);

/**
 * Effective temperature from BP − RP, K: `3500 (3.245 − 2.4309 X + 1.043 X² − 0.2127 X³ + 0.01649 X⁴)`; scatter 52 K,
 * zero point 60 K.
 *
 * @param bpRp BP − RP, mag, 1.90 to 4.75
 * @returns NaN outside the colours and outside 2700 to 4100 K, where the quartic turns up again
 * @see Mann et al. 2015, ApJ 804, 64, Table 2, with the erratum 2016, ApJ 819, 87
 */
export const coolDwarfTeff = (bpRp: number): number => {
  if (!(bpRp >= COOL_DWARF_BP_RP.bluest && bpRp <= COOL_DWARF_BP_RP.reddest)) return Number.NaN;
  const c = COOL_DWARF_TEFF_COEFFICIENTS;
  const teff = COOL_DWARF_TEFF_UNIT_K * (c[0] + bpRp * (c[1] + bpRp * (c[2] + bpRp * (c[3] + bpRp * c[4]))));
  return teff >= COOL_DWARF_TEFF_K.coolest && teff <= COOL_DWARF_TEFF_K.hottest ? teff : Number.NaN;
};

/** dTeff / d(BP − RP) of {@link coolDwarfTeff}, K per mag. */
export const coolDwarfTeffSlope = (bpRp: number): number => {
  const c = COOL_DWARF_TEFF_COEFFICIENTS;
  return COOL_DWARF_TEFF_UNIT_K * (c[1] + bpRp * (2 * c[2] + bpRp * (3 * c[3] + bpRp * 4 * c[4])));
};

/** Powers of BP − RP, 0 to 2, in the bolometric correction to Ks. */
export const BC_KS_COEFFICIENTS = [1.81625213, 0.40853528, -0.03546636] as const;

/**
 * Bolometric correction to Ks from BP − RP, mag: `1.81625213 + 0.40853528 X − 0.03546636 X²`; rms 0.040 mag.
 *
 * @param bpRp 1.90 to 4.75
 * @see a fit of this project to the 50 stars published with Mann et al. 2015 (F_bol, Ks, colours); not a relation of
 *   that paper
 */
export const bolometricCorrectionKs = (bpRp: number): number =>
  bpRp >= COOL_DWARF_BP_RP.bluest && bpRp <= COOL_DWARF_BP_RP.reddest
    ? parabola(BC_KS_COEFFICIENTS, bpRp)
    : Number.NaN;

/** dBC_Ks / d(BP − RP) of {@link bolometricCorrectionKs}. */
export const bolometricCorrectionKsSlope = (bpRp: number): number =>
  slopeOfParabola(BC_KS_COEFFICIENTS, bpRp);

/** Scatter of {@link bolometricCorrectionKs}, mag. */
export const BC_KS_SCATTER = 0.04;
