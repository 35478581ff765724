import { normalTail, normalTailQuantile } from "./special-functions.ts";

/**
 * The statistic of repeated transits, and how large it must be.
 *
 * Jenkins 2002, ApJ 575, 493; Jenkins, Caldwell & Borucki 2002, ApJ 564, 495.
 */

/** Signal over noise of N transits together: `depth / σ_T √N`; depth and noise on the transit's time scale in one unit. */
export const multipleEventStatistic = (depth: number, noise: number, transits: number): number =>
  (depth / noise) * Math.sqrt(transits);

/**
 * Noise on another time scale: `σ_ref (T / T_ref)^β`.
 *
 * @param exponent β; −1/2 for white noise, larger with red noise
 * @example noiseOnTimescale(20, 6.5, 13.09548) // 14.0905 ppm
 */
export const noiseOnTimescale = (
  noise: number,
  referenceHours: number,
  hours: number,
  exponent = -0.5,
): number => noise * (hours / referenceHours) ** exponent;

/** False alarms that noise alone makes in that many independent tests: `n Q(threshold)`. */
export const falseAlarms = (threshold: number, tests: number): number => tests * normalTail(threshold);

/**
 * Threshold at which noise alone makes that many false alarms in n independent tests: the root of `n Q(x) = allowed`.
 *
 * About 1.7e7 tests for each of 1e5 stars, 1.7e12 in all, gave the customary 7.1 (from memory).
 *
 * @returns NaN where as many alarms are allowed as tests are made, or none at all
 * @example thresholdForTests(1.7e12) // 7.1081
 */
export const thresholdForTests = (tests: number, allowed = 1): number => normalTailQuantile(allowed / tests);
