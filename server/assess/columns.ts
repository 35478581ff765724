import { REACH_ERROR_KEY } from "#server/derive/star-columns.ts";
import { errorKey } from "#shared/catalogue/columns.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { type AssessedStar, assessStar, newAssessment } from "./assess.ts";

/** Star columns that an assessment reads, by key; NaN is blank. A missing column counts as blank throughout. */
export type AssessedColumns = Readonly<Record<string, Float64Array | undefined>>;

/** The instrument quantities of a block of stars; the keys are those of the column registry. */
export interface InstrumentColumns {
  readonly noise_1h: Float64Array;
  readonly noise_1h_blank: Uint8Array;
  readonly transits: Float64Array;
  readonly transits_blank: Uint8Array;
  readonly r_min: Float64Array;
  readonly r_min_err: Float64Array;
  readonly r_min_blank: Uint8Array;
}

/** Keys of the columns to read for that card. */
export const assessedKeys = (card: CardSettings): readonly string[] => [
  card.passband,
  errorKey(card.passband),
  "radius",
  REACH_ERROR_KEY,
  "earth_distance",
  "earth_period",
  "transit_duration",
  "light_share",
];

const allocate = (length: number): InstrumentColumns => ({
  noise_1h: new Float64Array(length),
  noise_1h_blank: new Uint8Array(length),
  transits: new Float64Array(length),
  transits_blank: new Uint8Array(length),
  r_min: new Float64Array(length),
  r_min_err: new Float64Array(length),
  r_min_blank: new Uint8Array(length),
});

/** Fills `star` with the values of one row. */
const reader = (columns: AssessedColumns, card: CardSettings, star: AssessedStar) => {
  const none = new Float64Array(0);
  const [magnitude, magnitudeError, radius, reachError, distance, period, duration, share] = assessedKeys(
    card,
  ).map((key) => columns[key] ?? none);
  return (i: number): void => {
    star.magnitude = magnitude?.[i] ?? Number.NaN;
    star.magnitudeError = magnitudeError?.[i] ?? Number.NaN;
    star.radius = radius?.[i] ?? Number.NaN;
    star.reachError = reachError?.[i] ?? Number.NaN;
    star.earthDistance = distance?.[i] ?? Number.NaN;
    star.earthPeriod = period?.[i] ?? Number.NaN;
    star.duration = duration?.[i] ?? Number.NaN;
    star.lightShare = share?.[i] ?? Number.NaN;
  };
};

const blankStar = (): AssessedStar => ({
  magnitude: Number.NaN,
  magnitudeError: Number.NaN,
  radius: Number.NaN,
  reachError: Number.NaN,
  earthDistance: Number.NaN,
  earthPeriod: Number.NaN,
  duration: Number.NaN,
  lightShare: Number.NaN,
});

/** A block of stars as one instrument sees them in one campaign. Pure: the same columns and settings give the same bits. */
export const assessColumns = (
  columns: AssessedColumns,
  length: number,
  card: CardSettings,
  campaign: CampaignSettings,
  recipe: RecipeSettings,
): InstrumentColumns => {
  const out = allocate(length);
  const star = blankStar();
  const result = newAssessment();
  const read = reader(columns, card, star);
  for (let i = 0; i < length; i++) {
    read(i);
    assessStar(star, card, campaign, recipe, result);
    out.noise_1h[i] = result.noise1h;
    out.noise_1h_blank[i] = result.noiseBlank;
    out.transits[i] = result.transits;
    out.transits_blank[i] = result.transitsBlank;
    out.r_min[i] = result.rMin;
    out.r_min_err[i] = result.rMinError;
    out.r_min_blank[i] = result.rMinBlank;
  }
  return out;
};
