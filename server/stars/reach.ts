import { assessedStar } from "#server/scan/instrument.ts";
import type { ResolvedView } from "#server/scan/resolve.ts";
import type { StarSheet } from "#shared/api/stars.ts";
import { reachByPeriod } from "#shared/science/reach.ts";

const SHORTEST_DAYS = 0.5;
const POINTS = 120;
/** Steps of fewer transits are drawn as steps up to this number of transits. */
const STEPS = 30;

/** Periods to draw by: evenly spread in the logarithm, and both sides of each period at which a transit is lost. */
const periodsUpTo = (longestDays: number): number[] => {
  const ratio = longestDays / SHORTEST_DAYS;
  if (!(ratio > 1)) return [];
  const even = Array.from({ length: POINTS }, (_, i) => SHORTEST_DAYS * ratio ** (i / (POINTS - 1)));
  const steps = Array.from({ length: STEPS }, (_, i) => longestDays / (i + 1)).flatMap((p) => [
    p * (1 - 1e-9),
    p * (1 + 1e-9),
  ]);
  return [...even, ...steps].filter((p) => p >= SHORTEST_DAYS).sort((a, b) => a - b);
};

/** The smallest planet this instrument would find around the star, by period; empty where that is not known. */
export const reachOf = (
  resolved: ResolvedView,
  values: Readonly<Record<string, number>>,
): StarSheet["reach"] => {
  const { card, campaign, recipe } = resolved;
  // Where the noise is blank, the star lies outside the limits of the card.
  if (!card || !campaign || values.noise_1h === undefined) return [];
  const star = assessedStar((key) => values[key] ?? Number.NaN, card.settings);
  if (![star.radius, star.earthDistance, star.earthPeriod].every(Number.isFinite)) return [];
  const { lengthDays, duty } = campaign.settings;
  return reachByPeriod(
    star,
    card.settings,
    campaign.settings,
    recipe.settings,
    periodsUpTo(lengthDays * duty),
  );
};
