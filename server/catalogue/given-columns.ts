import type { RecipeSettings } from "#shared/science/recipes.ts";
import type { Value } from "../database/bulk.ts";
import { allocateGiven, type Columns, GIVEN_KEYS } from "../derive/star-columns.ts";
import { GIVEN } from "./adopt.ts";
import { ruweLimits } from "./ruwe-limits.ts";

const RELEASE = GIVEN.indexOf("release");

/** Rows of given values, each in the order of `GIVEN`, as the columns that derivation reads. */
export const givenColumns = (rows: readonly (readonly Value[])[], recipe: RecipeSettings): Columns => {
  const given = allocateGiven(rows.length);
  for (const key of GIVEN_KEYS) {
    const at = GIVEN.indexOf(key);
    const column = given[key];
    if (column) for (let i = 0; i < rows.length; i++) column[i] = Number(rows[i]?.[at] ?? Number.NaN);
  }
  const limits = ruweLimits(
    rows.map((row) => row[RELEASE]),
    recipe.astrometricQuality,
  );
  if (limits) given.ruwe_limit = limits;
  return given;
};
