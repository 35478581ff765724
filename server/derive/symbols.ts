import type { RecipeSettings } from "#shared/science/recipes.ts";
import type { Scratch } from "./scratch.ts";

/** Quantities that have a definition: those of the column registry, and steps on the way to them. */
export const STEP_KEYS = [
  "extinction_ks",
  "extinction_g",
  "abs_g",
  "bp_rp",
  "colour",
  "correction_ks",
  "correction_g",
  "insolation_inner",
  "insolation_outer",
  "scaled_axis",
] as const;
export type StepKey = (typeof STEP_KEYS)[number];

type Origin =
  /** A value of the extracts, by its key in the registry. */
  | { readonly kind: "given"; readonly key: string }
  /** Given, else assumed by the recipe. */
  | { readonly kind: "given-or-assumed"; readonly key: "logg" | "feh" }
  | { readonly kind: "recipe" }
  /** A value with workings of its own. */
  | { readonly kind: "quantity"; readonly key: string };

/** A quantity as formulas write it. */
export interface FormulaSymbol {
  readonly name: string;
  readonly unit: string;
  readonly origin: Origin;
  readonly value: (star: Scratch, recipe: RecipeSettings) => number;
  /** One sigma; NaN where it has none. A quantity's error is that of its own workings. */
  readonly error?: (star: Scratch) => number;
}

const given = (
  name: string,
  unit: string,
  key: string,
  value: FormulaSymbol["value"],
  error: (star: Scratch) => number,
): FormulaSymbol => ({ name, unit, origin: { kind: "given", key }, value, error });

const setting = (name: string, unit: string, value: FormulaSymbol["value"]): FormulaSymbol => ({
  name,
  unit,
  origin: { kind: "recipe" },
  value,
});

const quantity = (name: string, unit: string, key: string, value: FormulaSymbol["value"]): FormulaSymbol => ({
  name,
  unit,
  origin: { kind: "quantity", key },
  value,
});

const magnitude = (name: string, key: string, band: "g" | "bp" | "rp" | "v" | "j" | "h" | "ks") =>
  given(
    name,
    "mag",
    key,
    (s) => s[band],
    (s) => s[`${band}Error`],
  );

export const SYMBOLS = {
  plx: given(
    "parallax",
    "mas",
    "parallax",
    (s) => s.parallax,
    (s) => s.parallaxError,
  ),
  sigma_plx: given(
    "error of the parallax",
    "mas",
    "parallax_err",
    (s) => s.parallaxError,
    () => Number.NaN,
  ),
  d_given: given(
    "distance as given",
    "pc",
    "distance",
    (s) => s.distanceGiven,
    (s) => s.distanceGivenError,
  ),
  Ks: magnitude("Ks magnitude", "ks_mag", "ks"),
  G: magnitude("G magnitude", "g_mag", "g"),
  BP: magnitude("BP magnitude", "bp_mag", "bp"),
  RP: magnitude("RP magnitude", "rp_mag", "rp"),
  V: magnitude("V magnitude", "v_mag", "v"),
  J: magnitude("J magnitude", "j_mag", "j"),
  H: magnitude("H magnitude", "h_mag", "h"),
  T_given: given(
    "temperature as given",
    "K",
    "teff",
    (s) => s.teffGiven,
    (s) => s.teffGivenError,
  ),
  logg: {
    name: "log g",
    unit: "dex(cm.s-2)",
    origin: { kind: "given-or-assumed", key: "logg" },
    value: (s) => s.logg,
    error: (s) => s.loggError,
  },
  FeH: {
    name: "[Fe/H]",
    unit: "dex",
    origin: { kind: "given-or-assumed", key: "feh" },
    value: (s) => s.feh,
    error: (s) => s.fehError,
  },

  zp: setting("parallax zero point", "mas", (_, r) => r.distance.zeroPointMas),
  L_prior: setting("length scale of the volume prior", "pc", (_, r) => r.distance.priorLengthPc),
  E_BV: {
    name: "colour excess E(B − V)",
    unit: "mag",
    origin: { kind: "recipe" },
    value: (s) => s.ebv,
    error: (s) => s.ebvError,
  },
  R_C: setting("reddening of the colour per E(B − V)", "", (s) => s.colourPerExcess),
  R_BP_RP: setting("reddening of BP − RP per E(B − V)", "", (s) => s.bpRpPerExcess),
  f_plx: setting(
    "relative error of the parallax",
    "",
    (s, r) => s.parallaxError / (s.parallax - r.distance.zeroPointMas),
  ),
  k_P: setting("factor of the eccentricity on the probability", "", (s) => s.probabilityFactor),
  k_T: setting("factor of the eccentricity on the duration", "", (s) => s.durationFactor),
  k_chord: setting(
    "chord of the transit over the diameter: 1 through the centre, π/4 on average",
    "",
    (_, r) => (r.duration === "central" ? 1 : Math.PI / 4),
  ),

  d: quantity("distance", "pc", "distance", (s) => s.distance),
  A_Ks: quantity("extinction in Ks", "mag", "extinction_ks", (s) => s.extinctionKs),
  A_G: quantity("extinction in G", "mag", "extinction_g", (s) => s.extinctionG),
  c_0: setting("BP − RP less 0.8 E(B − V)", "mag", (s) => s.firstColour),
  M_Ks: quantity("absolute magnitude in Ks", "mag", "abs_ks", (s) => s.absKs),
  M_G: quantity("absolute magnitude in G", "mag", "abs_g", (s) => s.absG),
  BP_RP: quantity("colour BP − RP, without reddening", "mag", "bp_rp", (s) => s.bpRp),
  C: quantity("colour, without reddening", "mag", "colour", (s) => s.colour),
  T_eff: quantity("effective temperature", "K", "teff", (s) => s.teff),
  BC_Ks: quantity("bolometric correction to Ks", "mag", "correction_ks", (s) => s.correctionKs),
  BC_G: quantity("bolometric correction to G", "mag", "correction_g", (s) => s.correctionG),
  L: quantity("luminosity", "solLum", "luminosity", (s) => s.luminosity),
  R: quantity("radius of the star", "solRad", "radius", (s) => s.radius),
  M: quantity("mass of the star", "solMass", "mass", (s) => s.mass),
  S_in: quantity(
    "insolation at the inner edge, Earth's = 1",
    "",
    "insolation_inner",
    (s) => s.insolationInner,
  ),
  S_out: quantity(
    "insolation at the outer edge, Earth's = 1",
    "",
    "insolation_outer",
    (s) => s.insolationOuter,
  ),
  a_in: quantity("distance of the inner edge", "AU", "hz_inner", (s) => s.innerAxis),
  a_out: quantity("distance of the outer edge", "AU", "hz_outer", (s) => s.outerAxis),
  a_E: quantity("distance of Earth's insolation", "AU", "earth_distance", (s) => s.earthAxis),
  P_E: quantity("period at Earth's insolation", "d", "earth_period", (s) => s.earthPeriod),
  a_R: quantity("semi-major axis over stellar radius", "", "scaled_axis", (s) => s.scaledAxis),
} as const satisfies Record<string, FormulaSymbol>;

export type SymbolKey = keyof typeof SYMBOLS;
