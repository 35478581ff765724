import {
  COOL_DWARF_ABS_KS,
  RADIUS_COEFFICIENTS,
  RADIUS_FEH,
  RADIUS_FEH_COEFFICIENTS,
  RADIUS_FEH_SCATTER,
  RADIUS_FEH_TERM,
  RADIUS_SCATTER,
  radiusFehSlope,
  radiusFromAbsKs,
  radiusFromAbsKsFeh,
  radiusSlope,
} from "#shared/science/cool-dwarfs.ts";
import { EXTINCTION_COEFFICIENTS } from "#shared/science/extinction.ts";
import { radiusFromLuminosity } from "#shared/science/luminosity.ts";
import type { RadiusMethod, RecipeSettings } from "#shared/science/recipes.ts";
import {
  radiusFromSpectrum,
  SPECTRAL_RADIUS_COEFFICIENTS,
  SPECTRAL_RADIUS_FEH_SLOPE,
  SPECTRAL_RADIUS_SCATTER,
  spectralRadiusLoggSlope,
  spectralRadiusTeffSlope,
} from "#shared/science/spectral-radius.ts";
import { byMethod, type Definition, type DefinitionOf } from "./definition.ts";
import { isCool, isTooHot } from "./dwarf.ts";
import { percent, polynomial, term } from "./formula-text.ts";
import { lightByCorrection } from "./luminosity.ts";
import { combine, SOURCE, scale, setMagnitudeErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";
import { SOLAR_TEMPERATURE } from "./solar.ts";
import { spectralFormula } from "./spectral.ts";

const MANN_2015 = "Mann et al. 2015, ApJ 804, 64, Table 1, with the erratum 2016, ApJ 819, 87";

const COOL: Definition = {
  method: "abs-ks",
  formula: polynomial("M_Ks", RADIUS_COEFFICIENTS),
  inputs: ["M_Ks"],
  ranges: ({ ranges }) => [{ symbol: "M_Ks", from: ranges.brightestAbsKs, to: ranges.faintestAbsKs }],
  scatter: percent(RADIUS_SCATTER),
  reference: `${MANN_2015}, eq. 4; published for ${COOL_DWARF_ABS_KS.brightest} to ${COOL_DWARF_ABS_KS.faintest}.`,
  compute: ({ absKs }) => radiusFromAbsKs(absKs),
};

const COOL_FEH: Definition = {
  ...COOL,
  method: "abs-ks-feh",
  formula: `(${polynomial("M_Ks", RADIUS_FEH_COEFFICIENTS)}) * (1 ${term(RADIUS_FEH_TERM, "FeH")})`,
  inputs: ["M_Ks", "FeH"],
  ranges: ({ ranges }) => [
    { symbol: "M_Ks", from: ranges.brightestAbsKs, to: ranges.faintestAbsKs },
    { symbol: "FeH", from: RADIUS_FEH.least, to: RADIUS_FEH.most },
  ],
  scatter: percent(RADIUS_FEH_SCATTER),
  reference: `${MANN_2015}, eq. 5.`,
  compute: ({ absKs, feh }) => radiusFromAbsKsFeh(absKs, feh),
};

const FROM_LIGHT: Definition = {
  method: "light-and-temperature",
  formula: "sqrt(L) * (T_sun / T_eff)^2",
  inputs: ["L", "T_eff"],
  constants: [SOLAR_TEMPERATURE],
  reference: "Stefan–Boltzmann in solar units.",
  compute: ({ luminosity, teff }) => radiusFromLuminosity(luminosity, teff),
};

const FROM_SPECTRUM: Definition = {
  method: "spectrum-size",
  formula: spectralFormula(SPECTRAL_RADIUS_COEFFICIENTS),
  inputs: ["T_eff", "logg", "FeH"],
  scatter: percent(SPECTRAL_RADIUS_SCATTER),
  reference: "Torres, Andersen & Giménez 2010, A&A Rev. 18, 67, eq. 6 and Table 4.",
  compute: ({ teff, logg, feh }) => radiusFromSpectrum(teff, logg, feh),
};

export const RADIUS_DEFINITIONS = {
  radius: byMethod(COOL, COOL_FEH, FROM_LIGHT, FROM_SPECTRUM),
} satisfies Record<string, DefinitionOf>;

const adoptCool = (
  star: Scratch,
  radius: number,
  slope: number,
  scatter: number,
  out: Slots,
  by: Definition,
) => {
  star.radius = radius * (1 + scatter * star.deviates.radius);
  const perExcess = EXTINCTION_COEFFICIENTS.ks[0];
  setMagnitudeErrors(star.radiusErrors, slope / radius, star, SOURCE.ks, star.ksError, perExcess);
  star.radiusErrors[SOURCE.radius] = scatter;
  out.radius.method(star.row, by.method);
};

/** [Fe/H] term where it is given, inside its range and wanted; else the relation without. */
const coolRadius = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!isCool(star, recipe)) return false;
  const withFeh = recipe.usesFeh && star.hasFeh ? COOL_FEH.compute(star, recipe) : Number.NaN;
  if (!Number.isNaN(withFeh)) {
    const slope = radiusFehSlope(star.absKs, star.feh);
    adoptCool(star, withFeh, slope, RADIUS_FEH_SCATTER, out, COOL_FEH);
    star.radiusErrors[SOURCE.iron] = (RADIUS_FEH_TERM * star.fehError) / (1 + RADIUS_FEH_TERM * star.feh);
    return true;
  }
  const radius = COOL.compute(star, recipe);
  if (Number.isNaN(radius)) return false;
  adoptCool(star, radius, radiusSlope(star.absKs), RADIUS_SCATTER, out, COOL);
  return true;
};

const radiusFromLight = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!lightByCorrection(star, recipe)) return false;
  star.radius = FROM_LIGHT.compute(star, recipe);
  combine(star.radiusErrors, 0.5, star.luminosityErrors, -2, star.teffErrors);
  out.radius.method(star.row, FROM_LIGHT.method);
  return true;
};

/** A gravity is assumed for a star that its place shows to be a dwarf, and for no other. */
const spectralRadius = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!(star.hasLogg || star.isDwarf)) return false;
  const radius = FROM_SPECTRUM.compute(star, recipe);
  if (Number.isNaN(radius)) return false;
  star.radius = radius * (1 + SPECTRAL_RADIUS_SCATTER * star.deviates.radius);
  const errors = star.radiusErrors;
  scale(errors, spectralRadiusTeffSlope(star.teff) * star.teff, star.teffErrors);
  errors[SOURCE.gravity] =
    (errors[SOURCE.gravity] ?? 0) + spectralRadiusLoggSlope(star.logg) * star.loggError;
  errors[SOURCE.iron] = (errors[SOURCE.iron] ?? 0) + SPECTRAL_RADIUS_FEH_SLOPE * star.fehError;
  errors[SOURCE.radius] = SPECTRAL_RADIUS_SCATTER;
  if (!star.hasLogg || !star.hasFeh) star.isAssumed = true;
  out.radius.method(star.row, FROM_SPECTRUM.method);
  return true;
};

const tryMethod = (method: RadiusMethod, star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (method === "abs-ks") return coolRadius(star, recipe, out);
  return method === "spectrum" ? spectralRadius(star, recipe, out) : radiusFromLight(star, recipe, out);
};

/** Radius by the first method of the recipe that holds. */
export const deriveRadius = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  star.lightMethod = null;
  for (const method of recipe.radius) {
    if (!tryMethod(method, star, recipe, out)) continue;
    out.radius.value(star.row, star.radius, star.radiusErrors);
    return;
  }
  star.radius = Number.NaN;
  if (star.isNotDwarf) out.radius.blank(star.row, "not-dwarf-like");
  else if (out.abs_ks.isBlank(star.row)) out.radius.blankLike(star.row, out.abs_ks);
  else
    out.radius.blank(
      star.row,
      isTooHot(star, recipe) ? "hotter-than-cool-dwarfs" : "outside-radius-relation",
    );
};
