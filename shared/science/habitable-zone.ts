/**
 * Habitable zone by received light: `S = S₀ + a t + b t² + c t³ + d t⁴`, t = Teff − 5780 K, `d = √(L / S)`.
 *
 * Kopparapu et al. 2014, ApJ 787, L29, eq. 4 and 5, Table 1, for a planet of one Earth mass unless the limit names another.
 * Valid 2600 to 7200 K; the reference temperature is 5780 K, not the nominal 5772 K. The limits of 2013 (ApJ 765, 131, Table
 * 3, with the erratum ApJ 770, 82) stand beside them for the moist greenhouse and to follow older papers; its row of early
 * Mars is left out, because its last two coefficients look like a slip of columns.
 */

export const HABITABLE_ZONE_TEFF_K = { coolest: 2600, hottest: 7200 } as const;

export type HabitableLimit =
  | "recent-venus"
  | "runaway-greenhouse"
  | "runaway-greenhouse-5-earths"
  | "runaway-greenhouse-0.1-earths"
  | "maximum-greenhouse"
  | "early-mars";

/** Limits of the model of 2013. */
export type EarlierHabitableLimit =
  | "recent-venus"
  | "runaway-greenhouse"
  | "moist-greenhouse"
  | "maximum-greenhouse";

type Coefficients = readonly [number, number, number, number, number];

/** Temperature from which the powers count, K: not the nominal 5772 K. */
export const HABITABLE_ZONE_ZERO_POINT_K = 5780;

/** S₀, a, b, c and d of each limit. */
export const HABITABLE_ZONE_COEFFICIENTS: Readonly<Record<HabitableLimit, Coefficients>> = {
  "recent-venus": [1.776, 2.136e-4, 2.533e-8, -1.332e-11, -3.097e-15],
  "runaway-greenhouse": [1.107, 1.332e-4, 1.58e-8, -8.308e-12, -1.931e-15],
  "runaway-greenhouse-5-earths": [1.188, 1.433e-4, 1.707e-8, -8.968e-12, -2.084e-15],
  "runaway-greenhouse-0.1-earths": [0.99, 1.209e-4, 1.404e-8, -7.418e-12, -1.713e-15],
  "maximum-greenhouse": [0.356, 6.171e-5, 1.698e-9, -3.198e-12, -5.575e-16],
  "early-mars": [0.32, 5.547e-5, 1.526e-9, -2.874e-12, -5.011e-16],
};

/** The same of the model of 2013, erratum version. */
export const EARLIER_HABITABLE_ZONE_COEFFICIENTS: Readonly<Record<EarlierHabitableLimit, Coefficients>> = {
  "recent-venus": [1.7763, 1.4335e-4, 3.3954e-9, -7.6364e-12, -1.195e-15],
  "runaway-greenhouse": [1.0385, 1.2456e-4, 1.4612e-8, -7.6345e-12, -1.7511e-15],
  "moist-greenhouse": [1.0146, 8.1884e-5, 1.9394e-9, -4.3618e-12, -6.826e-16],
  "maximum-greenhouse": [0.3507, 5.9578e-5, 1.6707e-9, -3.0058e-12, -5.1925e-16],
};

const insolation = (c: Coefficients, teffK: number): number => {
  if (!(teffK >= HABITABLE_ZONE_TEFF_K.coolest && teffK <= HABITABLE_ZONE_TEFF_K.hottest)) return Number.NaN;
  const t = teffK - HABITABLE_ZONE_ZERO_POINT_K;
  return c[0] + t * (c[1] + t * (c[2] + t * (c[3] + t * c[4])));
};

/**
 * Light at a limit of the habitable zone, in units of what Earth receives.
 *
 * @returns NaN outside 2600 to 7200 K
 * @see Kopparapu et al. 2014, ApJ 787, L29, eq. 4 and Table 1
 * @example insolationAtLimit("runaway-greenhouse", 5780) // 1.107
 */
export const insolationAtLimit = (limit: HabitableLimit, teffK: number): number =>
  insolation(HABITABLE_ZONE_COEFFICIENTS[limit], teffK);

/**
 * Light at a limit of the model of 2013, in units of what Earth receives.
 *
 * @returns NaN outside 2600 to 7200 K
 * @see Kopparapu et al. 2013, ApJ 765, 131, eq. 2 and Table 3, with the erratum ApJ 770, 82
 * @example insolationAtEarlierLimit("moist-greenhouse", 5780) // 1.0146
 */
export const insolationAtEarlierLimit = (limit: EarlierHabitableLimit, teffK: number): number =>
  insolation(EARLIER_HABITABLE_ZONE_COEFFICIENTS[limit], teffK);

/** dS/dTeff of {@link insolationAtLimit}, per K. */
export const insolationSlope = (limit: HabitableLimit, teffK: number): number => {
  const c = HABITABLE_ZONE_COEFFICIENTS[limit];
  const t = teffK - HABITABLE_ZONE_ZERO_POINT_K;
  return c[1] + t * (2 * c[2] + t * (3 * c[3] + t * 4 * c[4]));
};

/** Distance at which the star gives that insolation, au: `√(L / S)`. */
export const distanceAtInsolation = (luminositySolar: number, insolationEarth: number): number =>
  Math.sqrt(luminositySolar / insolationEarth);
