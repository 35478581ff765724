import { isLatitude, longitudeOf, RADIANS_PER_DEGREE } from "./angles.ts";
import { icrsToDate } from "./precession.ts";
import { localSiderealTime } from "./sidereal-time.ts";

/** Sidereal days in a mean solar day. */
const SIDEREAL_PER_SOLAR = 1.00273791;

const latitudeRadians = (degrees: number): number =>
  isLatitude(degrees) ? degrees * RADIANS_PER_DEGREE : Number.NaN;

/**
 * Geometric altitude above the horizon, degrees, without refraction (0.5° at the horizon, 0.03° at 30°).
 *
 * @param hourAngle degrees, positive to the west; @param dec declination of date, degrees
 * @param latitude of the site, degrees; NaN is returned when either is beyond ±90°
 * @see Meeus 1998, Astronomical Algorithms, 2nd ed., eq. 13.6
 */
export const altitude = (hourAngle: number, dec: number, latitude: number): number => {
  const d = latitudeRadians(dec);
  const phi = latitudeRadians(latitude);
  const h = hourAngle * RADIANS_PER_DEGREE;
  const up = Math.sin(phi) * Math.sin(d) + Math.cos(phi) * Math.cos(d) * Math.cos(h);
  const west = Math.cos(d) * Math.sin(h);
  const south = Math.sin(phi) * Math.cos(d) * Math.cos(h) - Math.cos(phi) * Math.sin(d);
  // The arcsine of `up` alone loses its digits at the zenith.
  return Math.atan2(up, Math.sqrt(west * west + south * south)) / RADIANS_PER_DEGREE;
};

/** Azimuth, degrees from north through east, 0 ≤ azimuth < 360; arguments as for {@link altitude}. */
export const azimuth = (hourAngle: number, dec: number, latitude: number): number => {
  const d = latitudeRadians(dec);
  const phi = latitudeRadians(latitude);
  const h = hourAngle * RADIANS_PER_DEGREE;
  return longitudeOf(
    Math.sin(d) * Math.cos(phi) - Math.cos(d) * Math.sin(phi) * Math.cos(h),
    -Math.cos(d) * Math.sin(h),
  );
};

const ofDate = new Float64Array(2);

/**
 * Geometric altitude of a star at an instant, degrees: its ICRS position is brought to the equator of date, and the
 * sidereal time gives the hour angle. Nutation, aberration and UTC for UT1 leave at most 0.02°.
 *
 * @param ra degrees (ICRS), at the epoch of the instant; @param dec degrees
 * @param julianDate UTC; @param latitude of the site, degrees; @param eastLongitude of the site, degrees
 */
export const starAltitude = (
  ra: number,
  dec: number,
  julianDate: number,
  latitude: number,
  eastLongitude: number,
): number => {
  icrsToDate(ofDate, ra, dec, julianDate);
  const [raOfDate = Number.NaN, decOfDate = Number.NaN] = ofDate;
  return altitude(localSiderealTime(julianDate, eastLongitude) - raOfDate, decOfDate, latitude);
};

/** Azimuth of a star at an instant, degrees from north through east; arguments as for {@link starAltitude}. */
export const starAzimuth = (
  ra: number,
  dec: number,
  julianDate: number,
  latitude: number,
  eastLongitude: number,
): number => {
  icrsToDate(ofDate, ra, dec, julianDate);
  const [raOfDate = Number.NaN, decOfDate = Number.NaN] = ofDate;
  return azimuth(localSiderealTime(julianDate, eastLongitude) - raOfDate, decOfDate, latitude);
};

/**
 * Hours of each day, by night or by day, for which a star stands above an altitude: `2 H₀ / 15 / 1.00273791` with
 * `cos H₀ = (sin h₀ − sin φ sin δ) / (cos φ cos δ)`. One that never sets below it has 24, one that never reaches it 0.
 *
 * @param latitude of the site, degrees; @param dec degrees; NaN is returned when either is beyond ±90°
 * @param least h₀, degrees, −90 to 90, NaN outside
 */
export const hoursAbove = (latitude: number, dec: number, least: number): number => {
  const d = latitudeRadians(dec);
  const phi = latitudeRadians(latitude);
  const height = Math.sin(latitudeRadians(least)) - Math.sin(phi) * Math.sin(d);
  const reach = Math.cos(phi) * Math.cos(d);
  if (height >= reach) return 0;
  if (height <= -reach) return 24;
  return (2 * Math.acos(height / reach)) / RADIANS_PER_DEGREE / 15 / SIDEREAL_PER_SOLAR;
};
