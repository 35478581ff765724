import { massScatter } from "#shared/science/cool-dwarf-mass-scatter.ts";
import {
  logMassFehSlope,
  logMassSlope,
  MASS_COEFFICIENTS,
  MASS_FEH,
  MASS_FEH_COEFFICIENTS,
  MASS_FEH_TERM,
  MASS_ZERO_POINT,
  massFromAbsKs,
  massFromAbsKsFeh,
} from "#shared/science/cool-dwarfs.ts";
import { EXTINCTION_COEFFICIENTS } from "#shared/science/extinction.ts";
import { densityFromMassRadius } from "#shared/science/luminosity.ts";
import type { MassMethod, RecipeSettings } from "#shared/science/recipes.ts";
import {
  massFromSpectrum,
  SPECTRAL_MASS_COEFFICIENTS,
  SPECTRAL_MASS_FEH_SLOPE,
  SPECTRAL_MASS_SCATTER,
  spectralMassLoggSlope,
  spectralMassTeffSlope,
} from "#shared/science/sunlike.ts";
import { byMethod, type Definition, type DefinitionOf, only } from "./definition.ts";
import { isCool, isTooHot } from "./dwarf.ts";
import { percent, polynomial, shifted, term } from "./formula-text.ts";
import { combine, SOURCE, scale, setMagnitudeErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";
import { spectralFormula } from "./spectral.ts";

const MANN_2019 = "Mann et al. 2019, ApJ 871, 63, Table 6";
/** By magnitude, from the authors' own table. */
const SCATTER_WORDS = "2.1 to 3.6 % by magnitude";
const MAGNITUDE = shifted("M_Ks", MASS_ZERO_POINT);

const COOL: Definition = {
  method: "abs-ks",
  formula: `10^(${polynomial(MAGNITUDE, MASS_COEFFICIENTS)})`,
  inputs: ["M_Ks"],
  ranges: ({ ranges }) => [{ symbol: "M_Ks", from: ranges.brightestAbsKs, to: ranges.faintestAbsKs }],
  scatter: SCATTER_WORDS,
  reference: `${MANN_2019}, eq. 4.`,
  compute: ({ absKs }) => massFromAbsKs(absKs),
};

const COOL_FEH: Definition = {
  method: "abs-ks-feh",
  formula: `(1 ${term(MASS_FEH_TERM, "FeH")}) * 10^(${polynomial(MAGNITUDE, MASS_FEH_COEFFICIENTS)})`,
  inputs: ["M_Ks", "FeH"],
  ranges: ({ ranges }) => [
    { symbol: "M_Ks", from: ranges.brightestAbsKs, to: ranges.faintestAbsKs },
    { symbol: "FeH", from: MASS_FEH.least, to: MASS_FEH.most },
  ],
  scatter: SCATTER_WORDS,
  reference: `${MANN_2019}, eq. 5.`,
  compute: ({ absKs, feh }) => massFromAbsKsFeh(absKs, feh),
};

const FROM_SPECTRUM: Definition = {
  method: "spectrum",
  formula: spectralFormula(SPECTRAL_MASS_COEFFICIENTS),
  inputs: ["T_eff", "logg", "FeH"],
  scatter: percent(SPECTRAL_MASS_SCATTER),
  reference: "Torres, Andersen & Giménez 2010, A&A Rev. 18, 67, eq. 5 and Table 4.",
  compute: ({ teff, logg, feh }) => massFromSpectrum(teff, logg, feh),
};

const DENSITY: Definition = {
  method: null,
  formula: "M / R^3",
  inputs: ["M", "R"],
  reference: "Mean density in solar units.",
  compute: ({ mass, radius }) => densityFromMassRadius(mass, radius),
};

export const MASS_DEFINITIONS = {
  mass: byMethod(COOL, COOL_FEH, FROM_SPECTRUM),
  density: only(DENSITY),
} satisfies Record<string, DefinitionOf>;

const adoptCool = (star: Scratch, mass: number, slope: number, out: Slots, by: Definition): void => {
  const scatter = massScatter(star.absKs);
  star.mass = mass * (1 + scatter * star.deviates.mass);
  const perExcess = EXTINCTION_COEFFICIENTS.ks[0];
  setMagnitudeErrors(star.massErrors, slope, star, SOURCE.ks, star.ksError, perExcess);
  star.massErrors[SOURCE.mass] = scatter;
  out.mass.method(star.row, by.method);
};

const coolMass = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!isCool(star, recipe)) return false;
  const withFeh = recipe.usesFeh && star.hasFeh ? COOL_FEH.compute(star, recipe) : Number.NaN;
  if (!Number.isNaN(withFeh)) {
    adoptCool(star, withFeh, logMassFehSlope(star.absKs), out, COOL_FEH);
    star.massErrors[SOURCE.iron] = (MASS_FEH_TERM * star.fehError) / (1 + MASS_FEH_TERM * star.feh);
    return true;
  }
  const mass = COOL.compute(star, recipe);
  if (Number.isNaN(mass)) return false;
  adoptCool(star, mass, logMassSlope(star.absKs), out, COOL);
  return true;
};

/** A gravity is assumed for a star that its place shows to be a dwarf, and for no other. */
const spectralMass = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (!(star.hasLogg || star.isDwarf)) return false;
  const mass = FROM_SPECTRUM.compute(star, recipe);
  if (Number.isNaN(mass)) return false;
  star.mass = mass * (1 + SPECTRAL_MASS_SCATTER * star.deviates.mass);
  const errors = star.massErrors;
  scale(errors, spectralMassTeffSlope(star.teff) * star.teff, star.teffErrors);
  errors[SOURCE.gravity] = (errors[SOURCE.gravity] ?? 0) + spectralMassLoggSlope(star.logg) * star.loggError;
  errors[SOURCE.iron] = (errors[SOURCE.iron] ?? 0) + SPECTRAL_MASS_FEH_SLOPE * star.fehError;
  errors[SOURCE.mass] = SPECTRAL_MASS_SCATTER;
  if (!star.hasLogg || !star.hasFeh) star.isAssumed = true;
  out.mass.method(star.row, FROM_SPECTRUM.method);
  return true;
};

const tryMethod = (method: MassMethod, star: Scratch, recipe: RecipeSettings, out: Slots): boolean =>
  method === "abs-ks" ? coolMass(star, recipe, out) : spectralMass(star, recipe, out);

/** Mass by the first method of the recipe that holds. */
export const deriveMass = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  for (const method of recipe.mass) {
    if (!tryMethod(method, star, recipe, out)) continue;
    out.mass.value(star.row, star.mass, star.massErrors);
    return;
  }
  star.mass = Number.NaN;
  if (star.isNotDwarf) out.mass.blank(star.row, "not-dwarf-like");
  else if (out.abs_ks.isBlank(star.row)) out.mass.blankLike(star.row, out.abs_ks);
  else out.mass.blank(star.row, isTooHot(star, recipe) ? "hotter-than-cool-dwarfs" : "outside-mass-relation");
};

export const deriveDensity = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  star.density = DENSITY.compute(star, recipe);
  if (Number.isNaN(star.radius)) out.density.blank(star.row, "needs-radius");
  else if (Number.isNaN(star.mass)) out.density.blank(star.row, "needs-mass");
  else {
    combine(star.work, 1, star.massErrors, -3, star.radiusErrors);
    out.density.value(star.row, star.density, star.work);
  }
};
