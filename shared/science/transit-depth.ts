import { chordBrightness, type LimbDarkening, relativeBrightness } from "./limb-darkening.ts";

/**
 * Depths with limb darkening of a planet so small that the star is evenly bright under it. Error below 0.1 % to b = 0.5, 2.3 %
 * at b = 0.9, for k = 0.1. Where the planet's disc leaves the star's, b > 1 − k, there is none: see the light curve.
 *
 * Mandel & Agol 2002, ApJ 580, L171, section 5; Heller 2019, A&A 623, A137.
 */

const liesWithin = (k: number, b: number): boolean => k > 0 && Math.abs(b) <= 1 - k;

/** Depth at mid-transit, ppm: `10⁶ k² I(μ_b) / ⟨I⟩`; NaN where the transit grazes. */
export const midTransitDepthPpm = (k: number, darkening: LimbDarkening, b: number): number =>
  liesWithin(k, b) ? 1e6 * k * k * relativeBrightness(darkening, b) : Number.NaN;

/** Mean depth along the chord, ppm: what a box sees; NaN where the transit grazes. */
export const boxDepthPpm = (k: number, { u1, u2 }: LimbDarkening, b: number): number =>
  liesWithin(k, b) ? 1e6 * k * k * chordBrightness(u1, u2, b) : Number.NaN;
