import type { CampaignSettings, CardSettings } from "./cards.ts";
import { detectableRadius, leastTransits, transitsInCampaign } from "./detection.ts";
import { hourlyNoiseOfSignal, noiseInOneHour } from "./noise.ts";
import { scaledAxis } from "./orbit.ts";
import type { RecipeSettings } from "./recipes.ts";
import { centralDuration, MEAN_CHORD } from "./transit.ts";

/** What a star brings to its reach; NaN is blank. */
export interface ReachStar {
  /** Magnitude in the passband of the card, mag. */
  readonly magnitude: number;
  /** R☉. */
  readonly radius: number;
  /** Any orbit of the star, au and days: it stands for the mass. */
  readonly earthDistance: number;
  readonly earthPeriod: number;
  /** F_target / F_total; NaN where it is not known. */
  readonly lightShare: number;
}

/** A period and the smallest planet found there, Earth radii; null where none is: too few transits, or a blank input. */
export interface ReachPoint {
  readonly periodDays: number;
  readonly rMin: number | null;
}

/**
 * Smallest planet by period: it steps up where one transit fewer fits, and ends where too few do. The duration follows
 * from the period and the star's density, by the recipe's impact parameter.
 *
 * @param periods days
 */
export const reachByPeriod = (
  star: ReachStar,
  card: CardSettings,
  campaign: CampaignSettings,
  recipe: RecipeSettings,
  periods: readonly number[],
): ReachPoint[] => {
  const noise = noiseInOneHour(card, star.magnitude);
  const chord = recipe.duration === "central" ? 1 : MEAN_CHORD;
  return periods.map((periodDays) => {
    const transits = transitsInCampaign(campaign, periodDays);
    if (!(transits >= leastTransits(campaign))) return { periodDays, rMin: null };
    // Same star: the axis scales as P^(2/3).
    const axis = star.earthDistance * (periodDays / star.earthPeriod) ** (2 / 3);
    const a = scaledAxis(axis, star.radius);
    const hours = chord * centralDuration(24 * periodDays, a);
    const { radius, lightShare } = star;
    const rMin = detectableRadius(
      campaign,
      recipe,
      radius,
      hourlyNoiseOfSignal(card, noise, hours),
      lightShare,
      transits,
      periodDays,
      a,
      hours,
    );
    return { periodDays, rMin: Number.isFinite(rMin) ? rMin : null };
  });
};
