import type { BlankKey } from "#shared/catalogue/blank-reasons.ts";
import { absoluteMagnitude, absoluteMagnitudeError, distanceFromParallax } from "#shared/science/distance.ts";
import {
  DWARF_BRIGHTNESS_MARGIN,
  DWARF_LEAST_LOGG,
  mainSequenceAbsG,
} from "#shared/science/main-sequence.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import type { Scratch } from "./scratch.ts";
import type { Columns } from "./star-columns.ts";
import type { Writer } from "./writer.ts";

/** What dwarfs take where log g or [Fe/H] is not given. */
const ASSUMED = { logg: 4.5, loggError: 0.3, feh: 0, fehError: 0.2 } as const;

const read = (given: Columns, key: string, i: number): number => given[key]?.[i] ?? Number.NaN;

/** Why a parallax gives no distance. */
const distanceReason = (parallax: number, error: number, recipe: Recipe): BlankKey => {
  if (Number.isNaN(parallax)) return "needs-parallax";
  if (parallax - recipe.parallaxZeroPointMas <= 0) return "parallax-not-positive";
  if (Number.isNaN(error)) return "needs-parallax-error";
  return "parallax-too-uncertain";
};

const readSpectrum = (star: Scratch, given: Columns, i: number): void => {
  const logg = read(given, "logg", i);
  const feh = read(given, "feh", i);
  star.hasLogg = !Number.isNaN(logg);
  star.hasFeh = !Number.isNaN(feh);
  star.logg = star.hasLogg ? logg : ASSUMED.logg;
  star.loggError = star.hasLogg ? read(given, "logg_err", i) : ASSUMED.loggError;
  star.feh = star.hasFeh ? feh : ASSUMED.feh;
  star.fehError = star.hasFeh ? read(given, "feh_err", i) : ASSUMED.fehError;
  star.isAssumed = false;
};

const readColour = (star: Scratch, given: Columns, i: number): void => {
  star.bpRp = read(given, "bp_mag", i) - read(given, "rp_mag", i);
  star.bpRpError = Math.hypot(read(given, "bp_mag_err", i), read(given, "rp_mag_err", i));
};

/** A dwarf is ruled out by a low gravity or by its place above the main sequence; without either it cannot be told. */
const isNotDwarf = (star: Scratch): boolean =>
  (star.hasLogg && star.logg < DWARF_LEAST_LOGG) ||
  star.absG < mainSequenceAbsG(star.bpRp) - DWARF_BRIGHTNESS_MARGIN;

/** Distance and absolute magnitudes, and whether the star can be a dwarf. */
export const deriveDistance = (
  star: Scratch,
  given: Columns,
  i: number,
  recipe: Recipe,
  writer: Writer,
): void => {
  readSpectrum(star, given, i);
  readColour(star, given, i);
  const parallax = read(given, "parallax", i);
  const parallaxError = read(given, "parallax_err", i);
  star.distance = distanceFromParallax(
    parallax,
    parallaxError,
    recipe.parallaxFractionLimit,
    recipe.parallaxZeroPointMas,
  );
  star.distanceError = parallaxError / (parallax - recipe.parallaxZeroPointMas);
  if (Number.isNaN(star.distance)) writer.blank("distance", distanceReason(parallax, parallaxError, recipe));
  else writer.value("distance", star.distance, star.distance * star.distanceError);

  const ks = read(given, "ks_mag", i);
  star.absKs = absoluteMagnitude(ks, star.distance, 0);
  star.absKsError = absoluteMagnitudeError(read(given, "ks_mag_err", i), star.distanceError);
  if (Number.isNaN(ks)) writer.blank("abs_ks", "needs-ks");
  else if (Number.isNaN(star.distance)) writer.blank("abs_ks", "needs-distance");
  else writer.value("abs_ks", star.absKs, star.absKsError);

  star.absG = absoluteMagnitude(read(given, "g_mag", i), star.distance, 0);
  star.absGError = absoluteMagnitudeError(read(given, "g_mag_err", i), star.distanceError);
  star.isNotDwarf = isNotDwarf(star);
};
