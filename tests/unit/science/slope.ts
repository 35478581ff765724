/** Central difference: what an analytic slope is checked against. */
export const slopeOf = (relation: (x: number) => number, x: number, step = 1e-5): number =>
  (relation(x + step) - relation(x - step)) / (2 * step);
