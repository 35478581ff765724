/**
 * Constants, each with its source. Solar and planetary values are the nominal conversion constants of IAU 2015
 * Resolution B3 (Prša et al. 2016, AJ 152, 41): exact by convention.
 */

/** Nominal solar radius, m (IAU 2015 B3). */
export const SOLAR_RADIUS_M = 6.957e8;
/** Nominal solar mass parameter (GM), m³ s⁻² (IAU 2015 B3). Used in place of G times a mass, as G is known to 22 ppm only. */
export const SOLAR_GM = 1.3271244e20;
/** Nominal solar effective temperature, K (IAU 2015 B3). */
export const SOLAR_TEFF_K = 5772;
/** Nominal equatorial radius of the Earth, m (IAU 2015 B3). */
export const EARTH_RADIUS_M = 6.3781e6;
/** Nominal equatorial radius of Jupiter, m (IAU 2015 B3). */
export const JUPITER_RADIUS_M = 7.1492e7;
/** Astronomical unit, m (IAU 2012 B2). */
export const AU_M = 149_597_870_700;
/** Absolute bolometric magnitude of the Sun (IAU 2015 B2: −2.5 log(L☉ / 3.0128e28 W) = 4.739996). */
export const SOLAR_MBOL = 4.74;
/** Seconds in a day. */
export const DAY_S = 86_400;

/** Astronomical units in solar radii: 215.03215567. */
export const AU_PER_SOLAR_RADIUS = AU_M / SOLAR_RADIUS_M;
/** Earth radii in a solar radius: 109.0764. */
export const EARTH_RADII_PER_SOLAR = SOLAR_RADIUS_M / EARTH_RADIUS_M;
/** Period of a massless planet at 1 au from one nominal solar mass, days: 365.2568984 (the Gaussian year, not 365.25). */
export const GAUSSIAN_YEAR_D = (2 * Math.PI * Math.sqrt(AU_M ** 3 / SOLAR_GM)) / DAY_S;
