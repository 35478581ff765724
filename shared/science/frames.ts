import { isLatitude, latitudeOf, longitudeOf, RADIANS_PER_DEGREE } from "./angles.ts";

/** A rotation of the axes, row by row. */
type Rotation = readonly [number, number, number, number, number, number, number, number, number];

/**
 * ICRS to galactic: ESA 1997, SP-1200, vol. 1, eq. 1.5.11. North galactic pole at α 192.85948°, δ 27.12825°; galactic
 * longitude of the ascending node 32.93192°. Frames that come by way of FK5 differ by about 20 mas.
 */
const GALACTIC: Rotation = [
  -0.0548755604162154, -0.873437090234885, -0.4838350155487132, 0.4941094278755837, -0.4448296299600112,
  0.746982244497219, -0.8676661490190047, -0.1980763734312015, 0.4559837761750669,
];

/** Mean obliquity of J2000.0, degrees: 84381.406″ (Capitaine, Wallace & Chapront 2003, A&A 412, 567; IAU 2006). */
const J2000_OBLIQUITY = 84_381.406 / 3600;

/** A rotation about the x axis, which points to the equinox, by an obliquity in degrees: equatorial to ecliptic. */
const aboutEquinox = (obliquity: number): Rotation => {
  const cos = Math.cos(obliquity * RADIANS_PER_DEGREE);
  const sin = Math.sin(obliquity * RADIANS_PER_DEGREE);
  return [1, 0, 0, 0, cos, sin, 0, -sin, cos];
};

const ECLIPTIC = aboutEquinox(J2000_OBLIQUITY);

/** The rotation back. */
const inverse = (m: Rotation): Rotation => [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];

const FROM_GALACTIC = inverse(GALACTIC);
const FROM_ECLIPTIC = inverse(ECLIPTIC);

/**
 * Writes longitude and latitude, degrees, of a direction in the turned axes; NaN for a latitude beyond ±90°.
 *
 * @param target receives the longitude (0 ≤ longitude < 360) at 0 and the latitude at 1
 */
const rotate = (target: Float64Array, m: Rotation, longitude: number, latitude: number): void => {
  const b = isLatitude(latitude) ? latitude * RADIANS_PER_DEGREE : Number.NaN;
  const l = longitude * RADIANS_PER_DEGREE;
  const cos = Math.cos(b);
  const x = cos * Math.cos(l);
  const y = cos * Math.sin(l);
  const z = Math.sin(b);
  const u = m[0] * x + m[1] * y + m[2] * z;
  const v = m[3] * x + m[4] * y + m[5] * z;
  target[0] = longitudeOf(u, v);
  target[1] = latitudeOf(u, v, m[6] * x + m[7] * y + m[8] * z);
};

/** Writes galactic longitude and latitude of an ICRS position; degrees, see {@link rotate}. */
export const icrsToGalactic = (target: Float64Array, ra: number, dec: number): void =>
  rotate(target, GALACTIC, ra, dec);

/** Writes right ascension and declination (ICRS) of a galactic position; degrees, see {@link rotate}. */
export const galacticToIcrs = (target: Float64Array, longitude: number, latitude: number): void =>
  rotate(target, FROM_GALACTIC, longitude, latitude);

/**
 * Writes ecliptic longitude and latitude (mean ecliptic of J2000.0) of an ICRS position; degrees, see {@link rotate}. The
 * pole of the ICRS is taken for the mean pole of J2000.0, which is 20 to 50 mas away.
 */
export const icrsToEcliptic = (target: Float64Array, ra: number, dec: number): void =>
  rotate(target, ECLIPTIC, ra, dec);

/** Writes right ascension and declination (ICRS) of a position on the mean ecliptic of J2000.0: the way back. */
export const eclipticToIcrs = (target: Float64Array, longitude: number, latitude: number): void =>
  rotate(target, FROM_ECLIPTIC, longitude, latitude);

/**
 * Writes ecliptic longitude and latitude of an equatorial position for the same equinox, by an obliquity in degrees: that of
 * date, or another convention for J2000.0 (84381.411″ and 84381.448″ are in use). See {@link rotate}.
 */
export const equatorialToEcliptic = (
  target: Float64Array,
  ra: number,
  dec: number,
  obliquity: number,
): void => rotate(target, aboutEquinox(obliquity), ra, dec);

/** Writes right ascension and declination of an ecliptic position: the inverse of {@link equatorialToEcliptic}. */
export const eclipticToEquatorial = (
  target: Float64Array,
  longitude: number,
  latitude: number,
  obliquity: number,
): void => rotate(target, aboutEquinox(-obliquity), longitude, latitude);
