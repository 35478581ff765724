import type { CampaignSettings } from "./cards.ts";
import { EARTH_RADII_PER_SOLAR } from "./constants.ts";
import type { RecipeSettings } from "./recipes.ts";
import { fullTransitDuration, MEAN_CHORD, transitDuration } from "./transit.ts";

/** Rounding of decimal settings in binary: 100 d × 0.29 is 28.999999999999996 d, and 29 d must fit into it once. */
const ROUNDING = 1e-12;

/** Transits in a campaign: `floor(length × duty / period)`. */
export const transitsInCampaign = (campaign: CampaignSettings, periodDays: number): number =>
  Math.floor(((campaign.lengthDays * campaign.duty) / periodDays) * (1 + ROUNDING));

/**
 * Radius of the smallest planet found, Earth radii: `R★ √(SNR σ_T / (√N share boost))`, with `σ_T = σ₁ₕ / √T` (white noise).
 *
 * @param radiusSolar radius of the star, R☉
 * @param snrLimit signal-to-noise ratio of a detection
 * @param noise1hPpm noise in one hour, ppm
 * @param transits N
 * @param durationHours time that carries the signal, h: the whole transit for a box
 * @param lightShare F_target / F_total
 * @param boost depth over k² by limb darkening; 1 leaves it out
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
  boost = 1,
): number =>
  EARTH_RADII_PER_SOLAR *
  radiusSolar *
  Math.sqrt((snrLimit * noise1hPpm * 1e-6) / (Math.sqrt(transits * durationHours) * lightShare * boost));

/**
 * Time that carries the signal of a trapezoid, in the unit of the period: `(T14 + 2 T23) / 3`.
 *
 * @see Kipping 2023, arXiv:2305.06790: SNR ∝ δ/σ √((T14 + 2 T23)/3)
 */
export const trapezoidDuration = (period: number, a: number, k: number, b: number): number =>
  (transitDuration(period, a, k, b) + 2 * fullTransitDuration(period, a, k, b)) / 3;

/** Least transits with which a planet counts as found: at least one, whatever the campaign asks. */
export const leastTransits = (campaign: CampaignSettings): number => Math.max(1, campaign.leastTransits);

/** How a signal is weighed: the recipe may overrule the campaign. */
export const statisticOf = (
  campaign: CampaignSettings,
  { statistic }: RecipeSettings,
): CampaignSettings["statistic"] => (statistic === "campaign" ? campaign.statistic : statistic);

/** Impact parameter of the mean chord, √(1 − (π/4)²). */
export const MEAN_CHORD_IMPACT = Math.sqrt(1 - MEAN_CHORD ** 2);

/**
 * Radius of the smallest planet found on one orbit, Earth radii, by the campaign's statistic. A box weighs the whole
 * `boxHours`. A trapezoid weighs (T14 + 2 T23) / 3 of a planet of the radius that a box would find, at the impact
 * parameter of the recipe's duration.
 *
 * @param a semi-major axis over stellar radius
 * @param boxHours duration by the recipe, h
 * @param lightShare F_target / F_total, above 0 to 1; NaN where it is not known: the star then counts as alone
 */
export const detectableRadius = (
  campaign: CampaignSettings,
  recipe: RecipeSettings,
  radiusSolar: number,
  noise1hPpm: number,
  lightShare: number,
  transits: number,
  periodDays: number,
  a: number,
  boxHours: number,
): number => {
  const share = Number.isNaN(lightShare) ? 1 : lightShare;
  const box = smallestPlanet(radiusSolar, campaign.snrLimit, noise1hPpm, transits, boxHours, share);
  if (statisticOf(campaign, recipe) === "boxcar") return box;
  const b = recipe.duration === "central" ? 0 : MEAN_CHORD_IMPACT;
  const hours = trapezoidDuration(24 * periodDays, a, box / (EARTH_RADII_PER_SOLAR * radiusSolar), b);
  return smallestPlanet(radiusSolar, campaign.snrLimit, noise1hPpm, transits, hours, share);
};
