import {
  DWARF_BRIGHTNESS_MARGIN,
  DWARF_LEAST_LOGG,
  mainSequenceAbsG,
} from "#shared/science/main-sequence.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import type { Scratch } from "./scratch.ts";

/** A low gravity or a place above the main sequence rules a dwarf out. With neither known it cannot be told. */
export const judgeDwarf = (star: Scratch): void => {
  const brightest = mainSequenceAbsG(star.bpRp) - DWARF_BRIGHTNESS_MARGIN;
  star.isNotDwarf = (star.hasLogg && star.logg < DWARF_LEAST_LOGG) || star.absG < brightest;
  star.isDwarf = !star.isNotDwarf && (star.hasLogg || star.absG >= brightest);
};

/** Whether only its temperature keeps a star from the relations for cool dwarfs. */
export const isTooHot = (star: Scratch, recipe: RecipeSettings): boolean =>
  star.teff > recipe.ranges.hottestCoolDwarfK && isInRange(star, recipe);

const isInRange = (star: Scratch, { ranges }: RecipeSettings): boolean =>
  star.absKs >= ranges.brightestAbsKs && star.absKs <= ranges.faintestAbsKs;

/**
 * Whether the relations for cool dwarfs may serve, within the recipe's magnitudes; a star of unknown temperature is judged
 * by M_Ks alone.
 */
export const isCool = (star: Scratch, recipe: RecipeSettings): boolean =>
  !star.isNotDwarf && !(star.teff > recipe.ranges.hottestCoolDwarfK) && isInRange(star, recipe);
