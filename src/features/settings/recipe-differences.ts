import type { RecipeSettings } from "#shared/science/recipes.ts";

const yesNo = (is: boolean): string => (is ? "yes" : "no");

/** Each setting of a recipe in the reader's words. */
const SETTINGS: readonly { label: string; of: (settings: RecipeSettings) => string }[] = [
  {
    label: "Distance needs a parallax error of at most",
    of: ({ distance }) => `${distance.fractionLimit * 100} %`,
  },
  { label: "Parallax offset taken off", of: ({ distance }) => `${distance.zeroPointMas} mas` },
  {
    label: "RUWE above which a star may be two",
    of: ({ astrometricQuality }) => String(astrometricQuality.limit),
  },
  { label: "[Fe/H] enters radius and mass", of: ({ usesFeh }) => yesNo(usesFeh) },
  { label: "Colour gives a missing temperature", of: ({ teff }) => yesNo(teff.includes("cool-colour")) },
  {
    label: "Luminosity comes from",
    of: ({ luminosity }) =>
      luminosity.includes("correction-ks") ? "magnitude and bolometric correction" : "radius and temperature",
  },
  {
    label: "Radius outside the cool-dwarf relations",
    of: ({ radius }) => yesNo(radius.includes("light-and-temperature")),
  },
  {
    label: "Duration of a transit",
    of: ({ duration }) => (duration === "central" ? "central transit" : "mean over all impact parameters"),
  },
];

export interface RecipeDifference {
  label: string;
  /** In the order of the recipes. */
  values: string[];
}

/** The settings in which the recipes differ. */
export const recipeDifferences = (
  recipes: readonly { readonly settings: RecipeSettings }[],
): RecipeDifference[] =>
  SETTINGS.map(({ label, of }) => ({ label, values: recipes.map(({ settings }) => of(settings)) })).filter(
    ({ values }) => new Set(values).size > 1,
  );
