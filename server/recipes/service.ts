import type { z } from "zod";
import type { recipeBody, recipeSaveBody } from "#shared/api/recipes.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { RecipeVersion } from "../database/entities/recipe.entity.ts";
import type { Deps } from "../deps.ts";
import {
  allVersions,
  type Editor,
  type Kind,
  newestVersions,
  saveFirst,
  saveNext,
  versionById,
} from "../versions/versioned.ts";
import { contentHash } from "./content-hash.ts";
import { presentRecipe } from "./present.ts";
import { recipeInUse } from "./queries.ts";

const RECIPES: Kind<RecipeVersion> = {
  entity: RecipeVersion,
  table: "recipe",
  rootKey: "recipeId",
  rootColumn: "recipe_id",
  idColumn: "recipe_version_id",
  word: "recipe",
  subject: "recipe",
};

const contentOf = (name: string, note: string, settings: RecipeSettings) => ({
  name,
  note,
  settings,
  contentHash: contentHash(settings),
});

export const listRecipes = async (deps: Deps, programmeId: string) =>
  (await newestVersions(deps, RECIPES, programmeId)).map(presentRecipe);

export const readRecipe = async (deps: Deps, programmeId: string, versionId: string) =>
  presentRecipe(await versionById(deps, RECIPES, programmeId, versionId));

export const listRecipeVersions = async (deps: Deps, programmeId: string, id: string) =>
  (await allVersions(deps, RECIPES, programmeId, id)).map(presentRecipe);

/** A new recipe, with settings of its own or those of the version it is a copy of. */
export const makeRecipe = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  { name, note, settings, copyOf }: z.output<typeof recipeBody>,
) => {
  const content = settings ?? (await recipeInUse(deps.db.manager, programmeId, copyOf ?? "0")).settings;
  return presentRecipe(await saveFirst(deps, RECIPES, programmeId, editor, contentOf(name, note, content)));
};

export const saveRecipe = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  id: string,
  { number, name, note, settings }: z.output<typeof recipeSaveBody>,
) =>
  presentRecipe(
    await saveNext(deps, RECIPES, programmeId, editor, id, number, contentOf(name, note, settings)),
  );
