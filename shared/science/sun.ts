import { RADIANS_PER_DEGREE, wrapDegrees } from "./angles.ts";
import { J2000_JD, julianDateOfEpoch } from "./epoch.ts";
import { eclipticToIcrs } from "./frames.ts";
import { generalPrecession } from "./precession.ts";

/** The years for which the low-precision formulas are given. */
export const FIRST_SUN_JD = julianDateOfEpoch(1950);
export const LAST_SUN_JD = julianDateOfEpoch(2050);

const sine = (degrees: number): number => Math.sin(degrees * RADIANS_PER_DEGREE);
const cosine = (degrees: number): number => Math.cos(degrees * RADIANS_PER_DEGREE);

const daysFromJ2000 = (julianDate: number): number =>
  julianDate >= FIRST_SUN_JD && julianDate <= LAST_SUN_JD ? julianDate - J2000_JD : Number.NaN;

/**
 * Ecliptic longitude of the Sun for the equinox of J2000.0, degrees, counted on through the years without a jump at 360 and
 * rising with every day. Its latitude is 0. For the accuracy see {@link sunLongitudeOfDate}.
 */
export const sunLongitudeCounted = (julianDate: number): number => {
  const n = daysFromJ2000(julianDate);
  const g = 357.528 + 0.9856003 * n;
  const ofDate = 280.46 + 0.9856474 * n + 1.915 * sine(g) + 0.02 * sine(2 * g);
  return ofDate - generalPrecession(julianDate);
};

/**
 * Apparent ecliptic longitude of the Sun for the equinox of date, degrees, 0 to 360. Its latitude is taken as 0.
 *
 * @param julianDate TT (UTC will do), 1950 to 2050 and NaN outside; accurate to 0.01°
 * @see Astronomical Almanac, section C, low-precision formulas; the coefficients are from memory
 */
export const sunLongitudeOfDate = (julianDate: number): number =>
  wrapDegrees(sunLongitudeCounted(julianDate) + generalPrecession(julianDate));

/** Distance of the Sun, au; accuracy, range and source as for {@link sunLongitudeOfDate}. */
export const sunDistance = (julianDate: number): number => {
  const g = 357.528 + 0.9856003 * daysFromJ2000(julianDate);
  return 1.00014 - 0.01671 * cosine(g) - 0.00014 * cosine(2 * g);
};

/**
 * Writes right ascension and declination of the Sun for comparison with ICRS positions of stars, degrees: precession since
 * J2000.0 is taken off. Accuracy, range and source as for {@link sunLongitudeOfDate}.
 *
 * @param target receives right ascension at 0 and declination at 1
 */
export const sunIcrs = (target: Float64Array, julianDate: number): void =>
  eclipticToIcrs(target, sunLongitudeCounted(julianDate), 0);
