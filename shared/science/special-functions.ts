/**
 * Gamma and error functions to double precision, and their inverses. All but the first follow from the incomplete gamma
 * function: Abramowitz & Stegun 1964, 6.5; evaluated as in Press et al. 2007, Numerical Recipes, 3rd ed., 6.2.
 */

const LN_ROOT_TWO_PI = 0.9189385332046728;

/** Where Stirling's series of seven terms is exact to double precision. */
const STIRLING_FROM = 10;

/**
 * Natural logarithm of Γ(x), by Stirling's series (Abramowitz & Stegun 1964, 6.1.41); absolute error below 1e-14 to x = 100.
 *
 * @returns NaN for x ≤ 0
 */
export const lnGamma = (x: number): number => {
  if (!(x > 0)) return Number.NaN;
  let shifted = x;
  let product = 1;
  for (; shifted < STIRLING_FROM; shifted++) product *= shifted;
  const y = 1 / (shifted * shifted);
  const series =
    1 / 12 -
    y * (1 / 360 - y * (1 / 1260 - y * (1 / 1680 - y * (1 / 1188 - y * (691 / 360360 - y * (1 / 156))))));
  return (
    (shifted - 0.5) * Math.log(shifted) - shifted + LN_ROOT_TWO_PI + series / shifted - Math.log(product)
  );
};

/** Terms after which both expansions have converged for shapes up to 10 000. */
const MOST_TERMS = 2000;
const TINY = 1e-300;

/** `x^a e^(−x) / Γ(a)`. */
const gammaFactor = (a: number, x: number): number => Math.exp(a * Math.log(x) - x - lnGamma(a));

/** P(a, x) by its series; converges fast for x < a + 1. */
const lowerBySeries = (a: number, x: number): number => {
  let term = 1 / a;
  let sum = term;
  for (let n = 1; n < MOST_TERMS && term > sum * 1e-17; n++) {
    term *= x / (a + n);
    sum += term;
  }
  return sum * gammaFactor(a, x);
};

/** Q(a, x) by its continued fraction (Lentz 1976, Appl. Opt. 15, 668); converges fast for x > a + 1. */
const upperByFraction = (a: number, x: number): number => {
  let b = x + 1 - a;
  let c = 1 / TINY;
  let d = 1 / b;
  let h = d;
  for (let i = 1; i < MOST_TERMS; i++) {
    const numerator = -i * (i - a);
    b += 2;
    d = numerator * d + b;
    if (Math.abs(d) < TINY) d = TINY;
    c = b + numerator / c;
    if (Math.abs(c) < TINY) c = TINY;
    d = 1 / d;
    h *= d * c;
    if (Math.abs(d * c - 1) < 1e-16) break;
  }
  return h * gammaFactor(a, x);
};

/**
 * Regularised lower incomplete gamma function P(a, x): the cumulative distribution of a gamma variate of shape a, scale 1.
 *
 * @returns 0 for x ≤ 0; NaN for a shape outside above 0 to 10 000; relative error below 1e-13 to a = 100
 * @example lowerGamma(1, 1) // 1 − 1/e
 */
export const lowerGamma = (a: number, x: number): number => {
  if (!(a > 0 && a <= 10_000) || Number.isNaN(x)) return Number.NaN;
  if (x <= 0) return 0;
  if (x === Number.POSITIVE_INFINITY) return 1;
  return x < a + 1 ? lowerBySeries(a, x) : 1 - upperByFraction(a, x);
};

/** Regularised upper incomplete gamma function, Q(a, x) = 1 − P(a, x), exact also where it is small. */
export const upperGamma = (a: number, x: number): number => {
  if (!(a > 0 && a <= 10_000) || Number.isNaN(x)) return Number.NaN;
  if (x <= 0) return 1;
  if (x === Number.POSITIVE_INFINITY) return 0;
  return x < a + 1 ? 1 - lowerBySeries(a, x) : upperByFraction(a, x);
};

/** Complementary error function, `1 − erf x`, with its relative accuracy kept far out: erfc(7) is 4.18e-23. */
export const erfc = (x: number): number => (x >= 0 ? upperGamma(0.5, x * x) : 1 + lowerGamma(0.5, x * x));

/** Error function. */
export const erf = (x: number): number =>
  x >= 0 ? lowerGamma(0.5, x * x) : x < 0 ? -lowerGamma(0.5, x * x) : Number.NaN;

/** Probability that a normal deviate exceeds x: `erfc(x / √2) / 2`. */
export const normalTail = (x: number): number => 0.5 * erfc(x / Math.SQRT2);

/** First guess of {@link normalTailQuantile} for p up to 0.5: Abramowitz & Stegun 1964, 26.2.23, error below 4.5e-4. */
const tailGuess = (p: number): number => {
  const t = Math.sqrt(-2 * Math.log(p));
  const above = 2.515517 + t * (0.802853 + t * 0.010328);
  return t - above / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308)));
};

/**
 * The x that a normal deviate exceeds with probability p: the inverse of {@link normalTail}.
 *
 * @returns NaN for p outside above 0 to below 1
 * @example normalTailQuantile(1 / 1.7e12) // 7.1081
 */
export const normalTailQuantile = (p: number): number => {
  if (!(p > 0 && p < 1)) return Number.NaN;
  if (p > 0.5) return -normalTailQuantile(1 - p);
  let x = tailGuess(p);
  // Halley's steps triple the digits: two suffice, the third costs nothing worth saving.
  for (let i = 0; i < 3; i++) {
    const density = Math.exp(-0.5 * x * x - LN_ROOT_TWO_PI);
    const step = (normalTail(x) - p) / density;
    x += step / (1 - 0.5 * x * step);
  }
  return x;
};

/** First guess of {@link gammaQuantile}: Wilson & Hilferty 1931, PNAS 17, 684, or the head of the series near zero. */
const gammaGuess = (p: number, a: number): number => {
  const w = 1 - 1 / (9 * a) - normalTailQuantile(p) / (3 * Math.sqrt(a));
  return w > 0.3 ? a * w ** 3 : Math.exp((Math.log(p) + lnGamma(a + 1)) / a);
};

/**
 * The x below which a gamma variate of shape a, scale 1, falls with probability p: the inverse of {@link lowerGamma}. Half of
 * it is what a χ² with 2a degrees of freedom gives.
 *
 * @returns NaN for p outside above 0 to below 1 and for a shape outside above 0 to 10 000
 */
export const gammaQuantile = (p: number, a: number): number => {
  if (!(p > 0 && p < 1 && a > 0 && a <= 10_000)) return Number.NaN;
  let low = 0;
  let high = Number.POSITIVE_INFINITY;
  let x = gammaGuess(p, a);
  for (let i = 0; i < 200; i++) {
    // The smaller of both tails keeps its digits.
    const excess = p < 0.5 ? lowerGamma(a, x) - p : 1 - p - upperGamma(a, x);
    if (excess < 0) low = x;
    else high = x;
    const next = x - (excess * x) / gammaFactor(a, x);
    const inside = next > low && next < high;
    const taken = inside ? next : high === Number.POSITIVE_INFINITY ? 2 * x : 0.5 * (low + high);
    if (Math.abs(taken - x) <= 1e-15 * x) return taken;
    x = taken;
  }
  return x;
};
