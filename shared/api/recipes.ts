import { z } from "zod";
import { LIMITS } from "../limits.ts";
import type { HabitableLimit } from "../science/habitable-zone.ts";
import {
  COOL_COLOURS,
  DISTANCE_METHODS,
  LUMINOSITY_METHODS,
  MASS_METHODS,
  RADIUS_METHODS,
  type RecipeSettings,
  SUNLIKE_COLOURS,
  TEFF_METHODS,
} from "../science/recipes.ts";
import { id, name, note, personRef, timestamp } from "./common.ts";

/** Where each number of a recipe may lie, ends included: inside what is published for the relation it steers. */
export const RECIPE_RANGES = {
  fractionLimit: [0, 0.5],
  zeroPointMas: [-1, 1],
  priorLengthPc: [10, 10_000],
  ruweLimit: [0.5, 100],
  ebv: [0, 5],
  ebvPerKpc: [0, 5],
  logg: [4, 5],
  loggError: [0, 1],
  feh: [-4, 0.6],
  fehError: [0, 1],
  absKs: [4.6, 9.8],
  hottestCoolDwarfK: [2700, 4500],
  coolestSunlikeK: [4000, 8000],
  e: [0, 0.95],
  alpha: [0.01, 1000],
  beta: [1.01, 1000],
} as const satisfies Record<string, readonly [number, number]>;

/** Limits of the habitable zone that can bound it on the side of the star, and on the far side. */
export const INNER_LIMITS = [
  "recent-venus",
  "runaway-greenhouse",
  "runaway-greenhouse-5-earths",
  "runaway-greenhouse-0.1-earths",
] as const satisfies readonly HabitableLimit[];
export const OUTER_LIMITS = ["maximum-greenhouse", "early-mars"] as const satisfies readonly HabitableLimit[];

const between = (key: keyof typeof RECIPE_RANGES, what: string, unit = "") => {
  const [least, most] = RECIPE_RANGES[key];
  const text = (n: number): string => String(n).replace("-", "−");
  const message = `${what} lies between ${text(least)} and ${text(most)}${unit}.`;
  return z.number(message).min(least, message).max(most, message);
};

const order = <const Values extends readonly [string, ...string[]]>(values: Values, what: string) =>
  z
    .array(z.enum(values))
    .min(1, `At least one ${what} is needed.`)
    .refine((chosen) => new Set(chosen).size === chosen.length, `Each ${what} can stand in the order once.`);

const releaseLimit = z.strictObject({
  release: z
    .string()
    .trim()
    .min(1, "Name the release.")
    .max(LIMITS.nameCharacters, `A release has at most ${LIMITS.nameCharacters} characters.`),
  limit: between("ruweLimit", "A limit of the fit"),
});

const extinction = z.discriminatedUnion("rule", [
  z.strictObject({ rule: z.literal("off") }),
  z.strictObject({ rule: z.literal("constant"), ebv: between("ebv", "The colour excess", " mag") }),
  z.strictObject({ rule: z.literal("column") }),
  z.strictObject({
    rule: z.literal("by-distance"),
    ebvPerKpc: between("ebvPerKpc", "The colour excess", " mag per kiloparsec"),
  }),
]);

const eccentricity = z.discriminatedUnion("prior", [
  z.strictObject({ prior: z.literal("circular") }),
  z.strictObject({ prior: z.literal("fixed"), e: between("e", "An eccentricity") }),
  z.strictObject({
    prior: z.literal("beta"),
    alpha: between("alpha", "The first exponent α"),
    beta: between("beta", "The second exponent β"),
  }),
]);

const ranges = z
  .strictObject({
    brightestAbsKs: between("absKs", "The brightest M_Ks", " mag"),
    faintestAbsKs: between("absKs", "The faintest M_Ks", " mag"),
    hottestCoolDwarfK: between("hottestCoolDwarfK", "The temperature of the hottest cool dwarf", " K"),
    coolestSunlikeK: between("coolestSunlikeK", "The temperature of the coolest sun-like star", " K"),
  })
  .refine((r) => r.brightestAbsKs < r.faintestAbsKs, {
    path: ["faintestAbsKs"],
    message: "The faintest M_Ks must be a larger magnitude than the brightest.",
  });

export const recipeSettings = z.strictObject({
  distance: z.strictObject({
    order: order(DISTANCE_METHODS, "way to a distance"),
    fractionLimit: between("fractionLimit", "The largest parallax error over parallax"),
    zeroPointMas: between("zeroPointMas", "The offset of the parallaxes", " mas"),
    priorLengthPc: between("priorLengthPc", "The length scale", " pc"),
  }),
  astrometricQuality: z.strictObject({
    limit: between("ruweLimit", "A limit of the fit"),
    byRelease: z
      .array(releaseLimit)
      .max(20, "At most 20 releases have limits of their own.")
      .refine(
        (limits) => new Set(limits.map(({ release }) => release)).size === limits.length,
        "Each release can have one limit.",
      ),
  }),
  extinction,
  assumed: z.strictObject({
    logg: between("logg", "The log g of a dwarf"),
    loggError: between("loggError", "The error of log g"),
    feh: between("feh", "[Fe/H]"),
    fehError: between("fehError", "The error of [Fe/H]"),
  }),
  usesFeh: z.boolean(),
  teff: order(TEFF_METHODS, "way to a temperature"),
  sunlikeColours: order(SUNLIKE_COLOURS, "colour"),
  coolColours: order(COOL_COLOURS, "colour"),
  radius: order(RADIUS_METHODS, "way to a radius"),
  mass: order(MASS_METHODS, "way to a mass"),
  luminosity: order(LUMINOSITY_METHODS, "way to a luminosity"),
  ranges,
  habitableZone: z.strictObject({
    inner: z.enum(INNER_LIMITS, "The inner limit is that of recent Venus or of a runaway greenhouse."),
    outer: z.enum(OUTER_LIMITS, "The outer limit is that of the maximum greenhouse or of early Mars."),
  }),
  eccentricity,
  duration: z.enum(["central", "averaged"]),
  statistic: z.enum(["campaign", "boxcar", "trapezoid"]),
}) satisfies z.ZodType<RecipeSettings>;

/** SHA-256 of the canonical JSON of the settings. */
const hash = z.string().regex(/^[0-9a-f]{64}$/);

/** A version of a recipe as results name the one that they used. */
export const recipeRef = z.object({ versionId: id, name: z.string(), number: z.int(), hash });
export type RecipeRef = z.infer<typeof recipeRef>;

/** A recipe as one of its versions: `id` names the recipe through all of them, `versionId` this one. */
export const recipe = recipeRef.extend({
  id,
  note: z.string(),
  settings: recipeSettings,
  /** Null where it came with the programme. */
  savedBy: personRef.nullable(),
  savedAt: timestamp,
});
export type Recipe = z.infer<typeof recipe>;

/** GET …/recipes → { recipes } (latest versions); GET …/recipes/:id/versions → { recipes } (newest first); GET …/recipes/versions/:versionId → { recipe }. */
const content = z.strictObject({ name, note, settings: recipeSettings });

/** POST …/recipes → 201 { recipe }: with settings of its own, or with those of the version that it is a copy of. */
export const recipeBody = content
  .partial({ settings: true })
  .extend({ copyOf: id.optional() })
  .refine((body) => (body.settings === undefined) !== (body.copyOf === undefined), {
    path: ["settings"],
    message: "A recipe has settings of its own or is the copy of a version, one of the two.",
  });

/** PUT …/recipes/:id → { recipe }: a new version; `number` is the one the person saw (409 when stale). */
export const recipeSaveBody = content.extend({ number: z.int().positive() });

/** PUT /api/programmes/:programmeId/recipe → 202 { job }: a recompute by that version, which makes a new catalogue edition. */
export const recipeChoiceBody = z.strictObject({ versionId: id });
