import { z } from "zod";
import { LIMITS } from "../limits.ts";
import { id, name, note, personRef, timestamp } from "./common.ts";

/** Shapes map a value to 0…1. A ramp is 0 at `zeroAt` and 1 at `oneAt`, either way round, flat outside. */
export const shape = z.discriminatedUnion("kind", [
  z
    .strictObject({ kind: z.literal("ramp"), zeroAt: z.number(), oneAt: z.number() })
    .refine((s) => s.zeroAt !== s.oneAt, "A ramp needs two different ends."),
  z.strictObject({ kind: z.literal("step"), at: z.number(), above: z.boolean() }),
  z
    .strictObject({ kind: z.literal("hump"), low: z.number(), peak: z.number(), high: z.number() })
    .refine((s) => s.low < s.peak && s.peak < s.high, "A hump rises from low to peak and falls to high."),
  z.strictObject({
    kind: z.literal("table"),
    points: z
      .array(z.tuple([z.number(), z.number().min(0).max(1)]))
      .min(2)
      .max(50),
  }),
  /** 1 − loss × value, not below 0: trust lost per flag. */
  z.strictObject({ kind: z.literal("loss"), perUnit: z.number().positive() }),
]);
export type Shape = z.infer<typeof shape>;

export const term = z.strictObject({
  label: name,
  /** Expression in the language of cuts, numeric; usually one column key. */
  expression: z.string().trim().min(1).max(LIMITS.expressionCharacters),
  shape,
  weight: z.number().min(0).max(100),
  /** What a blank value does: counts 0, counts 0.5, leaves the term out, or holds the star (no merit). */
  blanks: z.enum(["zero", "neutral", "drop-term", "hold"]),
  zeroZeroesAll: z.boolean(),
});
export type Term = z.infer<typeof term>;

export const merit = z.object({
  id,
  versionId: id,
  number: z.int(),
  name: z.string(),
  note: z.string(),
  terms: z.array(term),
  savedBy: personRef,
  savedAt: timestamp,
});
export type Merit = z.infer<typeof merit>;
/** GET …/merits → { merits }; GET …/merits/versions/:versionId; POST → 201 { merit }; PUT …/merits/:id → { merit } (new version, 409 when stale). */
export const meritBody = z.strictObject({
  name,
  note,
  terms: z
    .array(term)
    .min(1, "A figure of merit needs a term.")
    .max(LIMITS.meritTerms)
    .refine((terms) => terms.some((t) => t.weight > 0), "At least one weight must be above zero."),
});
export const meritSaveBody = meritBody.extend({ number: z.int().positive() });
