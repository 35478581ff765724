import { type LimbDarkening, meanBrightness } from "./limb-darkening.ts";
import { distanceAtAnomaly, meanAnomaly, RADIANS_PER_DEGREE, skySeparation, trueAnomaly } from "./orbit.ts";
import { inclinationFromImpact } from "./transit.ts";

/** Steps of Simpson's rule across the planet: errors of a depth below 1e-6 of it. */
const STEPS = 64;

/** Brightness at distance r from the centre of the disc, over that of the centre. */
const brightness = (u1: number, u2: number, r: number): number => {
  const edge = 1 - Math.sqrt(Math.max(0, 1 - r * r));
  return 1 - edge * (u1 + u2 * edge);
};

/** Light within r of the centre, in units of π times the central brightness. */
const lightWithin = (u1: number, u2: number, r: number): number => {
  const mu = Math.sqrt(1 - r * r);
  const part = (power: number): number => (2 / power) * (1 - mu ** power);
  return (1 - u1 - u2) * part(2) + (u1 + 2 * u2) * part(3) - u2 * part(4);
};

/** Share of a ring of radius r that a disc of radius k at distance z covers, 0 to 1. */
const ringShare = (r: number, k: number, z: number): number =>
  Math.acos(Math.min(1, Math.max(-1, (r * r + z * z - k * k) / (2 * r * z)))) / Math.PI;

/** Light that the planet takes from rings that it covers in part. */
const lightOfRings = (u1: number, u2: number, k: number, z: number): number => {
  const [inner, outer] = [Math.abs(z - k), Math.min(1, z + k)];
  const half = (outer - inner) / 2;
  if (!(half > 0)) return 0;
  let sum = 0;
  // r = middle − half cos θ: the square roots at both edges become smooth, and Simpson's rule converges fast.
  for (let i = 1; i < STEPS; i++) {
    const theta = (Math.PI * i) / STEPS;
    const r = inner + half * (1 - Math.cos(theta));
    sum += (i % 2 === 1 ? 4 : 2) * Math.sin(theta) * r * brightness(u1, u2, r) * ringShare(r, k, z);
  }
  return (2 * half * Math.PI * sum) / (3 * STEPS);
};

/**
 * Share of the star's light behind a dark disc of radius k whose centre is z from the star's, both in stellar radii; exact
 * for quadratic limb darkening, also where the disc lies across the limb.
 *
 * @see Mandel & Agol 2002, ApJ 580, L171, for the closed form that it equals
 * @example 1e6 * coveredLight(0.1, 0.9, 0.3508, 0.2223) // 8450.6
 */
export const coveredLight = (k: number, z: number, u1: number, u2: number): number => {
  if (z >= 1 + k) return 0;
  const whole = z < k ? lightWithin(u1, u2, Math.min(1, k - z)) : 0;
  return (whole + lightOfRings(u1, u2, k, z)) / meanBrightness(u1, u2);
};

/**
 * Loss of light at a time from conjunction, ppm, in transit; 0 while the planet passes behind the star. Grazing transits and
 * eccentric orbits are no exception.
 *
 * @param hours time from conjunction, h
 * @param periodHours period, h
 * @param a semi-major axis over stellar radius
 * @param k planet's radius over star's
 * @param b impact parameter at conjunction
 * @param e eccentricity
 * @param omegaDeg argument of periastron of the star's orbit, degrees
 * @returns NaN where the orbit meets the star or is open
 */
export const transitLossPpm = (
  hours: number,
  periodHours: number,
  a: number,
  k: number,
  b: number,
  darkening: LimbDarkening,
  e = 0,
  omegaDeg = 0,
): number => {
  if (!(a * (1 - e) > 1)) return Number.NaN;
  const inclination = inclinationFromImpact(b, a, e, omegaDeg);
  const anomaly = trueAnomaly(meanAnomaly(90 - omegaDeg, e) + (360 * hours) / periodHours, e);
  if (Math.sin((omegaDeg + anomaly) * RADIANS_PER_DEGREE) <= 0) return 0;
  const z = skySeparation(distanceAtAnomaly(a, e, anomaly), omegaDeg, anomaly, inclination);
  return 1e6 * coveredLight(k, z, darkening.u1, darkening.u2);
};
