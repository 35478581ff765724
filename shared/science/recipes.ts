/**
 * A recipe names which relation serves which quantity and with which settings. Recipes are immutable: a change is a new
 * version, and results name the one they used.
 */
export interface Recipe {
  readonly key: "default" | "practice";
  readonly version: number;
  readonly name: string;
  /** Largest parallax error over parallax for a distance. */
  readonly parallaxFractionLimit: number;
  /** Offset of the parallaxes, mas, subtracted. */
  readonly parallaxZeroPointMas: number;
  /** RUWE above which a star may be two; a setting of the release. */
  readonly ruweLimit: number;
  /** Whether radius and mass take their [Fe/H] term where [Fe/H] is given. */
  readonly usesFeh: boolean;
  /** Whether colour gives a temperature where none is given. */
  readonly usesColourTeff: boolean;
  /** Whether luminosity comes from magnitude and bolometric correction first, or from R² T⁴ alone. */
  readonly luminosity: "bolometric-correction" | "radius-and-temperature";
  /** Whether stars outside the cool-dwarf relations get a radius from light and temperature. */
  readonly usesSunlike: boolean;
  /** Impact parameter of a duration: a central transit, or the mean over all. */
  readonly duration: "central" | "averaged";
}

export const DEFAULT_RECIPE: Recipe = {
  key: "default",
  version: 1,
  name: "Default",
  parallaxFractionLimit: 0.1,
  parallaxZeroPointMas: 0,
  ruweLimit: 1.4,
  usesFeh: true,
  usesColourTeff: true,
  luminosity: "bolometric-correction",
  usesSunlike: true,
  duration: "averaged",
};

/** The simpler choices of the practice stars: one relation each, central transits. */
export const PRACTICE_RECIPE: Recipe = {
  key: "practice",
  version: 1,
  name: "Practice",
  parallaxFractionLimit: 0.1,
  parallaxZeroPointMas: 0,
  ruweLimit: 1.4,
  usesFeh: false,
  usesColourTeff: false,
  luminosity: "radius-and-temperature",
  usesSunlike: false,
  duration: "central",
};

/** The recipe of that key; an unknown key is a defect of the caller. */
export const findRecipe = (key: string): Recipe => {
  if (key === DEFAULT_RECIPE.key) return DEFAULT_RECIPE;
  if (key === PRACTICE_RECIPE.key) return PRACTICE_RECIPE;
  throw new RangeError(`No recipe is called ${key}.`);
};
