import { wrapDegrees } from "./angles.ts";
import { centuriesFromJ2000, J2000_JD } from "./epoch.ts";

/**
 * Greenwich mean sidereal time, degrees, 0 to 360.
 *
 * @param julianDate UT1; with UTC the error is up to 0.004°. Within some centuries of J2000.0: against IAU 2006 it is off
 *   by 2e-5° in 2026
 * @see Meeus 1998, Astronomical Algorithms, 2nd ed., eq. 12.4 (IAU 1982)
 */
export const greenwichSiderealTime = (julianDate: number): number => {
  const t = centuriesFromJ2000(julianDate);
  return wrapDegrees(
    280.46061837 + 360.98564736629 * (julianDate - J2000_JD) + t * t * (0.000387933 - t / 38_710_000),
  );
};

/** Local mean sidereal time, degrees, 0 to 360, at a longitude counted east of Greenwich in degrees. */
export const localSiderealTime = (julianDate: number, eastLongitude: number): number =>
  wrapDegrees(greenwichSiderealTime(julianDate) + eastLongitude);

/**
 * Earth rotation angle, degrees, 0 to 360: exact by definition.
 *
 * @param julianDate UT1
 * @see Capitaine, Guinot & McCarthy 2000, A&A 355, 398 (IAU 2000)
 */
export const earthRotationAngle = (julianDate: number): number => {
  const days = julianDate - J2000_JD;
  // The whole turns are taken off first, so that no digits go with them.
  return wrapDegrees(360 * (0.779057273264 + 0.00273781191135448 * days + (days % 1)));
};
