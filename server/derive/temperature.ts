import { COOL_DWARF_TEFF_SCATTER_K, coolDwarfTeff, coolDwarfTeffSlope } from "#shared/science/cool-dwarfs.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import {
  SUNLIKE_TEFF_SCATTER_K,
  sunlikeTeff,
  sunlikeTeffFehSlope,
  sunlikeTeffLoggSlope,
  sunlikeTeffSlope,
} from "#shared/science/sunlike.ts";
import { SOURCE } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Columns } from "./star-columns.ts";
import type { Writer } from "./writer.ts";

/** Below this the relation for cool dwarfs serves, K. */
const COOLEST_SUNLIKE_K = 4000;

const adopt = (star: Scratch, teff: number, error: number): void => {
  star.teff = teff;
  star.teffErrors.fill(0);
  star.teffErrors[SOURCE.temperature] = error / teff;
};

/** Colour temperature of stars like the Sun; false where the relation does not hold. */
const trySunlike = (star: Scratch, writer: Writer): boolean => {
  // Without a gravity the relation would have to assume that of a dwarf.
  if (star.isNotDwarf && !star.hasLogg) return false;
  const teff = sunlikeTeff(star.bpRp, star.logg, star.feh);
  if (!(teff >= COOLEST_SUNLIKE_K)) return false;
  const error = Math.hypot(
    sunlikeTeffSlope(star.bpRp, star.logg, star.feh) * star.bpRpError,
    sunlikeTeffLoggSlope(star.bpRp, star.feh) * star.loggError,
    sunlikeTeffFehSlope(star.bpRp, star.logg) * star.fehError,
    SUNLIKE_TEFF_SCATTER_K,
  );
  adopt(star, teff, error);
  star.isAssumed = !star.hasLogg || !star.hasFeh;
  writer.value("teff", teff, error);
  writer.method("teff", "sunlike-colour");
  return true;
};

const tryCool = (star: Scratch, writer: Writer): boolean => {
  const teff = star.isNotDwarf ? Number.NaN : coolDwarfTeff(star.bpRp);
  if (Number.isNaN(teff)) return false;
  const error = Math.hypot(coolDwarfTeffSlope(star.bpRp) * star.bpRpError, COOL_DWARF_TEFF_SCATTER_K);
  adopt(star, teff, error);
  writer.value("teff", teff, error);
  writer.method("teff", "cool-colour");
  return true;
};

/** Temperature: as given, else from colour where the recipe says so. */
export const deriveTemperature = (
  star: Scratch,
  given: Columns,
  i: number,
  recipe: Recipe,
  writer: Writer,
): void => {
  const teff = given.teff_given?.[i] ?? Number.NaN;
  if (!Number.isNaN(teff)) {
    const error = given.teff_given_err?.[i] ?? Number.NaN;
    adopt(star, teff, error);
    writer.value("teff", teff, error);
    writer.method("teff", "given");
    return;
  }
  star.teff = Number.NaN;
  if (!recipe.usesColourTeff || Number.isNaN(star.bpRp)) {
    writer.blank("teff", "needs-teff");
    return;
  }
  if (trySunlike(star, writer) || tryCool(star, writer)) return;
  writer.blank("teff", star.isNotDwarf ? "not-dwarf-like" : "outside-teff-relation");
};
