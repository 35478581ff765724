import { z } from "zod";
import { recipe, recipeBody, recipeSaveBody } from "#shared/api/recipes.ts";
import type { Routes } from "../http/route.ts";
import { listRecipes, listRecipeVersions, makeRecipe, readRecipe, saveRecipe } from "./service.ts";

const RECIPES = "/programmes/:programmeId/recipes";
const one = z.object({ recipe });
const many = z.object({ recipes: z.array(recipe) });

export const addRecipeRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: RECIPES, access: "recipe.read", answer: many },
    async ({ deps, programmeId }) => ({ recipes: await listRecipes(deps, programmeId) }),
  );
  routes.add(
    { method: "get", path: `${RECIPES}/:recipeId/versions`, access: "recipe.read", answer: many },
    async ({ deps, programmeId, params }) => ({
      recipes: await listRecipeVersions(deps, programmeId, params.recipeId ?? ""),
    }),
  );
  routes.add(
    { method: "get", path: `${RECIPES}/versions/:versionId`, access: "recipe.read", answer: one },
    async ({ deps, programmeId, params }) => ({
      recipe: await readRecipe(deps, programmeId, params.versionId ?? ""),
    }),
  );
  routes.add(
    { method: "post", path: RECIPES, access: "recipe.edit", body: recipeBody, status: 201, answer: one },
    async ({ deps, programmeId, caller, body }) => ({
      recipe: await makeRecipe(deps, programmeId, caller, body),
    }),
  );
  routes.add(
    {
      method: "put",
      path: `${RECIPES}/:recipeId`,
      access: "recipe.edit",
      body: recipeSaveBody,
      answer: one,
    },
    async ({ deps, programmeId, caller, params, body }) => ({
      recipe: await saveRecipe(deps, programmeId, caller, params.recipeId ?? "", body),
    }),
  );
};
