import { DAY_S } from "./constants.ts";
import { isClosed, RADIANS_PER_DEGREE, scaledAxisFromDensity } from "./orbit.ts";

/**
 * Transit geometry. Winn 2010, "Transits and Occultations", arXiv:1001.2010; equation numbers from memory, every formula
 * tested numerically. `a` is the semi-major axis over the stellar radius, `k` the planet's radius over it, `b` the impact
 * parameter; `e` the eccentricity and `ω` the argument of periastron of the star's orbit, degrees. Orbits are circular
 * where neither is given. An orbit whose periastron lies inside the star has no transits: NaN.
 */

const leavesStar = (a: number, e: number): boolean => isClosed(e) && a * (1 - e) > 1;

/** Distance at inferior conjunction over the semi-major axis: `(1 − e²) / (1 + e sin ω)`; 1 on a circular orbit. */
export const conjunctionDistance = (e: number, omegaDeg: number): number =>
  isClosed(e) ? (1 - e * e) / (1 + e * Math.sin(omegaDeg * RADIANS_PER_DEGREE)) : Number.NaN;

/** Impact parameter at conjunction: `a cos i (1 − e²) / (1 + e sin ω)` (eq. 7). */
export const impactParameter = (a: number, inclinationDeg: number, e = 0, omegaDeg = 0): number =>
  a * Math.cos(inclinationDeg * RADIANS_PER_DEGREE) * conjunctionDistance(e, omegaDeg);

/**
 * Inclination, degrees, 0 to 180, from the impact parameter: the inverse of {@link impactParameter}.
 *
 * @returns NaN where |b| exceeds the distance at conjunction
 */
export const inclinationFromImpact = (b: number, a: number, e = 0, omegaDeg = 0): number =>
  Math.acos(b / (a * conjunctionDistance(e, omegaDeg))) / RADIANS_PER_DEGREE;

/**
 * Geometric probability of a transit, `((1 + edge) / a) (1 + e sin ω) / (1 − e²)` (eq. 9), as a fraction.
 *
 * @param edge 0 for a transit of the planet's centre; k for any transit, grazing ones too; −k for full transits alone
 * @returns NaN where the orbit would lie inside the star; never above 1
 */
export const transitProbability = (a: number, edge = 0, e = 0, omegaDeg = 0): number =>
  leavesStar(a, e) ? Math.min(1, (1 + edge) / (a * conjunctionDistance(e, omegaDeg))) : Number.NaN;

/**
 * Probability of a transit averaged over all arguments of periastron, `((1 + edge) / a) / (1 − e²)`: what a search meets.
 * For one given star of unknown eccentricity take the circular value.
 *
 * @param edge see {@link transitProbability}
 * @returns NaN where the orbit would lie inside the star; never above 1
 * @see Barnes 2007, PASP 119, 986; Burke 2008, ApJ 679, 1566
 */
export const meanTransitProbability = (a: number, e: number, edge = 0): number =>
  leavesStar(a, e) ? Math.min(1, (1 + edge) / (a * (1 - e * e))) : Number.NaN;

/** Time within a chord of half-length √`chord` (stellar radii) across the star. */
const crossing = (period: number, a: number, chord: number, b: number, e: number, omega: number): number => {
  if (!leavesStar(a, e)) return Number.NaN;
  if (!(chord > 0)) return chord <= 0 ? 0 : Number.NaN;
  const nearness = conjunctionDistance(e, omega);
  const cosI = b / (a * nearness);
  const arc = Math.asin(Math.min(1, Math.sqrt(chord) / (a * Math.sqrt(1 - cosI * cosI))));
  return ((period / Math.PI) * arc * nearness) / Math.sqrt(1 - e * e);
};

/**
 * Duration between first and last contact, in the unit of the period:
 * `(P/π) asin(√((1+k)² − b²) / (a sin i)) √(1 − e²) / (1 + e sin ω)` (eq. 14 and 16). With an eccentric orbit the planet's
 * speed counts as that of conjunction: good to 0.03 % for a = 20, e = 0.3.
 *
 * @returns 0 where the planet misses the star; NaN where its orbit meets it
 */
export const transitDuration = (
  period: number,
  a: number,
  k: number,
  b: number,
  e = 0,
  omegaDeg = 0,
): number => crossing(period, a, (1 + k) ** 2 - b * b, b, e, omegaDeg);

/**
 * Duration between second and third contact (eq. 15 and 16), in the unit of the period; 0 where the transit grazes.
 */
export const fullTransitDuration = (
  period: number,
  a: number,
  k: number,
  b: number,
  e = 0,
  omegaDeg = 0,
): number => crossing(period, a, (1 - k) ** 2 - b * b, b, e, omegaDeg);

/** Duration of a central transit of a point, in the unit of the period: `(P/π) asin(1/a)`. */
export const centralDuration = (period: number, a: number): number => transitDuration(period, a, 0, 0);

/**
 * Semi-major axis in stellar radii that makes a circular transit last that long:
 * `√(b² + ((1+k)² − b²) / sin²(π T14 / P))`, the inverse of {@link transitDuration}.
 *
 * @returns NaN for a duration that is not above 0 and below half the period, for a planet that misses, and where the orbit
 *   would lie inside the star
 * @see Seager & Mallén-Ornelas 2003, ApJ 585, 1038, eq. 8
 */
export const scaledAxisFromDuration = (period: number, duration: number, k: number, b: number): number => {
  const chord = (1 + k) ** 2 - b * b;
  if (!(duration > 0 && duration < period / 2 && chord > 0)) return Number.NaN;
  const a = Math.sqrt(b * b + chord / Math.sin((Math.PI * duration) / period) ** 2);
  return a > 1 ? a : Number.NaN;
};

/**
 * Impact parameter of a circular transit from both its durations, T14 and T23, in the unit of the period.
 *
 * @returns NaN where T23 is not above 0 and below T14, and where no impact parameter gives both
 * @see Seager & Mallén-Ornelas 2003, ApJ 585, 1038, eq. 7
 */
export const impactFromDurations = (period: number, duration: number, full: number, k: number): number => {
  if (!(full > 0 && full < duration && duration < period / 2)) return Number.NaN;
  const ratio = (Math.sin((Math.PI * full) / period) / Math.sin((Math.PI * duration) / period)) ** 2;
  return Math.sqrt(((1 - k) ** 2 - ratio * (1 + k) ** 2) / (1 - ratio));
};

/** Characteristic duration of a central transit, in the unit of the period: `T0 = P / (π a)` (eq. 18). */
export const characteristicDuration = (period: number, a: number): number =>
  a > 1 ? period / (Math.PI * a) : Number.NaN;

/**
 * Characteristic duration, h, from a period in days and the star's mean density, ρ☉:
 * `T0 = 12.976 h (P/yr)^(1/3) (ρ/ρ☉)^(−1/3)` (eq. 19, which rounds to 13 h).
 */
export const characteristicDurationHours = (periodDays: number, densitySolar: number): number =>
  characteristicDuration((periodDays * DAY_S) / 3600, scaledAxisFromDensity(periodDays, densitySolar));

/** Duration between the middles of ingress and egress for a small planet: `T ≈ T0 √(1 − b²)`; NaN where |b| > 1. */
export const approximateDuration = (characteristic: number, b: number): number =>
  characteristic * Math.sqrt(1 - b * b);

/** Duration of ingress for a small planet: `τ ≈ T0 k / √(1 − b²)`; NaN where |b| ≥ 1. */
export const ingressDuration = (characteristic: number, k: number, b: number): number =>
  Math.abs(b) < 1 ? (characteristic * k) / Math.sqrt(1 - b * b) : Number.NaN;

/** Mean of √(1 − b²) over impact parameters from 0 to 1: π/4. */
export const MEAN_CHORD = Math.PI / 4;

/** Median of √(1 − b²) over impact parameters from 0 to 1: √3/2, at b = 1/2. */
export const MEDIAN_CHORD = Math.sqrt(3) / 2;

/** Mean of (1 − b²)^(1/4) over impact parameters from 0 to 1, by which a signal-to-noise ratio shrinks. */
export const MEAN_ROOT_CHORD = 0.8740191847640399;

/**
 * Duration averaged over impact parameters, in the unit of the period: `(π/4) (P/π) asin(1/a) √(1 − e²)`, about
 * `(P / 4a) √(1 − e²)`.
 *
 * @see Burke et al. 2015, ApJ 809, 8, eq. 1, whose numeric factor in print is not the 24/4 of hours and days
 */
export const meanDuration = (period: number, a: number, e = 0): number =>
  leavesStar(a, e) ? MEAN_CHORD * centralDuration(period, a) * Math.sqrt(1 - e * e) : Number.NaN;

/** Depth without limb darkening, ppm: `10⁶ k²`. */
export const depthPpm = (k: number): number => 1e6 * k * k;
