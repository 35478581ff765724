import { assessColumns } from "#server/assess/columns.ts";
import { deriveStar } from "#server/derive/derive.ts";
import type { StellarColumns } from "#server/derive/star-columns.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { METHODS } from "#shared/catalogue/methods.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type RecipeSettings } from "#shared/science/recipes.ts";
import { type Given, PRACTICE_CAMPAIGN, PRACTICE_CARD } from "./practice-stars.ts";

/** One derived star, readable by key. */
export const derived = (given: Given, recipe: RecipeSettings = DEFAULT_RECIPE.settings) => {
  const columns: StellarColumns = deriveStar(given, recipe);
  return {
    value: (key: string): number => columns.values[key]?.[0] ?? Number.NaN,
    error: (key: string): number => columns.values[`${key}_err`]?.[0] ?? Number.NaN,
    /** Key of the blank reason, or undefined where the value is there. */
    reason: (key: string): string | undefined => {
      const code = columns.blanks[`${key}_blank`]?.[0] ?? 0;
      return code === 0 ? undefined : blankReason(code).key;
    },
    method: (key: string): string | undefined =>
      METHODS.find((m) => m.code === columns.methods[`${key}_method`]?.[0])?.key,
    flagBits: columns.flagBits[0] ?? 0,
    flags: columns.flags[0] ?? 0,
    columns,
  };
};

/** One star through derivation and assessment, by the practice recipe unless another is named. */
export const assessed = (
  given: Given,
  campaign: CampaignSettings = PRACTICE_CAMPAIGN,
  card: CardSettings = PRACTICE_CARD,
  recipe: RecipeSettings = PRACTICE_RECIPE.settings,
) => {
  const { values } = derived(given, recipe).columns;
  const own = Object.fromEntries(Object.entries(given).map(([key, value]) => [key, Float64Array.of(value)]));
  const out = assessColumns({ ...own, ...values }, 1, card, campaign, recipe);
  const reason = (codes: Uint8Array) => (codes[0] ? blankReason(codes[0]).key : undefined);
  return {
    noise1h: out.noise_1h[0] ?? Number.NaN,
    transits: out.transits[0] ?? Number.NaN,
    rMin: out.r_min[0] ?? Number.NaN,
    rMinError: out.r_min_err[0] ?? Number.NaN,
    noiseReason: reason(out.noise_1h_blank),
    transitsReason: reason(out.transits_blank),
    rMinReason: reason(out.r_min_blank),
  };
};
