/**
 * Hammer's equal-area map of the whole sky, east to the left as seen from below. Hammer 1892; Snyder 1987, "Map
 * Projections", USGS Professional Paper 1395, p. 182. x runs from −2 to 2, y from −1 (south, below) to 1.
 *
 * @param ra degrees; 180 in the middle, growing to the left
 * @param dec degrees
 */
export const hammer = (ra: number, dec: number): readonly [x: number, y: number] => {
  const half = ((((((ra - 180) % 360) + 540) % 360) - 180) * Math.PI) / 360;
  const latitude = (dec * Math.PI) / 180;
  const scale = Math.sqrt(1 + Math.cos(latitude) * Math.cos(half));
  return [(-2 * Math.cos(latitude) * Math.sin(half)) / scale, Math.sin(latitude) / scale];
};

const STEP = 3;

const steps = (from: number, to: number): number[] =>
  Array.from({ length: Math.round((to - from) / STEP) + 1 }, (_, i) => from + i * STEP);

/** A parallel of declination, from edge to edge. */
export const parallel = (dec: number): (readonly [number, number])[] =>
  // A hair inside the edge, or the last point would jump to the other side.
  steps(0, 360).map((ra) => hammer(Math.min(359.999, Math.max(0.001, ra)), dec));

/** A meridian of right ascension, from pole to pole. */
export const meridian = (ra: number): (readonly [number, number])[] =>
  steps(-90, 90).map((dec) => hammer(ra, dec));
