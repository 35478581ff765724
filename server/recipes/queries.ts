import type { EntityManager } from "typeorm";
import type { RecipeRef } from "#shared/api/recipes.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { RecipeVersion } from "../database/entities/recipe.entity.ts";
import { notFound } from "../errors.ts";

/** A version of a recipe as work uses it. */
export interface RecipeInUse extends RecipeRef {
  settings: RecipeSettings;
}

/** A version by its id; one of another programme does not exist here. */
export const recipeInUse = async (
  tx: EntityManager,
  programmeId: string,
  versionId: string,
): Promise<RecipeInUse> => {
  const row = await tx.findOneBy(RecipeVersion, { id: versionId, programmeId });
  if (!row) throw notFound("This recipe");
  return {
    versionId: row.id,
    name: row.name,
    number: row.number,
    hash: row.contentHash,
    settings: row.settings as RecipeSettings,
  };
};

/** What names a version, without its settings. */
export const refOf = ({ versionId, name, number, hash }: RecipeInUse): RecipeRef => ({
  versionId,
  name,
  number,
  hash,
});

/** The columns of a joined recipe `r` under names that {@link joinedRef} reads. */
export const JOINED_RECIPE =
  "r.recipe_version_id, r.name AS recipe_name, r.`number` AS recipe_number, r.content_hash AS recipe_hash";

export interface JoinedRecipe {
  recipe_version_id: string;
  recipe_name: string;
  recipe_number: number;
  recipe_hash: string;
}

export const joinedRef = (row: JoinedRecipe): RecipeRef => ({
  versionId: String(row.recipe_version_id),
  name: row.recipe_name,
  number: row.recipe_number,
  hash: row.recipe_hash,
});
