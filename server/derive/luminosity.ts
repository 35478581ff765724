import { SOLAR_MBOL } from "#shared/science/constants.ts";
import {
  BC_KS_COEFFICIENTS,
  BC_KS_SCATTER,
  bolometricCorrectionKs,
  bolometricCorrectionKsSlope,
  COOL_DWARF_BP_RP,
} from "#shared/science/cool-dwarfs.ts";
import { EXTINCTION_COEFFICIENTS } from "#shared/science/extinction.ts";
import { luminosityFromMagnitude, luminosityFromRadius } from "#shared/science/luminosity.ts";
import type { LuminosityMethod, RecipeSettings } from "#shared/science/recipes.ts";
import {
  BC_G_BRANCH_K,
  BC_G_COOL_COEFFICIENTS,
  BC_G_HOT_COEFFICIENTS,
  BC_G_TEFF_K,
  BC_G_ZERO_POINT_K,
  bolometricCorrectionG,
  bolometricCorrectionGSlope,
} from "#shared/science/sunlike.ts";
import { dimmingSlope } from "./brightness.ts";
import { addColour, BP_RP_BANDS } from "./colour-errors.ts";
import { byMethod, type Definition, type DefinitionOf, only } from "./definition.ts";
import { isCool } from "./dwarf.ts";
import { polynomial, shifted } from "./formula-text.ts";
import { addScaled, combine, SOURCE, setMagnitudeErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";
import { SOLAR_TEMPERATURE } from "./solar.ts";

/** Relative change of a luminosity per magnitude, of the star or of its bolometric correction. */
const LIGHT_PER_MAG = -0.4 * Math.LN10;
/** Scatter of the bolometric correction to G, mag: a judgement of this project, the paper gives it by model only. */
const BC_G_SCATTER = 0.05;

const SOLAR_MAGNITUDE = {
  symbol: "M_sun",
  value: SOLAR_MBOL,
  unit: "mag",
  source: "Bolometric magnitude of the Sun, IAU 2015 Resolution B2",
};

const CORRECTION_KS: Definition = {
  method: null,
  formula: polynomial("BP_RP", BC_KS_COEFFICIENTS),
  inputs: ["BP_RP"],
  ranges: () => [{ symbol: "BP_RP", from: COOL_DWARF_BP_RP.bluest, to: COOL_DWARF_BP_RP.reddest }],
  scatter: `${BC_KS_SCATTER} mag`,
  reference: "A fit of this project to the 50 stars published with Mann et al. 2015, ApJ 804, 64.",
  compute: ({ bpRp }) => bolometricCorrectionKs(bpRp),
};

const correctionG = (coefficients: readonly number[], from: number, to: number): Definition => ({
  method: null,
  formula: polynomial(shifted("T_eff", BC_G_ZERO_POINT_K), coefficients),
  inputs: ["T_eff"],
  ranges: () => [{ symbol: "T_eff", from, to }],
  scatter: `${BC_G_SCATTER} mag, a judgement of this project`,
  reference: "Andrae et al. 2018, A&A 616, A8, eq. 7 and Table 4.",
  compute: ({ teff }) => bolometricCorrectionG(teff),
});

/** The two branches of the correction, told apart by temperature. */
const CORRECTIONS_G = [
  correctionG(BC_G_HOT_COEFFICIENTS, BC_G_BRANCH_K, BC_G_TEFF_K.hottest),
  correctionG(BC_G_COOL_COEFFICIENTS, BC_G_TEFF_K.coolest, BC_G_BRANCH_K),
] as const;

const LIGHT_FROM_KS: Definition = {
  method: "correction-ks",
  formula: "10^(0.4 * (M_sun - M_Ks - BC_Ks))",
  inputs: ["M_Ks", "BC_Ks"],
  constants: [SOLAR_MAGNITUDE],
  reference: "Definition of bolometric magnitude, IAU 2015 Resolution B2.",
  compute: ({ absKs, correctionKs }) => luminosityFromMagnitude(absKs, correctionKs),
};

const LIGHT_FROM_G: Definition = {
  method: "correction-g",
  formula: "10^(0.4 * (M_sun - M_G - BC_G))",
  inputs: ["M_G", "BC_G"],
  constants: [SOLAR_MAGNITUDE],
  reference: "Definition of bolometric magnitude, IAU 2015 Resolution B2.",
  compute: (star) => luminosityFromMagnitude(star.absG, star.correctionG),
};

const LIGHT_FROM_RADIUS: Definition = {
  method: "radius-and-temperature",
  formula: "R^2 * (T_eff / T_sun)^4",
  inputs: ["R", "T_eff"],
  constants: [SOLAR_TEMPERATURE],
  reference: "Stefan–Boltzmann in solar units.",
  compute: ({ radius, teff }) => luminosityFromRadius(radius, teff),
};

/** Which branch of the correction to G a temperature takes. */
const correctionGOf = (teffK: number): Definition => CORRECTIONS_G[teffK >= BC_G_BRANCH_K ? 0 : 1];

export const LUMINOSITY_DEFINITIONS = {
  correction_ks: only(CORRECTION_KS),
  correction_g: ({ teff }) => correctionGOf(teff),
  luminosity: byMethod(LIGHT_FROM_KS, LIGHT_FROM_G, LIGHT_FROM_RADIUS),
} satisfies Record<string, DefinitionOf>;

const lightFromG = (star: Scratch, recipe: RecipeSettings): boolean => {
  star.correctionG = correctionGOf(star.teff).compute(star, recipe);
  const luminosity = LIGHT_FROM_G.compute(star, recipe);
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity * (1 + LIGHT_PER_MAG * BC_G_SCATTER * star.deviates.light);
  const errors = star.luminosityErrors;
  setMagnitudeErrors(errors, LIGHT_PER_MAG, star, SOURCE.g, star.gError, dimmingSlope(star, "g"));
  errors[SOURCE.light] = LIGHT_PER_MAG * BC_G_SCATTER;
  addScaled(errors, LIGHT_PER_MAG * bolometricCorrectionGSlope(star.teff) * star.teff, star.teffErrors);
  return true;
};

const lightFromKs = (star: Scratch, recipe: RecipeSettings): boolean => {
  if (!isCool(star, recipe)) return false;
  star.correctionKs = CORRECTION_KS.compute(star, recipe);
  const luminosity = LIGHT_FROM_KS.compute(star, recipe);
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity * (1 + LIGHT_PER_MAG * BC_KS_SCATTER * star.deviates.light);
  const errors = star.luminosityErrors;
  setMagnitudeErrors(errors, LIGHT_PER_MAG, star, SOURCE.ks, star.ksError, EXTINCTION_COEFFICIENTS.ks[0]);
  addColour(errors, LIGHT_PER_MAG * bolometricCorrectionKsSlope(star.bpRp), star, BP_RP_BANDS);
  errors[SOURCE.light] = LIGHT_PER_MAG * BC_KS_SCATTER;
  return true;
};

const lightFromRadius = (star: Scratch, recipe: RecipeSettings): boolean => {
  const luminosity = LIGHT_FROM_RADIUS.compute(star, recipe);
  if (Number.isNaN(luminosity)) return false;
  star.luminosity = luminosity;
  combine(star.luminosityErrors, 2, star.radiusErrors, 4, star.teffErrors);
  return true;
};

const tryMethod = (method: LuminosityMethod, star: Scratch, recipe: RecipeSettings): boolean => {
  if (method === "correction-ks") return lightFromKs(star, recipe);
  return method === "correction-g" ? lightFromG(star, recipe) : lightFromRadius(star, recipe);
};

/**
 * Luminosity without a radius, into the scratch, for a radius that rests on it: by the first bolometric correction of the
 * recipe that holds. False where none does.
 */
export const lightByCorrection = (star: Scratch, recipe: RecipeSettings): boolean => {
  for (const method of recipe.luminosity) {
    if (method === "radius-and-temperature" || !tryMethod(method, star, recipe)) continue;
    star.lightMethod = method;
    return true;
  }
  return false;
};

const write = (star: Scratch, out: Slots, method: LuminosityMethod): void => {
  out.luminosity.method(star.row, method);
  out.luminosity.value(star.row, star.luminosity, star.luminosityErrors);
};

/** Luminosity by the first method of the recipe that holds; one that a radius rests on stays as it is. */
export const deriveLuminosity = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  if (star.lightMethod !== null) {
    write(star, out, star.lightMethod);
    return;
  }
  for (const method of recipe.luminosity) {
    if (!tryMethod(method, star, recipe)) continue;
    write(star, out, method);
    return;
  }
  star.luminosity = Number.NaN;
  out.luminosity.blank(star.row, Number.isNaN(star.teff) ? "needs-teff" : "needs-radius");
};
