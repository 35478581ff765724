import type { Recipe } from "#shared/api/recipes.ts";
import type { RecipeVersion } from "../database/entities/recipe.entity.ts";
import type { Saved } from "../versions/versioned.ts";
import { CAME_WITH_PROGRAMME } from "./shipped.ts";

export const presentRecipe = ({ row, savedBy }: Saved<RecipeVersion>): Recipe => ({
  id: row.recipeId ?? row.id,
  versionId: row.id,
  number: row.number,
  name: row.name,
  note: row.note,
  hash: row.contentHash,
  settings: row.settings as Recipe["settings"],
  savedBy: row.savedBy === CAME_WITH_PROGRAMME ? null : savedBy,
  savedAt: row.savedAt.toISOString(),
});
