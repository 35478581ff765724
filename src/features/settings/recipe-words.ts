import type { Recipe } from "#shared/api/recipes.ts";

/** Who saved a version, or that nobody did. */
export const savedByWords = ({ savedBy }: Pick<Recipe, "savedBy">): string =>
  savedBy?.name ?? "came with the programme";
