import { blankCode, PRESENT } from "#shared/catalogue/blank-reasons.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import { detectableRadius, leastTransits, transitsInCampaign } from "#shared/science/detection.ts";
import { brightestUsable, hourlyNoiseOfSignal, noiseInOneHour, noiseParts } from "#shared/science/noise.ts";
import { scaledAxis } from "#shared/science/orbit.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";

/** What the assessment of one star needs; NaN is blank. */
export interface AssessedStar {
  /** Magnitude in the passband of the card, mag. */
  magnitude: number;
  magnitudeError: number;
  /** R☉. */
  radius: number;
  /** Relative error of R★ T^(−1/4), by which the smallest planet scales. */
  reachError: number;
  /** Orbit where the insolation is Earth's: au and days. */
  earthDistance: number;
  earthPeriod: number;
  /** Duration of a transit there, by the recipe, h. */
  duration: number;
  /** F_target / F_total; NaN where it is not known: the result then holds for the star alone. */
  lightShare: number;
}

/** Values are NaN exactly where the blank code beside them is not 0; `rMinError` also where an input has no error. */
export interface Assessment {
  noise1h: number;
  noiseBlank: number;
  transits: number;
  transitsBlank: number;
  rMin: number;
  rMinError: number;
  rMinBlank: number;
}

const NEEDS_MAGNITUDE = blankCode("needs-card-magnitude");
const TOO_BRIGHT = blankCode("too-bright");
const TOO_FAINT = blankCode("too-faint");
const NEEDS_ORBIT = blankCode("needs-orbit");
const NEEDS_RADIUS = blankCode("needs-radius");
const TOO_FEW_TRANSITS = blankCode("too-few-transits");
const OUTSIDE_LIGHT_SHARE = blankCode("outside-light-share");

export const newAssessment = (): Assessment => ({
  noise1h: Number.NaN,
  noiseBlank: PRESENT,
  transits: Number.NaN,
  transitsBlank: PRESENT,
  rMin: Number.NaN,
  rMinError: Number.NaN,
  rMinBlank: PRESENT,
});

const noiseBlank = (card: CardSettings, magnitude: number): number => {
  if (Number.isNaN(magnitude)) return NEEDS_MAGNITUDE;
  if (magnitude > card.faintLimit) return TOO_FAINT;
  return magnitude >= brightestUsable(card) ? PRESENT : TOO_BRIGHT;
};

const rMinBlank = (star: AssessedStar, campaign: CampaignSettings, result: Assessment): number => {
  if (Number.isNaN(star.radius)) return NEEDS_RADIUS;
  if (result.noiseBlank !== PRESENT) return result.noiseBlank;
  if (result.transitsBlank !== PRESENT || !(star.duration > 0)) return NEEDS_ORBIT;
  if (result.transits < leastTransits(campaign)) return TOO_FEW_TRANSITS;
  return star.lightShare <= 0 || star.lightShare > 1 ? OUTSIDE_LIGHT_SHARE : PRESENT;
};

/** One star as one instrument sees it in one campaign. Writes into `result` and returns it: nothing is allocated. */
export const assessStar = (
  star: AssessedStar,
  card: CardSettings,
  campaign: CampaignSettings,
  recipe: RecipeSettings,
  result: Assessment,
): Assessment => {
  result.noiseBlank = noiseBlank(card, star.magnitude);
  result.noise1h = result.noiseBlank === PRESENT ? noiseInOneHour(card, star.magnitude) : Number.NaN;
  result.transitsBlank = star.earthPeriod > 0 ? PRESENT : NEEDS_ORBIT;
  result.transits =
    result.transitsBlank === PRESENT ? transitsInCampaign(campaign, star.earthPeriod) : Number.NaN;
  result.rMin = Number.NaN;
  result.rMinError = Number.NaN;
  result.rMinBlank = rMinBlank(star, campaign, result);
  if (result.rMinBlank !== PRESENT) return result;
  const { radius, lightShare, earthPeriod, duration } = star;
  result.rMin = detectableRadius(
    campaign,
    recipe,
    radius,
    hourlyNoiseOfSignal(card, result.noise1h, duration),
    lightShare,
    result.transits,
    earthPeriod,
    scaledAxis(star.earthDistance, radius),
    duration,
  );
  result.rMinError = result.rMin * Math.hypot(star.reachError, reachErrorByNoise(star, card, result.noise1h));
  return result;
};

/** Half the step of magnitude over which the noise is seen to change, mag. */
const STEP_MAG = 0.01;

/**
 * Relative error of the smallest planet by that of the magnitude, through the noise; a magnitude without one counts as
 * exact, as the card does.
 */
export const reachErrorByNoise = (star: AssessedStar, card: CardSettings, noise: number): number =>
  star.magnitudeError > 0 ? (0.5 * noiseSlope(card, star.magnitude) * star.magnitudeError) / noise : 0;

/** ppm per mag. */
const noiseSlope = (card: CardSettings, magnitude: number): number =>
  (noiseParts(card, magnitude + STEP_MAG).total - noiseParts(card, magnitude - STEP_MAG).total) /
  (2 * STEP_MAG);
