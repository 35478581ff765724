import { gammaQuantile, normalTail } from "./special-functions.ts";

/**
 * Confidence limits of a Poisson mean of which n events were seen; one-sided.
 *
 * Gehrels 1986, ApJ 303, 336; equation numbers from memory.
 */

const isCount = (n: number): boolean => Number.isInteger(n) && n >= 0 && n < 10_000;

/**
 * Upper limit: the mean of which n or fewer events come with probability 1 − CL, `χ²⁻¹(CL, 2n + 2) / 2`.
 *
 * @param confidence CL, above 0 to below 1, one-sided; 0.8413 is one σ
 * @returns NaN for an n that is no whole number from 0 to 9999, or a confidence out of range
 * @example poissonUpperLimit(0, 0.95) // 2.996
 */
export const poissonUpperLimit = (n: number, confidence: number): number =>
  isCount(n) ? gammaQuantile(confidence, n + 1) : Number.NaN;

/** Lower limit: the mean of which n or more come with probability 1 − CL, `χ²⁻¹(1 − CL, 2n) / 2`; 0 for n = 0. */
export const poissonLowerLimit = (n: number, confidence: number): number => {
  if (!isCount(n) || !(confidence > 0 && confidence < 1)) return Number.NaN;
  return n === 0 ? 0 : gammaQuantile(1 - confidence, n);
};

/** One-sided confidence of that many σ of a normal distribution: 0.8413 for 1, 0.9772 for 2, 0.9987 for 3. */
export const confidenceOfSigmas = (sigmas: number): number => normalTail(-sigmas);

/** Approximate upper limit at S σ (eq. 9): `(n + 1) [1 − 1/(9(n + 1)) + S / (3 √(n + 1))]³`. */
export const approximateUpperLimit = (n: number, sigmas: number): number =>
  (n + 1) * (1 - 1 / (9 * (n + 1)) + sigmas / (3 * Math.sqrt(n + 1))) ** 3;

/** Simplest upper limit at one σ (eq. 7): `n + √(n + 3/4) + 1`. */
export const simpleUpperLimit = (n: number): number => n + Math.sqrt(n + 0.75) + 1;

/** Approximate lower limit at S σ, n ≥ 1: `n [1 − 1/(9n) − S / (3 √n)]³`. */
export const approximateLowerLimit = (n: number, sigmas: number): number =>
  n > 0 ? n * (1 - 1 / (9 * n) - sigmas / (3 * Math.sqrt(n))) ** 3 : Number.NaN;
