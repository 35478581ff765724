import { isLatitude, RADIANS_PER_DEGREE } from "./angles.ts";

/** Least elongation from the Sun in the course of a year, degrees, of a star at an ecliptic latitude: `|β|`. */
export const leastSunElongation = (eclipticLatitude: number): number =>
  isLatitude(eclipticLatitude) ? Math.abs(eclipticLatitude) : Number.NaN;

/** Greatest elongation from the Sun in the course of a year, degrees: `180 − |β|`. */
export const greatestSunElongation = (eclipticLatitude: number): number =>
  180 - leastSunElongation(eclipticLatitude);

/**
 * How far the Sun's longitude is from the star's, degrees, 0 to 180, when their distance is the elongation:
 * `cos Δλ = cos E / cos β`. 0 when the Sun never comes as near as that, 180 when it never goes so far.
 *
 * @param elongation E, degrees, 0 to 180; NaN outside
 * @param eclipticLatitude β of the star, degrees; NaN beyond ±90°
 */
export const sunLongitudeOffset = (elongation: number, eclipticLatitude: number): number => {
  if (!(elongation >= 0 && elongation <= 180 && isLatitude(eclipticLatitude))) return Number.NaN;
  if (elongation <= leastSunElongation(eclipticLatitude)) return 0;
  if (elongation >= greatestSunElongation(eclipticLatitude)) return 180;
  const cosine = Math.cos(elongation * RADIANS_PER_DEGREE) / Math.cos(eclipticLatitude * RADIANS_PER_DEGREE);
  return Math.acos(Math.min(1, Math.max(-1, cosine))) / RADIANS_PER_DEGREE;
};

/**
 * Days of a year on which a star's elongation from the Sun lies within a band, such as an avoidance angle (50 to 180) or a
 * field of regard (85 to 135). The Sun is taken to move evenly; with the Earth's eccentricity the number differs by 1 to 2.
 *
 * @param eclipticLatitude β, degrees; NaN beyond ±90°
 * @param least degrees; @param most degrees; 0 ≤ least ≤ most ≤ 180, NaN otherwise
 * @returns 0 to 365.25
 */
export const sunBandDays = (eclipticLatitude: number, least: number, most: number): number => {
  if (!(least <= most)) return Number.NaN;
  const width = sunLongitudeOffset(most, eclipticLatitude) - sunLongitudeOffset(least, eclipticLatitude);
  return (365.25 * width) / 180;
};
