/**
 * Radii of cool dwarfs where the relation from M_Ks does not serve: from temperature alone, a last resort as it is steep,
 * and for subdwarfs.
 */
import { RADIUS_FEH } from "./cool-dwarfs.ts";

/** Temperatures in which the radius from temperature holds, K. */
export const TEFF_RADIUS_K = { coolest: 2700, hottest: 4100 } as const;
/** Powers of Teff / 3500 K, 0 to 3, without and with the [Fe/H] term, which multiplies. */
export const TEFF_RADIUS_COEFFICIENTS = [10.544, -33.7546, 35.1909, -11.5928] as const;
export const TEFF_RADIUS_FEH_COEFFICIENTS = [16.77, -54.321, 57.6627, -19.6994] as const;
export const TEFF_RADIUS_FEH_TERM = 0.4565;
/** Scatter of both, relative. */
export const TEFF_RADIUS_SCATTER = 0.134;
export const TEFF_RADIUS_FEH_SCATTER = 0.093;

type Cubic = readonly [number, number, number, number];

const cubic = (c: Cubic, x: number): number => c[0] + x * (c[1] + x * (c[2] + x * c[3]));
const slopeOfCubic = (c: Cubic, x: number): number => c[1] + x * (2 * c[2] + x * 3 * c[3]);

const UNIT_K = 3500;
const isInside = (teffK: number): boolean => teffK >= TEFF_RADIUS_K.coolest && teffK <= TEFF_RADIUS_K.hottest;

/**
 * Radius from temperature, R☉: `10.5440 − 33.7546 T + 35.1909 T² − 11.5928 T³`, T = Teff / 3500 K; scatter 13.4 %.
 *
 * @param teffK 2700 to 4100 K
 * @returns NaN outside
 * @see Mann et al. 2015, ApJ 804, 64, Table 1, with the erratum 2016, ApJ 819, 87
 */
export const radiusFromTeff = (teffK: number): number =>
  isInside(teffK) ? cubic(TEFF_RADIUS_COEFFICIENTS, teffK / UNIT_K) : Number.NaN;

/** dR / dTeff of {@link radiusFromTeff}, R☉ per K. */
export const teffRadiusSlope = (teffK: number): number =>
  slopeOfCubic(TEFF_RADIUS_COEFFICIENTS, teffK / UNIT_K) / UNIT_K;

/**
 * Radius from temperature and iron content, R☉: `(16.7700 − 54.3210 T + 57.6627 T² − 19.6994 T³)(1 + 0.4565 [Fe/H])`; scatter
 * 9.3 %.
 *
 * @param teffK 2700 to 4100 K
 * @param feh [Fe/H], −0.6 to 0.5
 * @returns NaN outside
 * @see Mann et al. 2015, ApJ 804, 64, Table 1, with the erratum 2016, ApJ 819, 87
 */
export const radiusFromTeffFeh = (teffK: number, feh: number): number =>
  isInside(teffK) && feh >= RADIUS_FEH.least && feh <= RADIUS_FEH.most
    ? cubic(TEFF_RADIUS_FEH_COEFFICIENTS, teffK / UNIT_K) * (1 + TEFF_RADIUS_FEH_TERM * feh)
    : Number.NaN;

/** dR / dTeff of {@link radiusFromTeffFeh}, R☉ per K. */
export const teffRadiusFehSlope = (teffK: number, feh: number): number =>
  (slopeOfCubic(TEFF_RADIUS_FEH_COEFFICIENTS, teffK / UNIT_K) / UNIT_K) * (1 + TEFF_RADIUS_FEH_TERM * feh);

/** M_Ks and [Fe/H] of the relation for subdwarfs, and its scatter, relative. */
export const SUBDWARF_ABS_KS = { brightest: 4, faintest: 11 } as const;
export const SUBDWARF_FEH = { least: -2, most: 0.5 } as const;
export const SUBDWARF_RADIUS_SCATTER = 0.06;
/** Powers of M_Ks, 0 to 2, and the [Fe/H] term, which multiplies. */
export const SUBDWARF_RADIUS_COEFFICIENTS = [1.875, -0.337, 0.0161] as const;
export const SUBDWARF_RADIUS_FEH_TERM = 0.079;

/**
 * Radius of dwarfs and subdwarfs, R☉: `(1.875 − 0.337 M + 0.0161 M²)(1 + 0.079 [Fe/H])`; scatter 6 %.
 *
 * @param absKs absolute Ks (Vega), 4 to 11; the parabola turns at 10.466, and beyond that gives none either
 * @param feh [Fe/H], −2 to 0.5
 * @returns NaN outside
 * @see Kesseli et al. 2019, AJ 157, 63, eq. 7 (found in one public source)
 */
export const radiusOfSubdwarf = (absKs: number, feh: number): number => {
  const c = SUBDWARF_RADIUS_COEFFICIENTS;
  const isHeld =
    absKs >= SUBDWARF_ABS_KS.brightest &&
    absKs <= SUBDWARF_ABS_KS.faintest &&
    subdwarfRadiusSlope(absKs, 0) <= 0 &&
    feh >= SUBDWARF_FEH.least &&
    feh <= SUBDWARF_FEH.most;
  return isHeld ? (c[0] + absKs * (c[1] + absKs * c[2])) * (1 + SUBDWARF_RADIUS_FEH_TERM * feh) : Number.NaN;
};

/** dR / dM_Ks of {@link radiusOfSubdwarf}, R☉ per mag. */
export const subdwarfRadiusSlope = (absKs: number, feh: number): number =>
  (SUBDWARF_RADIUS_COEFFICIENTS[1] + 2 * SUBDWARF_RADIUS_COEFFICIENTS[2] * absKs) *
  (1 + SUBDWARF_RADIUS_FEH_TERM * feh);
