import type { BlankKey } from "#shared/catalogue/blank-reasons.ts";
import {
  BC_KS_SCATTER,
  bolometricCorrectionKs,
  logMassFehSlope,
  logMassSlope,
  MASS_FEH_SCATTER,
  MASS_SCATTER,
  massFromAbsKs,
  massFromAbsKsFeh,
  RADIUS_FEH_SCATTER,
  RADIUS_SCATTER,
  radiusFehSlope,
  radiusFromAbsKs,
  radiusFromAbsKsFeh,
  radiusSlope,
} from "#shared/science/cool-dwarfs.ts";
import {
  densityFromMassRadius,
  luminosityFromMagnitude,
  luminosityFromRadius,
  radiusFromLuminosity,
} from "#shared/science/luminosity.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import {
  bolometricCorrectionG,
  bolometricCorrectionGSlope,
  massFromSpectrum,
  SPECTRAL_MASS_FEH_SLOPE,
  SPECTRAL_MASS_SCATTER,
  spectralMassLoggSlope,
  spectralMassTeffSlope,
} from "#shared/science/sunlike.ts";
import { combine, relativeError, SOURCE } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Writer } from "./writer.ts";

/** Hotter stars take their radius from light and temperature even where M_Ks would allow the relation, K. */
const HOTTEST_COOL_DWARF_K = 4200;
/** Relative error of a luminosity per magnitude of error. */
const LIGHT_PER_MAG = 0.4 * Math.LN10;
/** Scatter of the bolometric correction to G, mag: a judgement of this project, the paper gives it by model only. */
const BC_G_SCATTER = 0.05;

const isCool = (star: Scratch): boolean => !star.isNotDwarf && !(star.teff > HOTTEST_COOL_DWARF_K);

/** [Fe/H] term where it is given, inside its range and wanted; else the relation without. */
const coolRadius = (star: Scratch, recipe: Recipe, writer: Writer): boolean => {
  if (!isCool(star)) return false;
  const withFeh = recipe.usesFeh && star.hasFeh ? radiusFromAbsKsFeh(star.absKs, star.feh) : Number.NaN;
  const usesFeh = !Number.isNaN(withFeh);
  const radius = usesFeh ? withFeh : radiusFromAbsKs(star.absKs);
  if (Number.isNaN(radius)) return false;
  const slope = usesFeh ? radiusFehSlope(star.absKs, star.feh) : radiusSlope(star.absKs);
  star.radius = radius;
  star.radiusErrors.fill(0);
  star.radiusErrors[SOURCE.magnitude] = (slope * star.absKsError) / radius;
  star.radiusErrors[SOURCE.radius] = usesFeh ? RADIUS_FEH_SCATTER : RADIUS_SCATTER;
  if (usesFeh) star.radiusErrors[SOURCE.iron] = (0.04458 * star.fehError) / (1 + 0.04458 * star.feh);
  writer.value("radius", radius, radius * relativeError(star.radiusErrors));
  writer.method("radius", usesFeh ? "abs-ks-feh" : "abs-ks");
  return true;
};

/** Luminosity from M_G and its bolometric correction, into the scratch; false where it does not hold. */
const lightFromG = (star: Scratch): boolean => {
  const luminosity = luminosityFromMagnitude(star.absG, bolometricCorrectionG(star.teff));
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity;
  star.luminosityErrors.fill(0);
  star.luminosityErrors[SOURCE.magnitude] = LIGHT_PER_MAG * star.absGError;
  star.luminosityErrors[SOURCE.light] = LIGHT_PER_MAG * BC_G_SCATTER;
  star.luminosityErrors[SOURCE.temperature] =
    -LIGHT_PER_MAG *
    bolometricCorrectionGSlope(star.teff) *
    star.teff *
    (star.teffErrors[SOURCE.temperature] ?? 0);
  return true;
};

const sunlikeRadius = (star: Scratch, recipe: Recipe, writer: Writer): boolean => {
  if (!recipe.usesSunlike || !lightFromG(star)) return false;
  star.radius = radiusFromLuminosity(star.luminosity, star.teff);
  combine(star.radiusErrors, 0.5, star.luminosityErrors, -2, star.teffErrors);
  writer.value("radius", star.radius, star.radius * relativeError(star.radiusErrors));
  writer.method("radius", "light-and-temperature");
  return true;
};

const radiusReason = (star: Scratch, writer: Writer): number | BlankKey => {
  const noMagnitude = writer.blankOf("abs_ks");
  if (noMagnitude !== 0) return noMagnitude;
  if (star.isNotDwarf) return "not-dwarf-like";
  return "outside-radius-relation";
};

export const deriveRadius = (star: Scratch, recipe: Recipe, writer: Writer): void => {
  star.radius = Number.NaN;
  star.luminosity = Number.NaN;
  if (coolRadius(star, recipe, writer) || sunlikeRadius(star, recipe, writer)) return;
  const reason = radiusReason(star, writer);
  if (typeof reason === "number") writer.blankByCode("radius", reason);
  else writer.blank("radius", reason);
};

const lightFromKs = (star: Scratch): boolean => {
  if (!isCool(star)) return false;
  const luminosity = luminosityFromMagnitude(star.absKs, bolometricCorrectionKs(star.bpRp));
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity;
  star.luminosityErrors.fill(0);
  star.luminosityErrors[SOURCE.magnitude] = -LIGHT_PER_MAG * star.absKsError;
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
export const deriveLuminosity = (star: Scratch, recipe: Recipe, writer: Writer): void => {
  const byCorrection = recipe.luminosity === "bolometric-correction";
  if (byCorrection && lightFromKs(star)) writer.method("luminosity", "correction-ks");
  else if (byCorrection && lightFromG(star)) writer.method("luminosity", "correction-g");
  else if (lightFromRadius(star)) writer.method("luminosity", "radius-and-temperature");
  else {
    star.luminosity = Number.NaN;
    writer.blank("luminosity", Number.isNaN(star.teff) ? "needs-teff" : "needs-radius");
    return;
  }
  writer.value("luminosity", star.luminosity, star.luminosity * relativeError(star.luminosityErrors));
};

const coolMass = (star: Scratch, recipe: Recipe, writer: Writer): boolean => {
  if (!isCool(star)) return false;
  const withFeh = recipe.usesFeh && star.hasFeh ? massFromAbsKsFeh(star.absKs, star.feh) : Number.NaN;
  const usesFeh = !Number.isNaN(withFeh);
  star.mass = usesFeh ? withFeh : massFromAbsKs(star.absKs);
  if (Number.isNaN(star.mass)) return false;
  const slope = usesFeh ? logMassFehSlope(star.absKs) : logMassSlope(star.absKs);
  star.massErrors.fill(0);
  star.massErrors[SOURCE.magnitude] = slope * star.absKsError;
  star.massErrors[SOURCE.mass] = usesFeh ? MASS_FEH_SCATTER : MASS_SCATTER;
  if (usesFeh) star.massErrors[SOURCE.iron] = (-0.0035 * star.fehError) / (1 - 0.0035 * star.feh);
  writer.method("mass", usesFeh ? "abs-ks-feh" : "abs-ks");
  return true;
};

const spectralMass = (star: Scratch, recipe: Recipe, writer: Writer): boolean => {
  if (!recipe.usesSunlike || (star.isNotDwarf && !star.hasLogg)) return false;
  star.mass = massFromSpectrum(star.teff, star.logg, star.feh);
  if (Number.isNaN(star.mass)) return false;
  star.massErrors.fill(0);
  star.massErrors[SOURCE.temperature] =
    spectralMassTeffSlope(star.teff) * star.teff * (star.teffErrors[SOURCE.temperature] ?? 0);
  star.massErrors[SOURCE.gravity] = spectralMassLoggSlope(star.logg) * star.loggError;
  star.massErrors[SOURCE.iron] = SPECTRAL_MASS_FEH_SLOPE * star.fehError;
  star.massErrors[SOURCE.mass] = SPECTRAL_MASS_SCATTER;
  if (!star.hasLogg || !star.hasFeh) star.isAssumed = true;
  writer.method("mass", "spectrum");
  return true;
};

const massReason = (star: Scratch, writer: Writer): number | BlankKey => {
  const noMagnitude = writer.blankOf("abs_ks");
  if (noMagnitude !== 0) return noMagnitude;
  return star.isNotDwarf ? "not-dwarf-like" : "outside-mass-relation";
};

/** Mass, and the density that follows from it and the radius. */
export const deriveMass = (star: Scratch, recipe: Recipe, writer: Writer): void => {
  if (!coolMass(star, recipe, writer) && !spectralMass(star, recipe, writer)) {
    star.mass = Number.NaN;
    const reason = massReason(star, writer);
    if (typeof reason === "number") writer.blankByCode("mass", reason);
    else writer.blank("mass", reason);
    writer.blank("density", Number.isNaN(star.radius) ? "needs-radius" : "needs-mass");
    return;
  }
  writer.value("mass", star.mass, star.mass * relativeError(star.massErrors));
  if (Number.isNaN(star.radius)) {
    writer.blank("density", "needs-radius");
    return;
  }
  const density = densityFromMassRadius(star.mass, star.radius);
  combine(star.work, 1, star.massErrors, -3, star.radiusErrors);
  writer.value("density", density, density * relativeError(star.work));
};
