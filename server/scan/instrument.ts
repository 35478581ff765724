import { type AssessedStar, type Assessment, assessStar, newAssessment } from "#server/assess/assess.ts";
import { REACH_ERROR_KEY } from "#server/derive/star-columns.ts";
import { errorKey } from "#shared/catalogue/columns.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";

/** How stars are seen: by one card in one campaign. Without a campaign only the noise is known. */
export interface Instrument {
  recipe: RecipeSettings;
  card: CardSettings;
  campaign: CampaignSettings | null;
}

/** Stands in where no campaign is chosen; what depends on it is then left blank. */
const ANY_CAMPAIGN: CampaignSettings = {
  lengthDays: 1,
  duty: 1,
  leastTransits: 1,
  snrLimit: 1,
  statistic: "boxcar",
};

export const assessedStar = (value: (key: string) => number, card: CardSettings): AssessedStar => ({
  magnitude: value(card.passband),
  magnitudeError: value(errorKey(card.passband)),
  radius: value("radius"),
  reachError: value(REACH_ERROR_KEY),
  earthDistance: value("earth_distance"),
  earthPeriod: value("earth_period"),
  duration: value("transit_duration"),
  lightShare: value("light_share"),
});

/**
 * The instrument's quantities of one star after another. The answer is reused: read it before asking again.
 */
export const createAssessor = ({
  recipe,
  card,
  campaign,
}: Instrument): ((value: (key: string) => number) => Assessment) => {
  const result = newAssessment();
  return (value) => {
    assessStar(assessedStar(value, card), card, campaign ?? ANY_CAMPAIGN, recipe, result);
    if (campaign) return result;
    result.transits = Number.NaN;
    result.rMin = Number.NaN;
    result.rMinError = Number.NaN;
    return result;
  };
};
