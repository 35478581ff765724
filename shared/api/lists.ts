import { z } from "zod";
import { LIMITS } from "../limits.ts";
import { id, name, note, personRef, timestamp, version } from "./common.ts";
import { recipeRef } from "./recipes.ts";
import { starRow } from "./stars.ts";

export const LIST_STATES = ["draft", "in-review", "agreed", "issued", "superseded", "withdrawn"] as const;
export const MEMBER_STATES = ["in", "reserve", "held", "out"] as const;

export const targetList = z.object({
  id,
  name: z.string(),
  note: z.string(),
  state: z.enum(LIST_STATES),
  catalogueEdition: z.int(),
  /** The view it was made from, as search parameters; opens the workbench on it. */
  viewParams: z.string(),
  merit: z
    .object({ versionId: id, name: z.string(), number: z.int(), terms: z.array(z.string()) })
    .nullable(),
  card: z.object({ versionId: id, name: z.string(), number: z.int() }).nullable(),
  campaign: z.object({ versionId: id, name: z.string(), number: z.int() }).nullable(),
  recipe: recipeRef,
  stars: z.int(),
  byState: z.object({ in: z.int(), reserve: z.int(), held: z.int(), out: z.int() }),
  fingerprint: z.string(),
  madeBy: personRef,
  madeAt: timestamp,
  isInvented: z.boolean(),
  version,
});
export type TargetList = z.infer<typeof targetList>;

/** POST /api/programmes/:p/lists → 201 { list, note? }. N larger than the result takes all, and `note` says so. */
export const listCreateBody = z.strictObject({
  name,
  note,
  /** The view as search parameters (viewToParams). */
  view: z.string().max(20_000),
  first: z
    .int("Give a whole number of stars.")
    .min(1, "A list holds at least one star.")
    .max(LIMITS.listStars, `A list holds at most ${LIMITS.listStars} stars.`),
});
/** GET …/lists → { lists }; GET …/lists/:id → { list }; PATCH …/lists/:id → { list }; DELETE (draft) → 204 */
export const listPatchBody = z.strictObject({ name: name.optional(), note: note.optional(), version });
/** POST …/lists/:id/state → { list }: draft → in-review → draft. */
export const listStateBody = z.strictObject({ state: z.enum(["draft", "in-review"]), version });

/** GET …/lists/:id/members?offset&limit → { members, count } in order of place. Values are those the list was made on. */
export const listMember = starRow.extend({
  state: z.enum(MEMBER_STATES),
  reason: z.string(),
  cameIn: z.string(),
});
export type ListMember = z.infer<typeof listMember>;
/** PATCH …/lists/:id/members/:starId → { member, list }; "out" needs a reason of 10 characters or more. */
export const memberPatchBody = z
  .strictObject({
    state: z.enum(MEMBER_STATES),
    reason: z.string().trim().max(LIMITS.noteCharacters).default(""),
    version,
  })
  .refine((b) => b.state !== "out" || b.reason.length >= 10, {
    path: ["reason"],
    message: "Say why in at least 10 characters: the reason stays with the star.",
  });

/**
 * GET …/lists/:id/sky → { sky }: where its stars are, ICRS degrees. Up to LIMITS.skyPoints stars one by one, `[ra, dec]`
 * in order of place; more are counted in cells of equal area, `[ra, dec, stars]` at their middle.
 */
export const listSky = z.object({
  stars: z.int(),
  /** Stars without a position, which cannot be drawn. */
  without: z.int(),
  points: z.array(z.tuple([z.number(), z.number()])),
  cells: z.array(z.tuple([z.number(), z.number(), z.int()])),
});
export type ListSky = z.infer<typeof listSky>;

/** GET …/lists/:id/export?format=csv|ecsv → the file. */
export const EXPORT_FORMATS = ["csv", "ecsv"] as const;
export const exportQuery = z.object({ format: z.enum(EXPORT_FORMATS) });
