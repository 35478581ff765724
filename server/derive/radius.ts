import {
  RADIUS_FEH_SCATTER,
  RADIUS_SCATTER,
  radiusFehSlope,
  radiusFromAbsKs,
  radiusFromAbsKsFeh,
  radiusSlope,
} from "#shared/science/cool-dwarfs.ts";
import { radiusFromLuminosity } from "#shared/science/luminosity.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { isCool } from "./dwarf.ts";
import { lightFromG } from "./luminosity.ts";
import { combine, relativeError, SOURCE, setKsErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";

/** [Fe/H] term where it is given, inside its range and wanted; else the relation without. */
const coolRadius = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!isCool(star)) return false;
  const withFeh = recipe.usesFeh && star.hasFeh ? radiusFromAbsKsFeh(star.absKs, star.feh) : Number.NaN;
  const usesFeh = !Number.isNaN(withFeh);
  const radius = usesFeh ? withFeh : radiusFromAbsKs(star.absKs);
  if (Number.isNaN(radius)) return false;
  const slope = usesFeh ? radiusFehSlope(star.absKs, star.feh) : radiusSlope(star.absKs);
  star.radius = radius;
  setKsErrors(star.radiusErrors, slope / radius, star.distanceError, star.ksError);
  star.radiusErrors[SOURCE.radius] = usesFeh ? RADIUS_FEH_SCATTER : RADIUS_SCATTER;
  if (usesFeh) star.radiusErrors[SOURCE.iron] = (0.04458 * star.fehError) / (1 + 0.04458 * star.feh);
  out.radius.method(star.row, usesFeh ? "abs-ks-feh" : "abs-ks");
  return true;
};

const sunlikeRadius = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!recipe.radius.includes("light-and-temperature") || !lightFromG(star)) return false;
  star.radius = radiusFromLuminosity(star.luminosity, star.teff);
  combine(star.radiusErrors, 0.5, star.luminosityErrors, -2, star.teffErrors);
  out.radius.method(star.row, "light-and-temperature");
  return true;
};

export const deriveRadius = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  if (coolRadius(star, recipe, out) || sunlikeRadius(star, recipe, out)) {
    out.radius.value(star.row, star.radius, star.radius * relativeError(star.radiusErrors));
    return;
  }
  star.radius = Number.NaN;
  if (star.isNotDwarf) out.radius.blank(star.row, "not-dwarf-like");
  else if (out.abs_ks.isBlank(star.row)) out.radius.blankLike(star.row, out.abs_ks);
  else out.radius.blank(star.row, "outside-radius-relation");
};
