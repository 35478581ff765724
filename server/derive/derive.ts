import { countWarnings, flagBit } from "#shared/catalogue/flags.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import { deriveLuminosity, deriveMass, deriveRadius } from "./body.ts";
import { deriveDistance } from "./brightness.ts";
import { deriveHabitability } from "./habitability.ts";
import { newScratch, type Scratch } from "./scratch.ts";
import { allocateStellar, type Columns, type StellarColumns } from "./star-columns.ts";
import { deriveTemperature } from "./temperature.ts";
import { Writer } from "./writer.ts";

const LEAST_CLEAN_LIGHT_SHARE = 0.98;

const flagsOf = (star: Scratch, given: Columns, i: number, recipe: Recipe): number => {
  let bits = 0;
  if ((given.ruwe?.[i] ?? Number.NaN) > recipe.ruweLimit) bits |= flagBit("maybe-two-stars");
  if ((given.light_share?.[i] ?? Number.NaN) < LEAST_CLEAN_LIGHT_SHARE) bits |= flagBit("shared-light");
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
export const deriveColumns = (given: Columns, length: number, recipe: Recipe): StellarColumns => {
  const columns = allocateStellar(length);
  const writer = new Writer(columns);
  const star = newScratch();
  for (let i = 0; i < length; i++) {
    writer.moveTo(i);
    deriveDistance(star, given, i, recipe, writer);
    deriveTemperature(star, given, i, recipe, writer);
    deriveRadius(star, recipe, writer);
    deriveLuminosity(star, recipe, writer);
    deriveMass(star, recipe, writer);
    deriveHabitability(star, recipe, writer);
    const bits = flagsOf(star, given, i, recipe);
    columns.flagBits[i] = bits;
    columns.flags[i] = countWarnings(bits);
  }
  return columns;
};
