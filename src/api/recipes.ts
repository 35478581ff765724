import { queryOptions } from "@tanstack/react-query";
import type { Job } from "#shared/api/jobs.ts";
import type { Recipe } from "#shared/api/recipes.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/recipes`;

/** The newest version of each recipe, by name. */
export const recipesOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "recipes"),
    queryFn: async () => (await get<{ recipes: Recipe[] }>(base(programmeId))).recipes,
  });

/** Every version of one recipe, the newest first. */
export const recipeVersionsOptions = (programmeId: string, recipeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "recipes", recipeId),
    queryFn: async () =>
      (await get<{ recipes: Recipe[] }>(`${base(programmeId)}/${recipeId}/versions`)).recipes,
  });

/** One version, which never changes. */
export const recipeVersionOptions = (programmeId: string, versionId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "recipe-version", versionId),
    queryFn: async () => (await get<{ recipe: Recipe }>(`${base(programmeId)}/versions/${versionId}`)).recipe,
    staleTime: Number.POSITIVE_INFINITY,
  });

type Content = Pick<Recipe, "name" | "note"> & { settings: RecipeSettings };

export const useMakeRecipe = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: Content) =>
    request<{ recipe: Recipe }>("POST", base(programmeId), body),
  );
export const useSaveRecipe = (programmeId: string) =>
  useProgrammeChange(programmeId, ({ id, ...body }: Content & { id: string; number: number }) =>
    request<{ recipe: Recipe }>("PUT", `${base(programmeId)}/${id}`, body),
  );

/** Brings a version into force by a recompute. */
export const useChooseRecipe = (programmeId: string) =>
  useProgrammeChange(programmeId, (versionId: string) =>
    request<{ job: Job }>("PUT", `/programmes/${programmeId}/recipe`, { versionId }),
  );
