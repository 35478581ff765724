/**
 * A recipe says which relation serves which quantity, in which order of preference, with which ranges and settings.
 * Recipes are immutable: a change is a new version, and results name the one they used.
 */
import type { EccentricityPrior } from "./eccentricity.ts";
import type { HabitableLimit } from "./habitable-zone.ts";

/** Colours that can give a sun-like star its temperature (Casagrande et al. 2021). */
export const SUNLIKE_COLOURS = [
  "bp-rp",
  "bp-j",
  "bp-h",
  "bp-ks",
  "rp-j",
  "rp-h",
  "rp-ks",
  "g-j",
  "g-h",
  "g-ks",
  "g-bp",
  "g-rp",
] as const;
export type SunlikeColour = (typeof SUNLIKE_COLOURS)[number];

/** Colours that can give a cool dwarf its temperature (Mann et al. 2015). */
export const COOL_COLOURS = ["bp-rp", "v-j"] as const;
export type CoolColour = (typeof COOL_COLOURS)[number];

export const DISTANCE_METHODS = ["given-distance", "inversion", "volume-prior"] as const;
export type DistanceMethod = (typeof DISTANCE_METHODS)[number];

export const TEFF_METHODS = ["given", "sunlike-colour", "cool-colour"] as const;
export type TeffMethod = (typeof TEFF_METHODS)[number];

export const RADIUS_METHODS = ["abs-ks", "light-and-temperature", "spectrum"] as const;
export type RadiusMethod = (typeof RADIUS_METHODS)[number];

export const MASS_METHODS = ["abs-ks", "spectrum"] as const;
export type MassMethod = (typeof MASS_METHODS)[number];

export const LUMINOSITY_METHODS = ["correction-ks", "correction-g", "radius-and-temperature"] as const;
export type LuminosityMethod = (typeof LUMINOSITY_METHODS)[number];

/** How much dust dims and reddens a star, as the colour excess E(B − V). */
export type ExtinctionRule =
  | { readonly rule: "off" }
  /** The same for every star, mag. */
  | { readonly rule: "constant"; readonly ebv: number }
  /** As the extract gives it; a star without it counts as not reddened and says so. */
  | { readonly rule: "column" }
  /** In proportion to the distance, mag per kiloparsec. */
  | { readonly rule: "by-distance"; readonly ebvPerKpc: number };

export interface RecipeSettings {
  readonly distance: {
    readonly order: readonly DistanceMethod[];
    /** Largest parallax error over parallax for a distance by inversion. */
    readonly fractionLimit: number;
    /** Offset of the parallaxes, mas, subtracted. */
    readonly zeroPointMas: number;
    /** Length scale of the volume prior, pc. */
    readonly priorLengthPc: number;
  };
  /** Quality of the astrometric fit (RUWE) above which a star may be two: a setting of each catalogue release. */
  readonly astrometricQuality: {
    readonly limit: number;
    readonly byRelease: readonly { readonly release: string; readonly limit: number }[];
  };
  readonly extinction: ExtinctionRule;
  /** What dwarfs take where log g or [Fe/H] is not given. */
  readonly assumed: {
    readonly logg: number;
    readonly loggError: number;
    readonly feh: number;
    readonly fehError: number;
  };
  /** Whether radius and mass take their [Fe/H] term where [Fe/H] is given. */
  readonly usesFeh: boolean;
  /** Relations in order of preference: the first that holds serves. */
  readonly teff: readonly TeffMethod[];
  readonly sunlikeColours: readonly SunlikeColour[];
  readonly coolColours: readonly CoolColour[];
  readonly radius: readonly RadiusMethod[];
  readonly mass: readonly MassMethod[];
  readonly luminosity: readonly LuminosityMethod[];
  /** Ranges of use, inside the published ones. */
  readonly ranges: {
    /** M_Ks of the cool-dwarf relations, mag. */
    readonly brightestAbsKs: number;
    readonly faintestAbsKs: number;
    /** Hotter stars are no cool dwarfs, K. */
    readonly hottestCoolDwarfK: number;
    /** Cooler stars take no sun-like colour temperature, K. */
    readonly coolestSunlikeK: number;
  };
  readonly habitableZone: { readonly inner: HabitableLimit; readonly outer: HabitableLimit };
  readonly eccentricity: EccentricityPrior;
  /** Impact parameter of a duration: a central transit, or the mean over all. */
  readonly duration: "central" | "averaged";
  /** How a signal is weighed: as the campaign says, or always as a box or a trapezoid. */
  readonly statistic: "campaign" | "boxcar" | "trapezoid";
}

/** A recipe that every programme starts with; later ones are saved by people. */
export interface Recipe {
  readonly name: string;
  readonly note: string;
  readonly settings: RecipeSettings;
}

export const DEFAULT_RECIPE: Recipe = {
  name: "Default",
  note: "Published relations in their order of trust, inside their published ranges.",
  settings: {
    distance: {
      order: ["given-distance", "inversion"],
      fractionLimit: 0.1,
      zeroPointMas: 0,
      priorLengthPc: 1350,
    },
    astrometricQuality: { limit: 1.4, byRelease: [] },
    extinction: { rule: "off" },
    assumed: { logg: 4.5, loggError: 0.3, feh: 0, fehError: 0.2 },
    usesFeh: true,
    teff: ["given", "sunlike-colour", "cool-colour"],
    sunlikeColours: ["bp-rp", "g-ks", "g-j"],
    coolColours: ["bp-rp", "v-j"],
    radius: ["abs-ks", "light-and-temperature"],
    mass: ["abs-ks", "spectrum"],
    luminosity: ["correction-ks", "correction-g", "radius-and-temperature"],
    ranges: { brightestAbsKs: 4.6, faintestAbsKs: 9.8, hottestCoolDwarfK: 4200, coolestSunlikeK: 4000 },
    habitableZone: { inner: "runaway-greenhouse", outer: "maximum-greenhouse" },
    eccentricity: { prior: "circular" },
    duration: "averaged",
    statistic: "campaign",
  },
};

/** The simpler choices of the practice stars: one relation each, central transits. */
export const PRACTICE_RECIPE: Recipe = {
  name: "Practice",
  note: "One relation for each quantity and central transits, as the practice stars are worked out by hand.",
  settings: {
    ...DEFAULT_RECIPE.settings,
    distance: { ...DEFAULT_RECIPE.settings.distance, order: ["inversion"] },
    usesFeh: false,
    teff: ["given"],
    radius: ["abs-ks"],
    mass: ["abs-ks"],
    luminosity: ["radius-and-temperature"],
    duration: "central",
  },
};
