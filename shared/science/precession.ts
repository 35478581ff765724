import {
  ARCSEC_PER_DEGREE,
  isLatitude,
  latitudeOf,
  longitudeOf,
  RADIANS_PER_DEGREE,
  wrapDegrees,
} from "./angles.ts";
import { centuriesFromJ2000 } from "./epoch.ts";

/**
 * General precession in longitude since J2000.0, degrees: what the longitude of a star has grown by in ecliptic coordinates
 * of date; 1.397° a century.
 *
 * @param julianDate TT; within some centuries of J2000.0
 * @see Capitaine, Wallace & Chapront 2003, A&A 412, 567, eq. 39 (IAU 2006); higher terms are below 0.001″ a century away
 */
export const generalPrecession = (julianDate: number): number => {
  const t = centuriesFromJ2000(julianDate);
  return (t * (5028.796195 + 1.1054348 * t)) / ARCSEC_PER_DEGREE;
};

/** Turns about the pole, the node and the pole again, and writes the position; all in degrees. */
const turn = (
  target: Float64Array,
  ra: number,
  dec: number,
  first: number,
  tilt: number,
  last: number,
): void => {
  const latitude = isLatitude(dec) ? dec * RADIANS_PER_DEGREE : Number.NaN;
  const longitude = (ra + first) * RADIANS_PER_DEGREE;
  const cosTilt = Math.cos(tilt * RADIANS_PER_DEGREE);
  const sinTilt = Math.sin(tilt * RADIANS_PER_DEGREE);
  const along = Math.cos(latitude) * Math.cos(longitude);
  const sinDec = Math.sin(latitude);
  const x = cosTilt * along - sinTilt * sinDec;
  const y = Math.cos(latitude) * Math.sin(longitude);
  target[0] = wrapDegrees(longitudeOf(x, y) + last);
  target[1] = latitudeOf(x, y, sinTilt * along + cosTilt * sinDec);
};

// The three angles of the equatorial precession, degrees: Capitaine et al. 2003, eq. 40, to the third order.
const zeta = (t: number): number =>
  (2.650545 + t * (2306.083227 + t * (0.2988499 + 0.01801828 * t))) / ARCSEC_PER_DEGREE;
const zed = (t: number): number =>
  (-2.650545 + t * (2306.077181 + t * (1.0927348 + 0.01826837 * t))) / ARCSEC_PER_DEGREE;
const theta = (t: number): number =>
  (t * (2004.191903 + t * (-0.4294934 - 0.04182264 * t))) / ARCSEC_PER_DEGREE;

/**
 * Writes right ascension and declination for the mean equator and equinox of date, which hour angles need: by 2026 they are
 * up to 0.36° away from those of J2000.0. Nutation (up to 17″) and aberration (up to 20″) are left out, and the pole of the
 * ICRS is taken for the mean pole of J2000.0 (0.02″).
 *
 * @param target receives right ascension at 0 and declination at 1, degrees; NaN for a declination beyond ±90°
 * @param julianDate TT; within some centuries of J2000.0
 * @see Capitaine, Wallace & Chapront 2003, A&A 412, 567 (IAU 2006)
 */
export const icrsToDate = (target: Float64Array, ra: number, dec: number, julianDate: number): void => {
  const t = centuriesFromJ2000(julianDate);
  turn(target, ra, dec, zeta(t), theta(t), zed(t));
};

/** Writes the ICRS position of one for the mean equator and equinox of date: the inverse of {@link icrsToDate}. */
export const dateToIcrs = (target: Float64Array, ra: number, dec: number, julianDate: number): void => {
  const t = centuriesFromJ2000(julianDate);
  turn(target, ra, dec, -zed(t), -theta(t), -zeta(t));
};
