import type { CampaignSettings } from "./cards.ts";
import { EARTH_RADII_PER_SOLAR } from "./constants.ts";
import { fullTransitDuration, transitDuration } from "./transit.ts";

/** Transits in a campaign: `floor(length × duty / period)`. */
export const transitsInCampaign = (campaign: CampaignSettings, periodDays: number): number =>
  Math.floor((campaign.lengthDays * campaign.duty) / periodDays);

/**
 * Radius of the smallest planet found, Earth radii: `R★ √(SNR σ_T / (√N share))`, with `σ_T = σ₁ₕ / √T` (white noise).
 *
 * @param radiusSolar radius of the star, R☉
 * @param snrLimit signal-to-noise ratio of a detection
 * @param noise1hPpm noise in one hour, ppm
 * @param transits N
 * @param durationHours time that carries the signal, h: the whole transit for a box
 * @param lightShare F_target / F_total
 * @see Jenkins 2002, ApJ 575, 493, for the multiple-event statistic that it inverts
 * @example smallestPlanet(1, 7.1, 50, 4, 1, 1) // 1.4532 to 4 digits
 */
export const smallestPlanet = (
  radiusSolar: number,
  snrLimit: number,
  noise1hPpm: number,
  transits: number,
  durationHours: number,
  lightShare: number,
): number =>
  EARTH_RADII_PER_SOLAR *
  radiusSolar *
  Math.sqrt((snrLimit * noise1hPpm * 1e-6) / (Math.sqrt(transits * durationHours) * lightShare));

/**
 * Time that carries the signal of a trapezoid, in the unit of the period: `(T14 + 2 T23) / 3`.
 *
 * @see Kipping 2023, arXiv:2305.06790: SNR ∝ δ/σ √((T14 + 2 T23)/3)
 */
export const trapezoidDuration = (period: number, a: number, k: number, b: number): number =>
  (transitDuration(period, a, k, b) + 2 * fullTransitDuration(period, a, k, b)) / 3;
