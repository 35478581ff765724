/**
 * Transit geometry. Winn 2010, "Transits and Occultations", arXiv:1001.2010; equation numbers from memory, every formula
 * tested numerically. `a` is the semi-major axis over the stellar radius, `k` the planet's radius over it, `b` the impact
 * parameter; circular orbits.
 */

/**
 * Geometric probability of a transit, `R★ / a` (eq. 9 with k = 0), as a fraction.
 *
 * @returns NaN where the orbit would lie inside the star; never above 1
 */
export const transitProbability = (a: number): number => (a > 1 ? 1 / a : Number.NaN);

/**
 * Duration between first and last contact, in the unit of the period: `(P/π) asin(√((1+k)² − b²) / (a sin i))` (eq. 14).
 *
 * @returns 0 where the planet misses the star; NaN inside it
 */
export const transitDuration = (period: number, a: number, k: number, b: number): number => {
  if (!(a > 1)) return Number.NaN;
  const chord = (1 + k) ** 2 - b * b;
  if (!(chord > 0)) return chord <= 0 ? 0 : Number.NaN;
  const cosI = b / a;
  return (period / Math.PI) * Math.asin(Math.min(1, Math.sqrt(chord) / (a * Math.sqrt(1 - cosI * cosI))));
};

/**
 * Duration between second and third contact (eq. 15), in the unit of the period; 0 where the transit grazes.
 */
export const fullTransitDuration = (period: number, a: number, k: number, b: number): number => {
  if (!(a > 1)) return Number.NaN;
  const chord = (1 - k) ** 2 - b * b;
  if (!(chord > 0)) return chord <= 0 ? 0 : Number.NaN;
  const cosI = b / a;
  return (period / Math.PI) * Math.asin(Math.min(1, Math.sqrt(chord) / (a * Math.sqrt(1 - cosI * cosI))));
};

/** Duration of a central transit of a point, in the unit of the period: `(P/π) asin(1/a)`. */
export const centralDuration = (period: number, a: number): number => transitDuration(period, a, 0, 0);

/** Mean of √(1 − b²) over impact parameters from 0 to 1: π/4. */
export const MEAN_CHORD = Math.PI / 4;

/** Depth without limb darkening, ppm: `10⁶ k²`. */
export const depthPpm = (k: number): number => 1e6 * k * k;
