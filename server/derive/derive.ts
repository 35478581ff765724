import { countWarnings, flagBit } from "#shared/catalogue/flags.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { deriveDistance } from "./brightness.ts";
import { deriveHabitability } from "./habitability.ts";
import { at, bindInputs, type Inputs } from "./inputs.ts";
import { deriveLuminosity } from "./luminosity.ts";
import { deriveDensity, deriveMass } from "./mass.ts";
import { deriveRadius } from "./radius.ts";
import { newScratch, type Scratch } from "./scratch.ts";
import { slotsOf } from "./slots.ts";
import { allocateStellar, type Columns, type StellarColumns } from "./star-columns.ts";
import { deriveTemperature } from "./temperature.ts";

const LEAST_CLEAN_LIGHT_SHARE = 0.98;

const flagsOf = (star: Scratch, given: Inputs, recipe: RecipeSettings): number => {
  let bits = 0;
  if (at(given.ruwe, star.row) > recipe.astrometricQuality.limit) bits |= flagBit("maybe-two-stars");
  if (at(given.lightShare, star.row) < LEAST_CLEAN_LIGHT_SHARE) bits |= flagBit("shared-light");
  if (star.isNotDwarf) bits |= flagBit("not-dwarf-like");
  if (star.isAssumed) bits |= flagBit("assumed");
  return bits;
};

/**
 * The stellar quantities of a block of stars. Pure: the same given values and recipe give the same bits.
 *
 * @param given numeric given columns by key (see GIVEN_KEYS), NaN where nothing is given; a missing key counts as such
 * @returns every stellar column; no value is NaN without a blank reason beside it
 */
export const deriveColumns = (given: Columns, length: number, recipe: RecipeSettings): StellarColumns => {
  const columns = allocateStellar(length);
  const inputs = bindInputs(given, length);
  const out = slotsOf(columns);
  const star = newScratch();
  for (let i = 0; i < length; i++) {
    star.row = i;
    deriveDistance(star, inputs, recipe, out);
    deriveTemperature(star, inputs, recipe, out);
    deriveRadius(star, recipe, out);
    deriveLuminosity(star, recipe, out);
    deriveMass(star, recipe, out);
    deriveDensity(star, out);
    deriveHabitability(star, recipe, out);
    const bits = flagsOf(star, inputs, recipe);
    columns.flagBits[i] = bits;
    columns.flags[i] = countWarnings(bits);
  }
  return columns;
};

/** One star by the same code: given values by key, NaN or absent where not given. */
export const deriveStar = (given: Readonly<Record<string, number>>, recipe: RecipeSettings): StellarColumns =>
  deriveColumns(
    Object.fromEntries(Object.entries(given).map(([key, value]) => [key, Float64Array.of(value)])),
    1,
    recipe,
  );
