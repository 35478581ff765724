import { COOL_DWARF_TEFF_SCATTER_K, coolDwarfTeff, coolDwarfTeffSlope } from "#shared/science/cool-dwarfs.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import {
  SUNLIKE_TEFF_SCATTER_K,
  sunlikeTeff,
  sunlikeTeffFehSlope,
  sunlikeTeffLoggSlope,
  sunlikeTeffSlope,
} from "#shared/science/sunlike.ts";
import { at, errorAt, type Inputs } from "./inputs.ts";
import { relativeError, SOURCE } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";

/** Below this the relation for cool dwarfs serves, K. */
const COOLEST_SUNLIKE_K = 4000;

/** Takes the temperature, with what it owes to the colour and to its own error (K); the caller adds other sources. */
const adopt = (star: Scratch, teff: number, colourError: number, ownError: number): void => {
  star.teff = teff;
  star.teffErrors.fill(0);
  star.teffErrors[SOURCE.colour] = colourError / teff;
  star.teffErrors[SOURCE.temperature] = ownError / teff;
};

const write = (star: Scratch, out: Slots, method: "given" | "sunlike-colour" | "cool-colour"): void => {
  out.teff.value(star.row, star.teff, star.teff * relativeError(star.teffErrors));
  out.teff.method(star.row, method);
};

/** Colour temperature of stars like the Sun; false where the relation does not hold. */
const trySunlike = (star: Scratch, out: Slots): boolean => {
  // Without a gravity the relation would have to assume that of a dwarf.
  if (!star.isColourSafe || (star.isNotDwarf && !star.hasLogg)) return false;
  const { bpRp, logg, feh } = star;
  const teff = sunlikeTeff(bpRp, logg, feh);
  if (!(teff >= COOLEST_SUNLIKE_K)) return false;
  adopt(star, teff, sunlikeTeffSlope(bpRp, logg, feh) * star.bpRpError, SUNLIKE_TEFF_SCATTER_K);
  star.teffErrors[SOURCE.gravity] = (sunlikeTeffLoggSlope(bpRp, feh) * star.loggError) / teff;
  star.teffErrors[SOURCE.iron] = (sunlikeTeffFehSlope(bpRp, logg) * star.fehError) / teff;
  star.isAssumed = !star.hasLogg || !star.hasFeh;
  write(star, out, "sunlike-colour");
  return true;
};

const tryCool = (star: Scratch, out: Slots): boolean => {
  const teff = star.isNotDwarf ? Number.NaN : coolDwarfTeff(star.bpRp);
  if (Number.isNaN(teff)) return false;
  adopt(star, teff, coolDwarfTeffSlope(star.bpRp) * star.bpRpError, COOL_DWARF_TEFF_SCATTER_K);
  write(star, out, "cool-colour");
  return true;
};

/** Temperature: as given, else from colour where the recipe says so. A temperature of 0 K or less is none. */
export const deriveTemperature = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): void => {
  const teff = at(given.teff, star.row);
  if (teff > 0) {
    adopt(star, teff, 0, errorAt(given.teffError, star.row));
    write(star, out, "given");
    return;
  }
  star.teff = Number.NaN;
  if (!recipe.teff.includes("cool-colour") || Number.isNaN(star.bpRp)) {
    out.teff.blank(star.row, "needs-teff");
    return;
  }
  if (trySunlike(star, out) || tryCool(star, out)) return;
  out.teff.blank(star.row, star.isNotDwarf ? "not-dwarf-like" : "outside-teff-relation");
};
