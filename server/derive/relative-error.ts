/**
 * First-order errors of quantities that share their inputs. A quantity's relative error is a vector over independent
 * sources, each in units of that source's sigma, so that a product of powers of quantities adds their vectors and what
 * radius and mass owe to the same magnitude is not counted twice. A source without an error makes the sum NaN, which
 * reads as "no error given".
 */
export const SOURCE = {
  parallax: 0,
  /** Magnitudes one by one: a colour and an absolute magnitude may share one. */
  g: 1,
  bp: 2,
  rp: 3,
  v: 4,
  j: 5,
  h: 6,
  ks: 7,
  /** A given temperature, or the scatter of the relation that gave it. */
  temperature: 8,
  gravity: 9,
  iron: 10,
  /** Scatter of the relations that gave radius, mass and luminosity. */
  radius: 11,
  mass: 12,
  light: 13,
  extinction: 14,
} as const;

export type SourceName = keyof typeof SOURCE;

const SOURCES = 15;

export type ErrorVector = Float64Array;

export const errorVector = (): ErrorVector => new Float64Array(SOURCES);

/** Sets `target` to `p × a + q × b`: the vector of aᵖ bᑫ. */
export const combine = (target: ErrorVector, p: number, a: ErrorVector, q: number, b: ErrorVector): void => {
  for (let i = 0; i < SOURCES; i++) target[i] = p * (a[i] as number) + q * (b[i] as number);
};

/** Adds `factor × a` to `target`. */
export const addScaled = (target: ErrorVector, factor: number, a: ErrorVector): void => {
  for (let i = 0; i < SOURCES; i++) target[i] = (target[i] as number) + factor * (a[i] as number);
};

/** Sets `target` to `factor × a`. */
export const scale = (target: ErrorVector, factor: number, a: ErrorVector): void => {
  for (let i = 0; i < SOURCES; i++) target[i] = factor * (a[i] as number);
};

/** Length of the vector: the relative error. */
export const relativeError = (vector: ErrorVector): number => {
  let sum = 0;
  for (let i = 0; i < SOURCES; i++) sum += (vector[i] as number) * (vector[i] as number);
  return Math.sqrt(sum);
};

/** Change of an absolute magnitude per relative change of the parallax, mag. */
export const PER_PARALLAX = 5 / Math.LN10;

/** What of a star's magnitude is not sure. */
interface MagnitudeErrors {
  /** Relative error of the distance. */
  readonly distanceError: number;
  /** Error of E(B − V), mag, of its own. */
  readonly ebvError: number;
  /** Error of E(B − V), mag, that it owes to the distance. */
  readonly ebvDistanceError: number;
}

/**
 * Sets `target` to the vector of a quantity that changes by `slope` (relative) per magnitude of an absolute magnitude.
 *
 * @param own source of the apparent magnitude, and its error, mag
 * @param perExcess change of the extinction in the band per E(B − V)
 */
export const setMagnitudeErrors = (
  target: ErrorVector,
  slope: number,
  star: MagnitudeErrors,
  own: number,
  ownError: number,
  perExcess: number,
): void => {
  target.fill(0);
  target[SOURCE.parallax] = slope * (PER_PARALLAX * star.distanceError + perExcess * star.ebvDistanceError);
  target[own] = slope * ownError;
  target[SOURCE.extinction] = -slope * perExcess * star.ebvError;
};
