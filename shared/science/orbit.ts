import { AU_PER_SOLAR_RADIUS, GAUSSIAN_YEAR_D } from "./constants.ts";

/** Radians in a degree. */
export const RADIANS_PER_DEGREE = Math.PI / 180;

/** Period of a light planet, days: Kepler's third law, `365.2568984 √(a³ / M)`, a in au, M in M☉. */
export const periodFromAxis = (axisAu: number, massSolar: number): number =>
  GAUSSIAN_YEAR_D * Math.sqrt((axisAu * axisAu * axisAu) / massSolar);

/** Semi-major axis, au, of a light planet with that period in days: the inverse of {@link periodFromAxis}. */
export const axisFromPeriod = (periodDays: number, massSolar: number): number =>
  Math.cbrt(massSolar * (periodDays / GAUSSIAN_YEAR_D) ** 2);

/** Semi-major axis in units of the stellar radius. */
export const scaledAxis = (axisAu: number, radiusSolar: number): number =>
  (axisAu * AU_PER_SOLAR_RADIUS) / radiusSolar;

/**
 * Semi-major axis in stellar radii from the star's mean density (ρ☉) and a period in days: Kepler's third law once more,
 * in which mass and radius stand only as `M / R³`.
 *
 * @see Seager & Mallén-Ornelas 2003, ApJ 585, 1038, eq. 9
 */
export const scaledAxisFromDensity = (periodDays: number, densitySolar: number): number =>
  AU_PER_SOLAR_RADIUS * Math.cbrt(densitySolar * (periodDays / GAUSSIAN_YEAR_D) ** 2);

/** Mean density of the star, ρ☉, from a circular orbit: the inverse of {@link scaledAxisFromDensity}. */
export const densityFromScaledAxis = (periodDays: number, a: number): number =>
  (a / AU_PER_SOLAR_RADIUS) ** 3 / (periodDays / GAUSSIAN_YEAR_D) ** 2;

/** Whether an orbit of that eccentricity is closed. */
export const isClosed = (eccentricity: number): boolean => eccentricity >= 0 && eccentricity < 1;

/**
 * Distance from the star at a true anomaly f, in the unit of a: `a (1 − e²) / (1 + e cos f)`.
 *
 * @returns NaN for an eccentricity outside 0 to below 1
 * @see Winn 2010, arXiv:1001.2010, eq. 1
 */
export const distanceAtAnomaly = (a: number, eccentricity: number, anomalyDeg: number): number =>
  isClosed(eccentricity)
    ? (a * (1 - eccentricity * eccentricity)) / (1 + eccentricity * Math.cos(anomalyDeg * RADIANS_PER_DEGREE))
    : Number.NaN;

/**
 * Separation of planet and star on the sky at a distance r and true anomaly f, in the unit of r:
 * `r √(1 − sin²(ω + f) sin² i)`. Before and behind the star alike; the planet is in front where `sin(ω + f) > 0`.
 *
 * @param omegaDeg argument of periastron of the star's orbit, degrees
 * @see Winn 2010, arXiv:1001.2010, eq. 5
 */
export const skySeparation = (
  r: number,
  omegaDeg: number,
  anomalyDeg: number,
  inclinationDeg: number,
): number => {
  const depth =
    Math.sin((omegaDeg + anomalyDeg) * RADIANS_PER_DEGREE) * Math.sin(inclinationDeg * RADIANS_PER_DEGREE);
  // 1 − x² as a product keeps its digits where the planet stands before the star and x is almost 1.
  return r * Math.sqrt((1 - depth) * (1 + depth));
};

/** Steps after which Newton's method has long converged; e = 0.99 takes about 10. */
const MOST_STEPS = 60;

/**
 * Eccentric anomaly E of a mean anomaly M, radians: the root of Kepler's equation, `E − e sin E = M`, by Newton's method
 * from the start of Danby 1988, Fundamentals of Celestial Mechanics, 6.6 (from memory).
 *
 * @returns NaN for an eccentricity outside 0 to below 1
 */
export const eccentricAnomaly = (meanAnomaly: number, eccentricity: number): number => {
  if (!isClosed(eccentricity)) return Number.NaN;
  const turns = 2 * Math.PI * Math.round(meanAnomaly / (2 * Math.PI));
  const mean = meanAnomaly - turns;
  let anomaly = mean + 0.85 * eccentricity * Math.sign(mean);
  for (let i = 0; i < MOST_STEPS; i++) {
    const step = (anomaly - eccentricity * Math.sin(anomaly) - mean) / (1 - eccentricity * Math.cos(anomaly));
    anomaly -= step;
    if (Math.abs(step) < 1e-14) break;
  }
  return anomaly + turns;
};

/** Factor between the tangents of half the true and half the eccentric anomaly: `√((1 + e) / (1 − e))`. */
const halfAngleFactor = (eccentricity: number): number => Math.sqrt((1 + eccentricity) / (1 - eccentricity));

/** True anomaly, degrees, −180 to 180, of a mean anomaly in degrees; see {@link eccentricAnomaly}. */
export const trueAnomaly = (meanAnomalyDeg: number, eccentricity: number): number => {
  const half = eccentricAnomaly(meanAnomalyDeg * RADIANS_PER_DEGREE, eccentricity) / 2;
  return (2 / RADIANS_PER_DEGREE) * Math.atan(halfAngleFactor(eccentricity) * Math.tan(half));
};

/** Mean anomaly, degrees, −180 to 180, of a true anomaly in degrees: the inverse of {@link trueAnomaly}. */
export const meanAnomaly = (trueAnomalyDeg: number, eccentricity: number): number => {
  if (!isClosed(eccentricity)) return Number.NaN;
  const half = Math.tan((trueAnomalyDeg * RADIANS_PER_DEGREE) / 2);
  const eccentric = 2 * Math.atan(half / halfAngleFactor(eccentricity));
  return (eccentric - eccentricity * Math.sin(eccentric)) / RADIANS_PER_DEGREE;
};
