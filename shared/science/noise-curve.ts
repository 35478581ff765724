/**
 * Noise measured on several time scales, and what lies between.
 *
 * Monotone cubic interpolation of Fritsch & Carlson 1980, SIAM J. Numer. Anal. 17, 238, with the slopes of Fritsch & Butland
 * 1984, SIAM J. Sci. Stat. Comput. 5, 300: it adds no wiggle to the table.
 */

type Values = ArrayLike<number>;

const at = (values: Values, i: number): number => values[i] ?? Number.NaN;

/** Slope of the chord from point i to the next. */
const chord = (x: Values, y: Values, i: number): number =>
  (at(y, i + 1) - at(y, i)) / (at(x, i + 1) - at(x, i));

/** Slope at an end, from the two chords next to it, kept from overshooting. */
const endSlope = (near: number, far: number, nearStep: number, farStep: number): number => {
  const slope = ((2 * nearStep + farStep) * near - nearStep * far) / (nearStep + farStep);
  if (slope * near <= 0) return 0;
  return near * far < 0 && Math.abs(slope) > 3 * Math.abs(near) ? 3 * near : slope;
};

/** Slope at point i: a weighted harmonic mean of the chords beside it, 0 at an extremum. */
const slopeAt = (x: Values, y: Values, i: number): number => {
  const last = x.length - 1;
  if (last === 1) return chord(x, y, 0);
  const step = (j: number): number => at(x, j + 1) - at(x, j);
  if (i === 0) return endSlope(chord(x, y, 0), chord(x, y, 1), step(0), step(1));
  if (i === last)
    return endSlope(chord(x, y, last - 1), chord(x, y, last - 2), step(last - 1), step(last - 2));
  const [before, after] = [chord(x, y, i - 1), chord(x, y, i)];
  if (before * after <= 0) return 0;
  const [w1, w2] = [2 * step(i) + step(i - 1), step(i) + 2 * step(i - 1)];
  return (w1 + w2) / (w1 / before + w2 / after);
};

/**
 * Noise at a duration, from a table of durations and noises.
 *
 * @param durations growing, two or more
 * @param noises as many
 * @returns NaN outside the table
 */
export const noiseFromCurve = (durations: Values, noises: Values, duration: number): number => {
  const last = durations.length - 1;
  if (!(last >= 1 && duration >= at(durations, 0) && duration <= at(durations, last))) return Number.NaN;
  let i = 0;
  while (i < last - 1 && duration > at(durations, i + 1)) i++;
  const step = at(durations, i + 1) - at(durations, i);
  const t = (duration - at(durations, i)) / step;
  const [from, to] = [slopeAt(durations, noises, i) * step, slopeAt(durations, noises, i + 1) * step];
  const rest = 1 - t;
  return (
    rest * rest * ((1 + 2 * t) * at(noises, i) + t * from) +
    t * t * ((3 - 2 * t) * at(noises, i + 1) - rest * to)
  );
};
