/** How many transits fall into observations of a given length; periods and lengths in one unit. */

/** Mean number of transits: `f B / P`, f the share of the time that is observed. */
export const meanTransits = (length: number, period: number, duty = 1): number => (duty * length) / period;

/**
 * Probability of at least n transits in gap-free observations at a random phase: there are `floor(B/P)` of them, and one more
 * with the probability of the fraction that is left.
 *
 * @param least n, whole
 * @example probabilityOfTransits(27, 14, 2) // 0.92857
 */
export const probabilityOfTransits = (length: number, period: number, least: number): number => {
  const cycles = length / period;
  if (!(cycles >= 0)) return Number.NaN;
  return Math.min(1, Math.max(0, cycles - (least - 1)));
};

/**
 * Window function: probability of at least n transits when each of M = B/P is seen with probability f,
 * `1 − Σ C(M, k) f^k (1 − f)^(M − k)`, k < n, M real.
 *
 * @param duty f, share of the time that is observed, above 0 to 1
 * @param least n, 1 or more; 3 is customary
 * @returns 0 where fewer than n fit, M ≤ n − 1: the binomial makes no sense there; NaN for a share or a length out of range
 * @see Burke & McCullough 2014, ApJ 792, 79; Burke et al. 2015, ApJ 809, 8, eq. 6
 * @example windowProbability(1459, 365.25, 0.88) // 0.926172
 */
export const windowProbability = (length: number, period: number, duty: number, least = 3): number => {
  const cycles = length / period;
  if (!(cycles >= 0 && duty > 0 && duty <= 1 && least >= 1)) return Number.NaN;
  if (cycles <= least - 1) return 0;
  let missed = 0;
  let choose = 1;
  for (let k = 0; k < least; k++) {
    missed += choose * duty ** k * (1 - duty) ** (cycles - k);
    choose *= (cycles - k) / (k + 1);
  }
  return Math.min(1, Math.max(0, 1 - missed));
};
