import {
  BC_KS_SCATTER,
  bolometricCorrectionKs,
  bolometricCorrectionKsSlope,
} from "#shared/science/cool-dwarfs.ts";
import { luminosityFromMagnitude, luminosityFromRadius } from "#shared/science/luminosity.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { bolometricCorrectionG, bolometricCorrectionGSlope } from "#shared/science/sunlike.ts";
import { isCool } from "./dwarf.ts";
import { addScaled, combine, PER_PARALLAX, relativeError, SOURCE, setKsErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";

/** Relative change of a luminosity per magnitude, of the star or of its bolometric correction. */
const LIGHT_PER_MAG = -0.4 * Math.LN10;
/** Scatter of the bolometric correction to G, mag: a judgement of this project, the paper gives it by model only. */
const BC_G_SCATTER = 0.05;

/** Luminosity from M_G and its bolometric correction, into the scratch; false where it does not hold. */
export const lightFromG = (star: Scratch): boolean => {
  const luminosity = luminosityFromMagnitude(star.absG, bolometricCorrectionG(star.teff));
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity;
  star.luminosityErrors.fill(0);
  star.luminosityErrors[SOURCE.parallax] = LIGHT_PER_MAG * PER_PARALLAX * star.distanceError;
  star.luminosityErrors[SOURCE.g] = LIGHT_PER_MAG * star.gError;
  star.luminosityErrors[SOURCE.light] = LIGHT_PER_MAG * BC_G_SCATTER;
  const viaTeff = LIGHT_PER_MAG * bolometricCorrectionGSlope(star.teff) * star.teff;
  addScaled(star.luminosityErrors, viaTeff, star.teffErrors);
  return true;
};

const lightFromKs = (star: Scratch): boolean => {
  if (!isCool(star)) return false;
  const luminosity = luminosityFromMagnitude(star.absKs, bolometricCorrectionKs(star.bpRp));
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity;
  setKsErrors(star.luminosityErrors, LIGHT_PER_MAG, star.distanceError, star.ksError);
  star.luminosityErrors[SOURCE.colour] =
    LIGHT_PER_MAG * bolometricCorrectionKsSlope(star.bpRp) * star.bpRpError;
  star.luminosityErrors[SOURCE.light] = LIGHT_PER_MAG * BC_KS_SCATTER;
  return true;
};

const lightFromRadius = (star: Scratch): boolean => {
  const luminosity = luminosityFromRadius(star.radius, star.teff);
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity;
  combine(star.luminosityErrors, 2, star.radiusErrors, 4, star.teffErrors);
  return true;
};

/** Luminosity: from an absolute magnitude and its bolometric correction, else R² T⁴. */
export const deriveLuminosity = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  const byCorrection = recipe.luminosity.includes("correction-ks");
  if (byCorrection && lightFromKs(star)) out.luminosity.method(star.row, "correction-ks");
  else if (byCorrection && lightFromG(star)) out.luminosity.method(star.row, "correction-g");
  else if (lightFromRadius(star)) out.luminosity.method(star.row, "radius-and-temperature");
  else {
    star.luminosity = Number.NaN;
    out.luminosity.blank(star.row, Number.isNaN(star.teff) ? "needs-teff" : "needs-radius");
    return;
  }
  out.luminosity.value(star.row, star.luminosity, star.luminosity * relativeError(star.luminosityErrors));
};
