/** Julian date of J2000.0 (2000-01-01 12h TT). */
export const J2000_JD = 2_451_545;
/** Days in a Julian year; a Julian century has a hundred of them. */
export const JULIAN_YEAR_D = 365.25;

/** Julian epoch, such as 2016.0, of a Julian date. */
export const julianEpoch = (julianDate: number): number => 2000 + (julianDate - J2000_JD) / JULIAN_YEAR_D;

/** Julian date of a Julian epoch such as 1991.25: the inverse of {@link julianEpoch}. */
export const julianDateOfEpoch = (epoch: number): number => J2000_JD + (epoch - 2000) * JULIAN_YEAR_D;

/**
 * Julian date of a Besselian epoch, such as the B1950.0 of plate catalogues.
 *
 * @see Lieske 1979, A&A 73, 282: tropical years of 365.242198781 days, counted from 2415020.31352 = B1900.0
 */
export const julianDateOfBesselianEpoch = (epoch: number): number =>
  2_415_020.313_52 + (epoch - 1900) * 365.242_198_781;

/**
 * Julian date of an instant given as milliseconds since 1970 (UTC). UTC stands for UT1, within 0.9 s, and for TT, within
 * about 70 s in this century: 0.004° for the hour angle, 0.01° for the Moon.
 */
export const julianDateOfInstant = (unixMs: number): number => 2_440_587.5 + unixMs / 86_400_000;

/** Julian centuries from J2000.0. */
export const centuriesFromJ2000 = (julianDate: number): number =>
  (julianDate - J2000_JD) / (100 * JULIAN_YEAR_D);
