import type { RecipeSettings } from "#shared/science/recipes.ts";

/**
 * Limit of the quality of the astrometric fit for each star, by its release; NaN where the recipe's general limit counts.
 *
 * @param releases one for each star, spelt as the extract gave it; null where there is none
 * @returns null where no release has a limit of its own
 */
export const ruweLimits = (
  releases: readonly unknown[],
  { byRelease }: RecipeSettings["astrometricQuality"],
): Float64Array | null => {
  if (byRelease.length === 0) return null;
  const limits = new Map<unknown, number>(byRelease.map(({ release, limit }) => [release, limit]));
  return Float64Array.from(releases, (release) => limits.get(release) ?? Number.NaN);
};
