/**
 * What the eccentricities of a population do to its transits. For planets met by a search, the transit probability is the
 * circular one times the mean of `1 / (1 − e²)`, and the duration the circular one times the mean of `√(1 − e²)`: averages
 * over the argument of periastron, the second weighted by the chance of a transit.
 *
 * Barnes 2007, PASP 119, 986; Burke 2008, ApJ 679, 1566.
 */

/** How eccentricities are distributed. */
export type EccentricityPrior =
  | { readonly prior: "circular" }
  /** One eccentricity for all, 0 to below 1. */
  | { readonly prior: "fixed"; readonly e: number }
  /** A beta distribution, `e^(α − 1) (1 − e)^(β − 1)`; Kipping 2013, MNRAS 434, L51, gives 0.867 and 3.03 (from memory). */
  | { readonly prior: "beta"; readonly alpha: number; readonly beta: number };

export interface EccentricityFactors {
  /** Mean of 1 / (1 − e²), by which the circular transit probability is multiplied; 1 or more. */
  readonly probability: number;
  /** Mean of √(1 − e²), by which the circular duration is multiplied; 1 or less. */
  readonly duration: number;
}

const CIRCULAR: EccentricityFactors = { probability: 1, duration: 1 };
const UNKNOWN: EccentricityFactors = { probability: Number.NaN, duration: Number.NaN };

const ofOne = (e: number): EccentricityFactors =>
  e >= 0 && e < 1 ? { probability: 1 / (1 - e * e), duration: Math.sqrt(1 - e * e) } : UNKNOWN;

/** `ln(1 + exp x)` without overflow. */
const softplus = (x: number): number => Math.max(0, x) + Math.log1p(Math.exp(-Math.abs(x)));

/** Spacing and reach of the quadrature: enough for exponents down to 0.01. */
const STEP = 1 / 32;
const REACH = 9;

/**
 * Means over a beta distribution by double-exponential quadrature (Takahasi & Mori 1974, Publ. RIMS 9, 721), with
 * `e = 1 / (1 + exp(−π sinh t))`: poles of the density at 0 and 1 need no care, and the powers are taken as logarithms.
 */
const ofBeta = (alpha: number, beta: number): EccentricityFactors => {
  let [sum, probability, duration] = [0, 0, 0];
  for (let t = -REACH; t <= REACH; t += STEP) {
    const x = Math.PI * Math.sinh(t);
    const logE = -softplus(-x);
    const logRest = -softplus(x);
    const e = Math.exp(logE);
    const jacobian = Math.cosh(t);
    sum += jacobian * Math.exp(alpha * logE + beta * logRest);
    probability += (jacobian * Math.exp(alpha * logE + (beta - 1) * logRest)) / (1 + e);
    duration += jacobian * Math.exp(alpha * logE + (beta + 0.5) * logRest) * Math.sqrt(1 + e);
  }
  // With β ≤ 1 so many orbits are nearly straight lines that the mean of 1 / (1 − e²) does not exist.
  return { probability: beta > 1 ? probability / sum : Number.NaN, duration: duration / sum };
};

/** Least exponent and sum of exponents that the quadrature carries. */
const inRange = (exponent: number): boolean => exponent >= 0.01 && exponent <= 1000;

/**
 * Means of `1 / (1 − e²)` and `√(1 − e²)` over a prior; computed once for a recipe.
 *
 * @returns NaN for an eccentricity outside 0 to below 1, for exponents outside 0.01 to 1000, and for the probability with
 *   β ≤ 1, where the mean does not exist
 * @example eccentricityFactors({ prior: "beta", alpha: 1, beta: 2 }).probability // 2 ln 2
 */
export const eccentricityFactors = (prior: EccentricityPrior): EccentricityFactors => {
  if (prior.prior === "circular") return CIRCULAR;
  if (prior.prior === "fixed") return ofOne(prior.e);
  return inRange(prior.alpha) && inRange(prior.beta) ? ofBeta(prior.alpha, prior.beta) : UNKNOWN;
};
