import type { Programme as ProgrammeJson } from "#shared/api/programmes.ts";
import type { RecipeRef } from "#shared/api/recipes.ts";
import type { Programme } from "../database/entities/programme.entity.ts";

export const presentProgramme = (
  programme: Programme,
  recipe: RecipeRef,
  { stars, ...counts }: ProgrammeJson["counts"] & { stars: number },
): ProgrammeJson => ({
  id: programme.id,
  name: programme.name,
  description: programme.description,
  isInvented: programme.isInvented,
  recipe,
  edition: programme.edition === 0 ? null : programme.edition,
  stars,
  version: programme.version,
  counts,
});
