import { countWarnings, flagBit } from "#shared/catalogue/flags.ts";
import { eccentricityFactors } from "#shared/science/eccentricity.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { deriveDistance } from "./brightness.ts";
import { deriveHabitability } from "./habitability.ts";
import { at, bindInputs, type Inputs } from "./inputs.ts";
import { deriveLuminosity } from "./luminosity.ts";
import { deriveDensity, deriveMass } from "./mass.ts";
import { deriveRadius } from "./radius.ts";
import { type DeviateColumns, newScratch, type Scratch, takeDeviates } from "./scratch.ts";
import { type Slots, slotsOf } from "./slots.ts";
import { allocateStellar, type Columns, REACH_ERROR_KEY, type StellarColumns } from "./star-columns.ts";
import { deriveTemperature } from "./temperature.ts";

const LEAST_CLEAN_LIGHT_SHARE = 0.98;

const isPoorFit = (row: number, given: Inputs, { astrometricQuality }: RecipeSettings): boolean => {
  const ofRelease = at(given.ruweLimit, row);
  return at(given.ruwe, row) > (Number.isNaN(ofRelease) ? astrometricQuality.limit : ofRelease);
};

const flagsOf = (star: Scratch, given: Inputs, recipe: RecipeSettings): number => {
  let bits = 0;
  if (isPoorFit(star.row, given, recipe)) bits |= flagBit("maybe-two-stars");
  if (at(given.lightShare, star.row) < LEAST_CLEAN_LIGHT_SHARE) bits |= flagBit("shared-light");
  if (star.isNotDwarf) bits |= flagBit("not-dwarf-like");
  if (star.isAssumed) bits |= flagBit("assumed");
  return bits;
};

/** A scratch with what the recipe settles once for all stars. */
export const scratchFor = ({ eccentricity }: RecipeSettings): Scratch => {
  const star = newScratch();
  const { probability, duration } = eccentricityFactors(eccentricity);
  star.probabilityFactor = probability;
  star.durationFactor = duration;
  return star;
};

/** One star, step by step, from the row of `given` that the scratch stands at. Returns its flags. */
export const deriveRow = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): number => {
  deriveDistance(star, given, recipe, out);
  deriveTemperature(star, given, recipe, out);
  deriveRadius(star, recipe, out);
  deriveLuminosity(star, recipe, out);
  deriveMass(star, recipe, out);
  deriveDensity(star, recipe, out);
  deriveHabitability(star, recipe, out);
  return flagsOf(star, given, recipe);
};

/**
 * The stellar quantities of a block of stars. Pure: the same given values and recipe give the same bits.
 *
 * @param given numeric given columns by key (see GIVEN_KEYS), NaN where nothing is given; a missing key counts as such
 * @param deviates of each row, for draws; without them nothing is drawn
 * @returns every stellar column; no value is NaN without a blank reason beside it
 */
export const deriveColumns = (
  given: Columns,
  length: number,
  recipe: RecipeSettings,
  deviates?: DeviateColumns,
): StellarColumns => {
  const columns = allocateStellar(length);
  const inputs = bindInputs(given, length);
  const out = slotsOf(columns);
  const star = scratchFor(recipe);
  const reachErrors = columns.values[REACH_ERROR_KEY] as Float64Array;
  for (let i = 0; i < length; i++) {
    star.row = i;
    if (deviates) takeDeviates(star, deviates);
    const bits = deriveRow(star, inputs, recipe, out);
    reachErrors[i] = star.reachError;
    columns.flagBits[i] = bits;
    columns.flags[i] = countWarnings(bits);
  }
  return columns;
};

/** One star by the same code: given values by key, NaN or absent where not given. */
export const deriveStar = (given: Readonly<Record<string, number>>, recipe: RecipeSettings): StellarColumns =>
  deriveColumns(columnsOfOne(given), 1, recipe);

/** Given values of one star as columns of one row. */
export const columnsOfOne = (given: Readonly<Record<string, number>>): Columns =>
  Object.fromEntries(Object.entries(given).map(([key, value]) => [key, Float64Array.of(value)]));
