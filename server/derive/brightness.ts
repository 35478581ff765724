import type { BlankKey } from "#shared/catalogue/blank-reasons.ts";
import { absoluteMagnitude, absoluteMagnitudeError, distanceFromParallax } from "#shared/science/distance.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { SUNLIKE_BRIGHTEST_MAG } from "#shared/science/sunlike.ts";
import { judgeDwarf } from "./dwarf.ts";
import { at, errorAt, type Inputs } from "./inputs.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";

/** Why a parallax gives no distance. */
const distanceReason = (parallax: number, error: number): BlankKey => {
  if (Number.isNaN(parallax)) return "needs-parallax";
  if (parallax <= 0) return "parallax-not-positive";
  return Number.isNaN(error) ? "needs-parallax-error" : "parallax-too-uncertain";
};

const readSpectrum = (star: Scratch, given: Inputs, { assumed }: RecipeSettings): void => {
  const logg = at(given.logg, star.row);
  const feh = at(given.feh, star.row);
  star.hasLogg = !Number.isNaN(logg);
  star.hasFeh = !Number.isNaN(feh);
  star.logg = star.hasLogg ? logg : assumed.logg;
  star.loggError = star.hasLogg ? errorAt(given.loggError, star.row) : assumed.loggError;
  star.feh = star.hasFeh ? feh : assumed.feh;
  star.fehError = star.hasFeh ? errorAt(given.fehError, star.row) : assumed.fehError;
  star.isAssumed = false;
};

const readColour = (star: Scratch, given: Inputs): void => {
  const bp = at(given.bp, star.row);
  const rp = at(given.rp, star.row);
  const bpError = errorAt(given.bpError, star.row);
  const rpError = errorAt(given.rpError, star.row);
  star.bpRp = bp - rp;
  star.bpRpError = Math.sqrt(bpError * bpError + rpError * rpError);
  star.isColourSafe = bp >= SUNLIKE_BRIGHTEST_MAG && rp >= SUNLIKE_BRIGHTEST_MAG;
};

const writeDistance = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): void => {
  const parallax = at(given.parallax, star.row);
  const error = errorAt(given.parallaxError, star.row);
  const { zeroPointMas: zeroPoint, fractionLimit } = recipe.distance;
  star.distance = distanceFromParallax(parallax, error, fractionLimit, zeroPoint);
  star.distanceError = error / (parallax - zeroPoint);
  if (Number.isNaN(star.distance)) out.distance.blank(star.row, distanceReason(parallax - zeroPoint, error));
  else out.distance.value(star.row, star.distance, star.distance * star.distanceError);
};

/** Distance and absolute magnitudes, and whether the star can be a dwarf. */
export const deriveDistance = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): void => {
  readSpectrum(star, given, recipe);
  readColour(star, given);
  writeDistance(star, given, recipe, out);
  const ks = at(given.ks, star.row);
  star.ksError = errorAt(given.ksError, star.row);
  star.absKs = absoluteMagnitude(ks, star.distance, 0);
  if (Number.isNaN(ks)) out.abs_ks.blank(star.row, "needs-ks");
  else if (Number.isNaN(star.distance)) out.abs_ks.blank(star.row, "needs-distance");
  else out.abs_ks.value(star.row, star.absKs, absoluteMagnitudeError(star.ksError, star.distanceError));
  star.gError = errorAt(given.gError, star.row);
  star.absG = absoluteMagnitude(at(given.g, star.row), star.distance, 0);
  judgeDwarf(star);
};
