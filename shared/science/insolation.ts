/** What a planet receives, and how warm it would be without an atmosphere. */

/** Insolation at a distance of d au, in units of what Earth receives: `L / d²`, L in L☉. */
export const insolationAtDistance = (luminositySolar: number, distanceAu: number): number =>
  luminositySolar / (distanceAu * distanceAu);

/** Mean insolation over an orbit of semi-major axis a au: `L / (a² √(1 − e²))`; NaN for e outside 0 to below 1. */
export const meanInsolation = (luminositySolar: number, axisAu: number, e: number): number =>
  e >= 0 && e < 1 ? insolationAtDistance(luminositySolar, axisAu) / Math.sqrt(1 - e * e) : Number.NaN;

/**
 * Equilibrium temperature, K, with the heat spread over the whole planet: `Teff √(1 / 2a) (1 − A)^(1/4) (1 − e²)^(−1/8)`.
 *
 * @param a semi-major axis over stellar radius, above 1
 * @param albedo Bond albedo A, 0 to 1
 * @param e eccentricity; the temperature is that of the mean insolation
 * @returns NaN outside these ranges
 * @see Winn 2010, arXiv:1001.2010, section 3 (from memory); the factor of e follows from {@link meanInsolation}
 * @example equilibriumTemperature(5772, 215.032156, 0.3) // 254.586
 */
export const equilibriumTemperature = (teffK: number, a: number, albedo: number, e = 0): number =>
  a * (1 - e) > 1 && e >= 0 && e < 1 && albedo >= 0 && albedo <= 1
    ? teffK * Math.sqrt(1 / (2 * a)) * (1 - albedo) ** 0.25 * (1 - e * e) ** -0.125
    : Number.NaN;
