import type { EntityManager } from "typeorm";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type Recipe } from "#shared/science/recipes.ts";
import { RecipeVersion } from "../database/entities/recipe.entity.ts";
import { contentHash } from "./content-hash.ts";

/** Stands for nobody: what came with the programme was saved by no person. */
export const CAME_WITH_PROGRAMME = "0";

const addOne = async (
  tx: EntityManager,
  programmeId: string,
  at: Date,
  { name, note, settings }: Recipe,
): Promise<string> => {
  const { id } = await tx.save(
    RecipeVersion,
    tx.create(RecipeVersion, {
      recipeId: null,
      programmeId,
      number: 1,
      name,
      note,
      settings,
      contentHash: contentHash(settings),
      savedBy: CAME_WITH_PROGRAMME,
      savedAt: at,
    }),
  );
  await tx.query("UPDATE recipe SET recipe_id = recipe_version_id WHERE recipe_version_id = ?", [id]);
  return id;
};

/** Gives a new programme the recipes that every programme starts with, and derives by the default; answers their ids. */
export const addShippedRecipes = async (
  tx: EntityManager,
  programmeId: string,
  at: Date,
): Promise<{ default: string; practice: string }> => {
  const ids = {
    default: await addOne(tx, programmeId, at, DEFAULT_RECIPE),
    practice: await addOne(tx, programmeId, at, PRACTICE_RECIPE),
  };
  await tx.query("UPDATE programme SET recipe_version_id = ? WHERE programme_id = ?", [
    ids.default,
    programmeId,
  ]);
  return ids;
};
