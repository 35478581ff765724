import { RADIANS_PER_DEGREE, wrapDegrees } from "./angles.ts";
import { centuriesFromJ2000 } from "./epoch.ts";
import { eclipticToIcrs } from "./frames.ts";
import { generalPrecession } from "./precession.ts";
import { separation } from "./separation.ts";
import { FIRST_SUN_JD, LAST_SUN_JD, sunIcrs } from "./sun.ts";

const sine = (degrees: number): number => Math.sin(degrees * RADIANS_PER_DEGREE);
const cosine = (degrees: number): number => Math.cos(degrees * RADIANS_PER_DEGREE);

const centuries = (julianDate: number): number =>
  julianDate >= FIRST_SUN_JD && julianDate <= LAST_SUN_JD ? centuriesFromJ2000(julianDate) : Number.NaN;

/**
 * Geocentric ecliptic longitude of the Moon for the equinox of date, degrees, 0 to 360. Seen from the ground the Moon stands
 * up to 1° elsewhere.
 *
 * @param julianDate TT (UTC will do), 1950 to 2050 and NaN outside; accurate to 0.3°
 * @see Astronomical Almanac, section D, low-precision formulas; the coefficients are from memory
 */
export const moonLongitudeOfDate = (julianDate: number): number => {
  const t = centuries(julianDate);
  return wrapDegrees(
    218.32 +
      481_267.883 * t +
      6.29 * sine(134.9 + 477_198.85 * t) -
      1.27 * sine(259.2 - 413_335.38 * t) +
      0.66 * sine(235.7 + 890_534.23 * t) +
      0.21 * sine(269.9 + 954_397.7 * t) -
      0.19 * sine(357.5 + 35_999.05 * t) -
      0.11 * sine(186.6 + 966_404.05 * t),
  );
};

/** Geocentric ecliptic latitude of the Moon, degrees, to 0.2°; range and source as for {@link moonLongitudeOfDate}. */
export const moonLatitude = (julianDate: number): number => {
  const t = centuries(julianDate);
  return (
    5.13 * sine(93.3 + 483_202.03 * t) +
    0.28 * sine(228.2 + 960_400.87 * t) -
    0.28 * sine(318.3 + 6003.18 * t) -
    0.17 * sine(217.6 - 407_332.2 * t)
  );
};

/**
 * Horizontal parallax of the Moon, degrees, to 0.003°: how far it can stand from its geocentric place when seen from the
 * ground. Range and source as for {@link moonLongitudeOfDate}.
 */
export const moonParallax = (julianDate: number): number => {
  const t = centuries(julianDate);
  return (
    0.9508 +
    0.0518 * cosine(134.9 + 477_198.85 * t) +
    0.0095 * cosine(259.2 - 413_335.38 * t) +
    0.0078 * cosine(235.7 + 890_534.23 * t) +
    0.0028 * cosine(269.9 + 954_397.7 * t)
  );
};

/**
 * Writes geocentric right ascension and declination of the Moon for comparison with ICRS positions of stars, degrees.
 * Accuracy, range and source as for {@link moonLongitudeOfDate}.
 *
 * @param target receives right ascension at 0 and declination at 1
 */
export const moonIcrs = (target: Float64Array, julianDate: number): void =>
  eclipticToIcrs(
    target,
    moonLongitudeOfDate(julianDate) - generalPrecession(julianDate),
    moonLatitude(julianDate),
  );

/**
 * Illuminated fraction of the Moon's disc, 0 to 1, at an elongation from the Sun in degrees: `(1 + cos i) / 2` with the phase
 * angle `i ≈ 180° − elongation`, which is right to 0.0013, as the Sun is 390 times as far. NaN outside 0 to 180.
 *
 * @see Meeus 1998, Astronomical Algorithms, 2nd ed., chapter 48
 */
export const illuminatedFraction = (elongation: number): number =>
  elongation >= 0 && elongation <= 180 ? (1 - cosine(elongation)) / 2 : Number.NaN;

const sun = new Float64Array(2);
const moon = new Float64Array(2);

/** Angle between Moon and Sun, degrees, as seen from the centre of the Earth; range as for {@link moonLongitudeOfDate}. */
export const moonElongation = (julianDate: number): number => {
  sunIcrs(sun, julianDate);
  moonIcrs(moon, julianDate);
  const [sunRa = Number.NaN, sunDec = Number.NaN] = sun;
  const [moonRa = Number.NaN, moonDec = Number.NaN] = moon;
  return separation(sunRa, sunDec, moonRa, moonDec);
};

/** Illuminated fraction of the Moon at an instant, 0 to 1, to 0.004; range as for {@link moonLongitudeOfDate}. */
export const moonIllumination = (julianDate: number): number =>
  illuminatedFraction(moonElongation(julianDate));
