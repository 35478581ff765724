/** Radians in a degree. */
export const RADIANS_PER_DEGREE = Math.PI / 180;
/** Arcseconds in a degree. */
export const ARCSEC_PER_DEGREE = 3600;
/** Milliarcseconds in a degree. */
export const MAS_PER_DEGREE = 3_600_000;

/** The same direction within 0 ≤ angle < 360°. */
export const wrapDegrees = (degrees: number): number => {
  const turn = degrees % 360;
  if (turn >= 0) return turn + 0;
  const up = turn + 360;
  // An angle a hair below zero is rounded up to a whole turn.
  return up >= 360 ? 0 : up;
};

/** Whether it is a declination or latitude at all: −90° to 90°. */
export const isLatitude = (degrees: number): boolean => degrees >= -90 && degrees <= 90;

/**
 * Longitude of the direction (x, y, …), degrees, 0 ≤ longitude < 360; 0 at the poles, where every longitude is right.
 */
export const longitudeOf = (x: number, y: number): number =>
  wrapDegrees(Math.atan2(y, x) / RADIANS_PER_DEGREE);

/** Latitude of the direction (x, y, z), degrees. Unlike the arcsine it is sharp at the poles too. */
export const latitudeOf = (x: number, y: number, z: number): number =>
  Math.atan2(z, Math.sqrt(x * x + y * y)) / RADIANS_PER_DEGREE;
