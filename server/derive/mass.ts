import {
  logMassFehSlope,
  logMassSlope,
  MASS_FEH_SCATTER,
  MASS_SCATTER,
  massFromAbsKs,
  massFromAbsKsFeh,
} from "#shared/science/cool-dwarfs.ts";
import { densityFromMassRadius } from "#shared/science/luminosity.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import {
  massFromSpectrum,
  SPECTRAL_MASS_FEH_SLOPE,
  SPECTRAL_MASS_SCATTER,
  spectralMassLoggSlope,
  spectralMassTeffSlope,
} from "#shared/science/sunlike.ts";
import { isCool } from "./dwarf.ts";
import { combine, relativeError, SOURCE, scale, setKsErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";

const coolMass = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!isCool(star)) return false;
  const withFeh = recipe.usesFeh && star.hasFeh ? massFromAbsKsFeh(star.absKs, star.feh) : Number.NaN;
  const usesFeh = !Number.isNaN(withFeh);
  star.mass = usesFeh ? withFeh : massFromAbsKs(star.absKs);
  if (Number.isNaN(star.mass)) return false;
  const slope = usesFeh ? logMassFehSlope(star.absKs) : logMassSlope(star.absKs);
  setKsErrors(star.massErrors, slope, star.distanceError, star.ksError);
  star.massErrors[SOURCE.mass] = usesFeh ? MASS_FEH_SCATTER : MASS_SCATTER;
  if (usesFeh) star.massErrors[SOURCE.iron] = (-0.0035 * star.fehError) / (1 - 0.0035 * star.feh);
  out.mass.method(star.row, usesFeh ? "abs-ks-feh" : "abs-ks");
  return true;
};

/** A gravity is assumed for a star that its place shows to be a dwarf, and for no other. */
const spectralMass = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!recipe.mass.includes("spectrum") || !(star.hasLogg || star.isDwarf)) return false;
  star.mass = massFromSpectrum(star.teff, star.logg, star.feh);
  if (Number.isNaN(star.mass)) return false;
  const errors = star.massErrors;
  scale(errors, spectralMassTeffSlope(star.teff) * star.teff, star.teffErrors);
  errors[SOURCE.gravity] = (errors[SOURCE.gravity] ?? 0) + spectralMassLoggSlope(star.logg) * star.loggError;
  errors[SOURCE.iron] = (errors[SOURCE.iron] ?? 0) + SPECTRAL_MASS_FEH_SLOPE * star.fehError;
  errors[SOURCE.mass] = SPECTRAL_MASS_SCATTER;
  if (!star.hasLogg || !star.hasFeh) star.isAssumed = true;
  out.mass.method(star.row, "spectrum");
  return true;
};

const writeBlank = (star: Scratch, out: Slots): void => {
  star.mass = Number.NaN;
  if (star.isNotDwarf) out.mass.blank(star.row, "not-dwarf-like");
  else if (out.abs_ks.isBlank(star.row)) out.mass.blankLike(star.row, out.abs_ks);
  else out.mass.blank(star.row, "outside-mass-relation");
};

export const deriveMass = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  if (coolMass(star, recipe, out) || spectralMass(star, recipe, out))
    out.mass.value(star.row, star.mass, star.mass * relativeError(star.massErrors));
  else writeBlank(star, out);
};

export const deriveDensity = (star: Scratch, out: Slots): void => {
  if (Number.isNaN(star.radius)) out.density.blank(star.row, "needs-radius");
  else if (Number.isNaN(star.mass)) out.density.blank(star.row, "needs-mass");
  else {
    const density = densityFromMassRadius(star.mass, star.radius);
    combine(star.work, 1, star.massErrors, -3, star.radiusErrors);
    out.density.value(star.row, density, density * relativeError(star.work));
  }
};
