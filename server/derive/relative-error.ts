/**
 * First-order errors of quantities that share their inputs. A quantity's relative error is a vector over independent
 * sources, each in units of that source's sigma, so that a product of powers of quantities adds their vectors and what
 * radius and mass owe to the same magnitude is not counted twice. A source without an error makes the sum NaN, which
 * reads as "no error given".
 */
export const SOURCE = {
  magnitude: 0,
  temperature: 1,
  radius: 2,
  mass: 3,
  light: 4,
  gravity: 5,
  iron: 6,
} as const;

const SOURCES = 7;

export type ErrorVector = Float64Array;

export const errorVector = (): ErrorVector => new Float64Array(SOURCES);

/** Sets `target` to `p × a + q × b`: the vector of aᵖ bᑫ. */
export const combine = (target: ErrorVector, p: number, a: ErrorVector, q: number, b: ErrorVector): void => {
  for (let i = 0; i < SOURCES; i++) target[i] = p * (a[i] ?? 0) + q * (b[i] ?? 0);
};

/** Length of the vector: the relative error. */
export const relativeError = (vector: ErrorVector): number => {
  let sum = 0;
  for (let i = 0; i < SOURCES; i++) sum += (vector[i] ?? 0) ** 2;
  return Math.sqrt(sum);
};
