/** What a survey may expect to find. */

/** Detections expected of one star and one kind of planet: planets per star times the probabilities to see them. */
export const detectionRate = (
  planetsPerStar: number,
  transitProbability: number,
  windowProbability: number,
  detectionProbability: number,
): number => planetsPerStar * transitProbability * windowProbability * detectionProbability;

/** Detections expected of all stars and kinds of planets: the sum of their rates. */
export const expectedDetections = (rates: ArrayLike<number>): number => {
  let sum = 0;
  for (let i = 0; i < rates.length; i++) sum += rates[i] ?? Number.NaN;
  return sum;
};

/**
 * Error of an expected number: Poisson's root and the share by which the occurrence is uncertain, in quadrature.
 *
 * @param occurrenceError error of the occurrence over the occurrence
 */
export const yieldError = (expected: number, occurrenceError: number): number =>
  Math.sqrt(expected + (expected * occurrenceError) ** 2);

/** Probability of at least one detection: `1 − Π (1 − p)`; NaN where a probability lies outside 0 to 1. */
export const atLeastOne = (probabilities: ArrayLike<number>): number => {
  let none = 0;
  for (let i = 0; i < probabilities.length; i++) none += Math.log1p(-(probabilities[i] ?? Number.NaN));
  return -Math.expm1(none);
};

/** The same for rare detections of which only the expected number is known: `1 − exp(−N)`. */
export const atLeastOneExpected = (expected: number): number => -Math.expm1(-expected);

/**
 * Stars after which the confidence of at least one detection is c: `ln(1 − c) / ln(1 − q)`; a survey needs the next whole
 * number.
 *
 * @param confidence c, above 0 to below 1
 * @param perStar q, probability of a detection at one star, above 0 to below 1
 * @returns NaN outside these ranges
 * @example starsNeeded(0.95, 1e-3) // 2994.234
 */
export const starsNeeded = (confidence: number, perStar: number): number =>
  confidence > 0 && confidence < 1 && perStar > 0 && perStar < 1
    ? Math.log1p(-confidence) / Math.log1p(-perStar)
    : Number.NaN;

/** Stars with which one detection is expected: `1 / q`. */
export const starsPerDetection = (perStar: number): number =>
  perStar > 0 && perStar <= 1 ? 1 / perStar : Number.NaN;
