import { blankCode } from "#shared/catalogue/blank-reasons.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import { EARTH_RADII_PER_SOLAR } from "#shared/science/constants.ts";
import { smallestPlanet, transitsInCampaign, trapezoidDuration } from "#shared/science/detection.ts";
import { noiseInOneHour } from "#shared/science/noise.ts";
import { scaledAxis } from "#shared/science/orbit.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import { centralDuration, MEAN_CHORD } from "#shared/science/transit.ts";

/** What the assessment of one star needs; NaN is blank. */
export interface AssessedStar {
  /** Magnitude in the passband of the card, mag. */
  magnitude: number;
  /** R☉ and its error. */
  radius: number;
  radiusError: number;
  /** Orbit where the insolation is Earth's: au and days. */
  earthDistance: number;
  earthPeriod: number;
  /** Duration of a transit there, by the recipe, h. */
  duration: number;
  /** F_target / F_total; NaN where it is not known: the result then holds for the star alone. */
  lightShare: number;
}

export interface Assessment {
  noise1h: number;
  noiseBlank: number;
  transits: number;
  transitsBlank: number;
  rMin: number;
  rMinError: number;
  rMinBlank: number;
}

const noiseBlank = (card: CardSettings, magnitude: number): number => {
  if (Number.isNaN(magnitude)) return blankCode("needs-card-magnitude");
  if (magnitude < card.brightLimit) return blankCode("too-bright");
  return magnitude > card.faintLimit ? blankCode("too-faint") : 0;
};

/**
 * Time that carries the signal, h. A box takes the recipe's duration; a trapezoid takes (T14 + 2 T23) / 3 of a planet of
 * the radius that a box would find, at the recipe's impact parameter (mean chord: b = √(1 − (π/4)²)).
 */
const signalHours = (
  star: AssessedStar,
  campaign: CampaignSettings,
  recipe: Recipe,
  boxRadius: number,
): number => {
  if (campaign.statistic === "boxcar") return star.duration;
  const a = scaledAxis(star.earthDistance, star.radius);
  const k = boxRadius / (EARTH_RADII_PER_SOLAR * star.radius);
  const b = recipe.duration === "central" ? 0 : Math.sqrt(1 - MEAN_CHORD ** 2);
  return trapezoidDuration(24 * star.earthPeriod, a, k, b);
};

/** One star as one instrument sees it in one campaign. Writes into `result` and returns it: nothing is allocated. */
export const assessStar = (
  star: AssessedStar,
  card: CardSettings,
  campaign: CampaignSettings,
  recipe: Recipe,
  result: Assessment,
): Assessment => {
  result.noise1h = noiseInOneHour(card, star.magnitude);
  result.noiseBlank = noiseBlank(card, star.magnitude);
  result.transits = transitsInCampaign(campaign, star.earthPeriod);
  result.transitsBlank = Number.isNaN(result.transits) ? blankCode("needs-orbit") : 0;
  result.rMin = Number.NaN;
  result.rMinError = Number.NaN;
  result.rMinBlank = rMinBlank(star, campaign, result);
  if (result.rMinBlank !== 0) return result;
  const share = Number.isNaN(star.lightShare) ? 1 : star.lightShare;
  const box = smallestPlanet(
    star.radius,
    campaign.snrLimit,
    result.noise1h,
    result.transits,
    star.duration,
    share,
  );
  const hours = signalHours(star, campaign, recipe, box);
  result.rMin =
    hours === star.duration
      ? box
      : smallestPlanet(star.radius, campaign.snrLimit, result.noise1h, result.transits, hours, share);
  // R_min ∝ R★; the noise carries no error of its own, and the duration enters by its fourth root.
  result.rMinError = (result.rMin * star.radiusError) / star.radius;
  return result;
};

const rMinBlank = (star: AssessedStar, campaign: CampaignSettings, result: Assessment): number => {
  if (Number.isNaN(star.radius)) return blankCode("needs-radius");
  if (result.noiseBlank !== 0) return result.noiseBlank;
  if (result.transitsBlank !== 0 || Number.isNaN(star.duration)) return blankCode("needs-orbit");
  return result.transits < Math.max(1, campaign.leastTransits) ? blankCode("too-few-transits") : 0;
};

export const newAssessment = (): Assessment => ({
  noise1h: Number.NaN,
  noiseBlank: 0,
  transits: Number.NaN,
  transitsBlank: 0,
  rMin: Number.NaN,
  rMinError: Number.NaN,
  rMinBlank: 0,
});

/** A period and the smallest planet found there, Earth radii; null where too few transits fit. */
export interface ReachPoint {
  periodDays: number;
  rMin: number | null;
}

/**
 * Smallest planet by period, for the star sheet: steps where one transit fewer fits, and ends where too few do. The
 * duration follows from the period and the star's density, by the recipe's impact parameter.
 */
export const reachByPeriod = (
  star: AssessedStar,
  card: CardSettings,
  campaign: CampaignSettings,
  recipe: Recipe,
  periods: readonly number[],
): ReachPoint[] => {
  const noise = noiseInOneHour(card, star.magnitude);
  const share = Number.isNaN(star.lightShare) ? 1 : star.lightShare;
  const chord = recipe.duration === "central" ? 1 : MEAN_CHORD;
  return periods.map((periodDays) => {
    const transits = transitsInCampaign(campaign, periodDays);
    // Same star: the axis scales as P^(2/3) from the orbit of Earth's insolation.
    const axis = star.earthDistance * (periodDays / star.earthPeriod) ** (2 / 3);
    const hours = chord * centralDuration(24 * periodDays, scaledAxis(axis, star.radius));
    const rMin = smallestPlanet(star.radius, campaign.snrLimit, noise, transits, hours, share);
    const isFound = transits >= Math.max(1, campaign.leastTransits) && Number.isFinite(rMin);
    return { periodDays, rMin: isFound ? rMin : null };
  });
};
