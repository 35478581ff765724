/**
 * Habitable zone by received light: `S = S₀ + a t + b t² + c t³ + d t⁴`, t = Teff − 5780 K, `d = √(L / S)`.
 *
 * Kopparapu et al. 2014, ApJ 787, L29, eq. 4 and 5, Table 1, for a planet of one Earth mass. Valid 2600 to 7200 K; the
 * reference temperature is 5780 K, not the nominal 5772 K.
 */

export const HABITABLE_ZONE_TEFF_K = { coolest: 2600, hottest: 7200 } as const;

export type HabitableLimit = "recent-venus" | "runaway-greenhouse" | "maximum-greenhouse" | "early-mars";

type Coefficients = readonly [number, number, number, number, number];

/** Temperature from which the powers count, K: not the nominal 5772 K. */
export const HABITABLE_ZONE_ZERO_POINT_K = 5780;

/** S₀, a, b, c and d of each limit. */
export const HABITABLE_ZONE_COEFFICIENTS: Readonly<Record<HabitableLimit, Coefficients>> = {
  "recent-venus": [1.776, 2.136e-4, 2.533e-8, -1.332e-11, -3.097e-15],
  "runaway-greenhouse": [1.107, 1.332e-4, 1.58e-8, -8.308e-12, -1.931e-15],
  "maximum-greenhouse": [0.356, 6.171e-5, 1.698e-9, -3.198e-12, -5.575e-16],
  "early-mars": [0.32, 5.547e-5, 1.526e-9, -2.874e-12, -5.011e-16],
};

/**
 * Light at a limit of the habitable zone, in units of what Earth receives.
 *
 * @returns NaN outside 2600 to 7200 K
 * @example insolationAtLimit("runaway-greenhouse", 5780) // 1.107
 */
export const insolationAtLimit = (limit: HabitableLimit, teffK: number): number => {
  if (!(teffK >= HABITABLE_ZONE_TEFF_K.coolest && teffK <= HABITABLE_ZONE_TEFF_K.hottest)) return Number.NaN;
  const c = HABITABLE_ZONE_COEFFICIENTS[limit];
  const t = teffK - HABITABLE_ZONE_ZERO_POINT_K;
  return c[0] + t * (c[1] + t * (c[2] + t * (c[3] + t * c[4])));
};

/** dS/dTeff of {@link insolationAtLimit}, per K. */
export const insolationSlope = (limit: HabitableLimit, teffK: number): number => {
  const c = HABITABLE_ZONE_COEFFICIENTS[limit];
  const t = teffK - HABITABLE_ZONE_ZERO_POINT_K;
  return c[1] + t * (2 * c[2] + t * (3 * c[3] + t * 4 * c[4]));
};

/** Distance at which the star gives that insolation, au: `√(L / S)`. */
export const distanceAtInsolation = (luminositySolar: number, insolationEarth: number): number =>
  Math.sqrt(luminositySolar / insolationEarth);
