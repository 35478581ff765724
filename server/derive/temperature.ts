import type { MethodKey } from "#shared/catalogue/methods.ts";
import {
  COOL_DWARF_COLOURS,
  COOL_DWARF_ROWS,
  COOL_DWARF_ZERO_POINT_K,
  type CoolDwarfRow,
  coolDwarfTeffColourSlope,
  coolDwarfTeffFromColour,
  coolDwarfTeffScatter,
} from "#shared/science/cool-dwarf-colours.ts";
import { COOL_DWARF_TEFF_UNIT_K } from "#shared/science/cool-dwarfs.ts";
import {
  COOL_COLOURS,
  type CoolColour,
  type RecipeSettings,
  SUNLIKE_COLOURS,
  type SunlikeColour,
  type TeffMethod,
} from "#shared/science/recipes.ts";
import { SUNLIKE_TEFF_SCATTER_K } from "#shared/science/sunlike.ts";
import {
  SUNLIKE_LOGG,
  SUNLIKE_ROWS,
  type SunlikeRow,
  sunlikeTeffColourSlope,
  sunlikeTeffFromColour,
  sunlikeTeffGravitySlope,
  sunlikeTeffIronSlope,
} from "#shared/science/sunlike-colours.ts";
import { BRIGHTEST_MAG, FAINTEST_SATURATED_G } from "#shared/science/survey-photometry.ts";
import { perExcess } from "./brightness.ts";
import { addColour, type Band, type Colour } from "./colour-errors.ts";
import { byMethod, type Definition, type DefinitionOf } from "./definition.ts";
import { polynomial, sum, term } from "./formula-text.ts";
import { at, errorAt, type Inputs } from "./inputs.ts";
import { SOURCE } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";
import type { SymbolKey } from "./symbols.ts";

const BAND_SYMBOLS = {
  g: "G",
  bp: "BP",
  rp: "RP",
  j: "J",
  h: "H",
  ks: "Ks",
  v: "V",
} as const satisfies Record<Band, SymbolKey>;

const GIVEN: Definition = {
  method: "given",
  formula: "T_given",
  inputs: ["T_given"],
  reference: "As given by the preferred extract.",
  compute: ({ teffGiven }) => (teffGiven > 0 ? teffGiven : Number.NaN),
};

const sunlikeMethod = (colour: SunlikeColour): MethodKey =>
  colour === "bp-rp" ? "sunlike-colour" : `sunlike-${colour}`;

/** One colour and the temperature that stars like the Sun have by it. */
interface SunlikeStep {
  readonly row: SunlikeRow;
  readonly bands: Colour;
  readonly colour: Definition;
  readonly teff: Definition;
}

const sunlikeFormula = (a: SunlikeRow["coefficients"]): string =>
  sum(
    ...[term(a[0]), term(a[1], "C"), term(a[2], "C^2"), term(a[3], "C^3"), term(a[4], "C^5")],
    ...[term(a[5], "logg"), term(a[6], "logg", "C"), term(a[7], "logg", "C^2"), term(a[8], "logg", "C^3")],
    ...[term(a[9], "logg", "C^5"), term(a[10], "FeH"), term(a[11], "FeH", "C"), term(a[12], "FeH", "C^2")],
    ...[term(a[13], "FeH", "C^3"), term(a[14], "logg", "FeH", "C")],
  );

const colourDefinition = (method: MethodKey, [first, second]: Colour): Definition => ({
  method,
  formula: `${BAND_SYMBOLS[first]} - ${BAND_SYMBOLS[second]} - R_C * E_BV`,
  inputs: [BAND_SYMBOLS[first], BAND_SYMBOLS[second], "R_C", "E_BV"],
  reference: "Colour less its reddening.",
  compute: (star) => star[first] - star[second] - star.colourPerExcess * star.ebv,
});

const sunlikeStep = (key: SunlikeColour): SunlikeStep => {
  const row = SUNLIKE_ROWS[key];
  const bands = key.split("-") as [Band, Band];
  const method = sunlikeMethod(key);
  return {
    row,
    bands,
    colour: colourDefinition(method, bands),
    teff: {
      method,
      formula: sunlikeFormula(row.coefficients),
      inputs: ["C", "logg", "FeH"],
      ranges: () => [
        { symbol: "C", from: row.dwarfs[0], to: row.dwarfs[1] },
        { symbol: "logg", from: SUNLIKE_LOGG.leastOfDwarfs, to: SUNLIKE_LOGG.most },
      ],
      scatter: "60 K about the fit (from memory) and 20 K of the zero point",
      reference: "Casagrande et al. 2021, MNRAS 507, 2684, coefficients of the third release.",
      compute: ({ colour, logg, feh }) => sunlikeTeffFromColour(row, colour, logg, feh),
    },
  };
};

const SUNLIKE = Object.fromEntries(SUNLIKE_COLOURS.map((key) => [key, sunlikeStep(key)])) as Readonly<
  Record<SunlikeColour, SunlikeStep>
>;

/** One colour and the temperature that cool dwarfs have by it. */
interface CoolStep {
  readonly row: CoolDwarfRow;
  readonly bands: Colour;
  readonly colour: Definition;
  readonly teff: Definition;
}

const coolStep = (key: CoolColour): CoolStep => {
  const row = COOL_DWARF_ROWS[key];
  const bands = key.split("-") as [Band, Band];
  const method: MethodKey = key === "bp-rp" ? "cool-colour" : `cool-${key}`;
  const limits = COOL_DWARF_COLOURS[key];
  return {
    row,
    bands,
    colour: colourDefinition(method, bands),
    teff: {
      method,
      formula: `${COOL_DWARF_TEFF_UNIT_K} * (${polynomial("C", row.coefficients)})`,
      inputs: ["C"],
      ranges: () => [{ symbol: "C", from: limits.bluest, to: limits.reddest }],
      scatter: `${row.scatterK} K about the fit and ${COOL_DWARF_ZERO_POINT_K} K of the spectroscopic zero point`,
      reference: "Mann et al. 2015, ApJ 804, 64, Table 2, with the erratum 2016, ApJ 819, 87.",
      compute: ({ colour }) => coolDwarfTeffFromColour(row, colour, Number.NaN),
    },
  };
};

const COOL = Object.fromEntries(COOL_COLOURS.map((key) => [key, coolStep(key)])) as Readonly<
  Record<CoolColour, CoolStep>
>;

const STEPS = [...Object.values(SUNLIKE), ...Object.values(COOL)];

export const TEMPERATURE_DEFINITIONS = {
  /** Told apart by the method of the temperature. */
  colour: byMethod(...STEPS.map((step) => step.colour)),
  teff: byMethod(GIVEN, ...STEPS.map((step) => step.teff)),
} satisfies Record<string, DefinitionOf>;

/** Takes the temperature, with what it owes to the colour and to its own error (K); the caller adds other sources. */
const adopt = (star: Scratch, bands: Colour, teff: number, slope: number, ownError: number): void => {
  star.teffErrors.fill(0);
  addColour(star.teffErrors, slope / teff, star, bands);
  star.teffErrors[SOURCE.temperature] = ownError / teff;
};

const write = (star: Scratch, out: Slots, method: MethodKey | null): void => {
  out.teff.value(star.row, star.teff, star.teffErrors);
  out.teff.method(star.row, method);
};

const readColour = (
  star: Scratch,
  { bands, colour }: SunlikeStep | CoolStep,
  recipe: RecipeSettings,
): void => {
  const [first, second] = bands;
  star.colourPerExcess = perExcess(star, first) - perExcess(star, second);
  star.colour = colour.compute(star, recipe);
};

/** Bright stars saturate the survey; G needs a correction up to 8 that is not applied here. */
const BRIGHTEST: Readonly<Record<Band, number>> = { ...BRIGHTEST_MAG, g: FAINTEST_SATURATED_G, v: -Infinity };

const isColourSafe = (star: Scratch, [first, second]: Colour): boolean =>
  star[first] >= BRIGHTEST[first] && star[second] >= BRIGHTEST[second];

const trySunlikeColour = (star: Scratch, step: SunlikeStep, recipe: RecipeSettings): boolean => {
  readColour(star, step, recipe);
  const teff = step.teff.compute(star, recipe);
  if (!(teff >= recipe.ranges.coolestSunlikeK)) return false;
  const { colour, logg, feh } = star;
  star.teff = teff + SUNLIKE_TEFF_SCATTER_K * star.deviates.temperature;
  adopt(star, step.bands, teff, sunlikeTeffColourSlope(step.row, colour, logg, feh), SUNLIKE_TEFF_SCATTER_K);
  star.teffErrors[SOURCE.gravity] = (sunlikeTeffGravitySlope(step.row, colour, feh) * star.loggError) / teff;
  star.teffErrors[SOURCE.iron] = (sunlikeTeffIronSlope(step.row, colour, logg) * star.fehError) / teff;
  star.isAssumed = !star.hasLogg || !star.hasFeh;
  return true;
};

/** Temperature by the first colour that the star has; false where the relation does not hold there. */
const trySunlike = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  // Without a gravity the relation would have to assume that of a dwarf.
  if (star.isNotDwarf && !star.hasLogg) return false;
  for (const key of recipe.sunlikeColours) {
    const step = SUNLIKE[key];
    if (!isColourSafe(star, step.bands)) continue;
    if (!trySunlikeColour(star, step, recipe)) return false;
    write(star, out, step.teff.method);
    return true;
  }
  return false;
};

const tryCool = (star: Scratch, recipe: RecipeSettings, out: Slots): boolean => {
  if (star.isNotDwarf) return false;
  for (const key of recipe.coolColours) {
    const step = COOL[key];
    if (!hasBands(star, step.bands)) continue;
    readColour(star, step, recipe);
    const teff = step.teff.compute(star, recipe);
    if (Number.isNaN(teff)) continue;
    const scatter = coolDwarfTeffScatter(step.row);
    star.teff = teff + scatter * star.deviates.temperature;
    adopt(star, step.bands, teff, coolDwarfTeffColourSlope(step.row, star.colour), scatter);
    write(star, out, step.teff.method);
    return true;
  }
  return false;
};

/** A temperature of 0 K or less is none. */
const tryGiven = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): boolean => {
  star.teffGiven = at(given.teff, star.row);
  star.teffGivenError = errorAt(given.teffError, star.row);
  star.teff = GIVEN.compute(star, recipe);
  if (Number.isNaN(star.teff)) return false;
  star.teffErrors.fill(0);
  star.teffErrors[SOURCE.temperature] = star.teffGivenError / star.teff;
  out.teff.given(star.row, star.teff, star.teffGivenError);
  out.teff.method(star.row, "given");
  return true;
};

const tryMethod = (
  method: TeffMethod,
  star: Scratch,
  given: Inputs,
  recipe: RecipeSettings,
  out: Slots,
): boolean => {
  if (method === "given") return tryGiven(star, given, recipe, out);
  return method === "sunlike-colour" ? trySunlike(star, recipe, out) : tryCool(star, recipe, out);
};

const hasColour = (star: Scratch, { sunlikeColours, coolColours }: RecipeSettings): boolean => {
  for (const key of sunlikeColours) if (hasBands(star, SUNLIKE[key].bands)) return true;
  for (const key of coolColours) if (hasBands(star, COOL[key].bands)) return true;
  return false;
};

const hasBands = (star: Scratch, [first, second]: Colour): boolean =>
  !Number.isNaN(star[first] - star[second]);

/** Temperature by the first method of the recipe that holds. */
export const deriveTemperature = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): void => {
  for (const method of recipe.teff) if (tryMethod(method, star, given, recipe, out)) return;
  star.teff = Number.NaN;
  const isByColour = recipe.teff.some((method) => method !== "given");
  if (!isByColour || !hasColour(star, recipe)) out.teff.blank(star.row, "needs-teff");
  else out.teff.blank(star.row, star.isNotDwarf ? "not-dwarf-like" : "outside-teff-relation");
};
