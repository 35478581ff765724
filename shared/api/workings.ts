import { z } from "zod";

/** One quantity that enters a formula. */
export const workingInput = z.object({
  /** As the formula writes it. */
  symbol: z.string(),
  name: z.string(),
  unit: z.string(),
  value: z.number().nullable(),
  /** One sigma; null where it has none. */
  error: z.number().nullable(),
  origin: z.enum(["given", "assumed", "recipe", "instrument", "derived"]),
  /** Key of the step that gives a derived value. */
  step: z.string().nullable(),
});
export type WorkingInput = z.infer<typeof workingInput>;

const constant = z.object({ symbol: z.string(), value: z.number(), unit: z.string(), source: z.string() });

const range = z.object({
  symbol: z.string(),
  from: z.number(),
  to: z.number(),
  value: z.number().nullable(),
  holds: z.boolean(),
});

/** What one source of error contributes, as a fraction of the value (of a magnitude: in mag). */
const errorPart = z.object({ source: z.string(), size: z.number().nullable() });

/** How one quantity of one star came about: enough to work it out again by hand. */
export const working = z.object({
  key: z.string(),
  symbol: z.string(),
  label: z.string(),
  unit: z.string(),
  value: z.number().nullable(),
  error: z.number().nullable(),
  blank: z.object({ word: z.string(), sentence: z.string() }).nullable(),
  /** By which relation; empty where there is only one way. */
  method: z.string(),
  /** Over the symbols of inputs and constants; empty where nothing was computed. */
  formula: z.string(),
  /** The formula with the numbers put in. */
  substituted: z.string(),
  /** Whether the value makes the formula zero, rather than being what the formula gives. */
  isRoot: z.boolean(),
  inputs: z.array(workingInput),
  constants: z.array(constant),
  ranges: z.array(range),
  scatter: z.string(),
  errorParts: z.array(errorPart),
  reference: z.string(),
});
export type Working = z.infer<typeof working>;

/** Interval of a quantity by draws; null where its inputs have no errors or most draws leave a relation's range. */
const drawnInterval = z
  .object({ p16: z.number(), p50: z.number(), p84: z.number(), blankShare: z.number() })
  .nullable();

/** GET …/stars/:starId/workings?view&key=radius&draws=1000&seed=1 → { workings } */
export const workings = z.object({
  star: z.string(),
  /** Name and version of the recipe, card and campaign. */
  recipe: z.string(),
  card: z.string().nullable(),
  campaign: z.string().nullable(),
  /** The quantity asked for, then those it rests on, each once. */
  steps: z.array(working),
  drawn: z
    .object({ draws: z.int(), seed: z.int(), intervals: z.record(z.string(), drawnInterval) })
    .nullable(),
});
export type Workings = z.infer<typeof workings>;

export const workingsQuery = z.object({
  key: z.string().max(40),
  draws: z.coerce
    .number()
    .int()
    .min(100, "Ask for 100 draws or more.")
    .max(20_000, "Ask for 20 000 draws or fewer.")
    .optional(),
  seed: z.coerce
    .number()
    .int()
    .min(1)
    .max(2 ** 31 - 1)
    .default(1),
});
