import { queryOptions } from "@tanstack/react-query";
import type { Job } from "#shared/api/jobs.ts";
import type { Recipe } from "#shared/api/recipes.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/recipes`;

/** The newest version of each recipe, by name. */
export const recipesOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "recipes"),
    queryFn: async () => (await get<{ recipes: Recipe[] }>(base(programmeId))).recipes,
  });

/** Brings a version into force by a recompute. */
export const useChooseRecipe = (programmeId: string) =>
  useProgrammeChange(programmeId, (versionId: string) =>
    request<{ job: Job }>("PUT", `/programmes/${programmeId}/recipe`, { versionId }),
  );
