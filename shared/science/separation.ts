import { isLatitude, longitudeOf, RADIANS_PER_DEGREE } from "./angles.ts";

const latitudeRadians = (degrees: number): number =>
  isLatitude(degrees) ? degrees * RADIANS_PER_DEGREE : Number.NaN;

/**
 * Angle between two directions, degrees, 0 to 180; NaN for a declination beyond ±90°.
 *
 * Vincenty's form (Vincenty 1975, Survey Review 23, 88, on the sphere) keeps its digits at every separation; the arccosine
 * is useless below a tenth of an arcsecond.
 */
export const separation = (ra1: number, dec1: number, ra2: number, dec2: number): number => {
  const d1 = latitudeRadians(dec1);
  const d2 = latitudeRadians(dec2);
  const difference = (ra2 - ra1) * RADIANS_PER_DEGREE;
  const cosDifference = Math.cos(difference);
  const east = Math.cos(d2) * Math.sin(difference);
  const north = Math.cos(d1) * Math.sin(d2) - Math.sin(d1) * Math.cos(d2) * cosDifference;
  const along = Math.sin(d1) * Math.sin(d2) + Math.cos(d1) * Math.cos(d2) * cosDifference;
  return Math.atan2(Math.sqrt(east * east + north * north), along) / RADIANS_PER_DEGREE;
};

/**
 * Direction from the first position to the second, degrees from north through east, 0 ≤ angle < 360; NaN for a declination
 * beyond ±90°. Positions that coincide give 0.
 */
export const positionAngle = (ra1: number, dec1: number, ra2: number, dec2: number): number => {
  const d1 = latitudeRadians(dec1);
  const d2 = latitudeRadians(dec2);
  const difference = (ra2 - ra1) * RADIANS_PER_DEGREE;
  return longitudeOf(
    Math.cos(d1) * Math.sin(d2) - Math.sin(d1) * Math.cos(d2) * Math.cos(difference),
    Math.cos(d2) * Math.sin(difference),
  );
};
