import { type LimbDarkening, relativeBrightness } from "./limb-darkening.ts";

/**
 * Area of the overlap of two discs, over the area of the larger (radius 1): the share of the star that a planet of radius
 * k covers at distance z between their centres.
 */
const coveredShare = (k: number, z: number): number => {
  if (z >= 1 + k) return 0;
  if (z <= 1 - k) return k * k;
  const star = Math.acos(Math.min(1, Math.max(-1, (1 - k * k + z * z) / (2 * z))));
  const planet = Math.acos(Math.min(1, Math.max(-1, (k * k + z * z - 1) / (2 * z * k))));
  const kite = 0.5 * Math.sqrt(Math.max(0, 4 * z * z - (1 + z * z - k * k) ** 2));
  return (k * k * planet + star - kite) / Math.PI;
};

/**
 * Loss of light at a time from mid-transit, ppm, for a small planet on a circular orbit: the covered area times the
 * brightness under it. Fit for drawing: at the limb the brightness is taken where the planet's inner half lies.
 *
 * @param hours time from mid-transit, h
 * @param periodHours period, h
 * @param a semi-major axis over stellar radius
 * @param k planet's radius over star's
 * @param b impact parameter
 */
export const transitLossPpm = (
  hours: number,
  periodHours: number,
  a: number,
  k: number,
  b: number,
  darkening: LimbDarkening,
): number => {
  const phase = (2 * Math.PI * hours) / periodHours;
  // On the far half of its orbit the planet passes behind the star.
  if (Math.cos(phase) <= 0) return 0;
  const z = Math.hypot(a * Math.sin(phase), b * Math.cos(phase));
  const covered = coveredShare(k, z);
  return covered === 0 ? 0 : 1e6 * covered * relativeBrightness(darkening, Math.min(z, 1 - k / 2));
};
