import { type Programme as ProgrammeJson, recipeBody } from "#shared/api/programmes.ts";
import type { Programme } from "../database/entities/programme.entity.ts";

export const presentProgramme = (
  programme: Programme,
  { stars, ...counts }: ProgrammeJson["counts"] & { stars: number },
): ProgrammeJson => ({
  id: programme.id,
  name: programme.name,
  description: programme.description,
  isInvented: programme.isInvented,
  recipe: recipeBody.shape.recipe.parse(programme.recipe),
  edition: programme.edition === 0 ? null : programme.edition,
  stars,
  version: programme.version,
  counts,
});
