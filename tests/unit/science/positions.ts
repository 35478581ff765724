import fc from "fast-check";

/** Right ascension or longitude, degrees. */
export const longitudes = fc.double({ min: 0, max: 360, maxExcluded: true, noNaN: true });

/** Declination or latitude, degrees: all of it, and the neighbourhood of the poles, where formulas fail. */
export const latitudes = fc.oneof(
  fc.double({ min: -90, max: 90, noNaN: true }),
  fc.double({ min: 0, max: 1e-6, noNaN: true }).map((distance) => 90 - distance),
  fc.constantFrom(-90, 0, 90),
);

/** Arcseconds from one angle to another, the short way round. */
export const arcsecBetween = (a: number, b: number): number => {
  const turn = (((a - b) % 360) + 540) % 360;
  return (turn - 180) * 3600;
};

/** What a function writes into an array of that length. */
export const written = (length: number, write: (target: Float64Array) => void): number[] => {
  const target = new Float64Array(length);
  write(target);
  return [...target];
};
