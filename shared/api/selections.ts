import { z } from "zod";
import { LIMITS } from "../limits.ts";
import { id, name, note, personRef, timestamp } from "./common.ts";

export const cut = z.strictObject({
  label: z.string().trim().max(LIMITS.nameCharacters),
  expression: z
    .string()
    .trim()
    .min(1, "Write what the cut asks, for example teff < 3900.")
    .max(LIMITS.expressionCharacters),
  blanks: z.enum(["keep", "drop"]),
});

/** A saved selection. Saving makes a version; `versionId` names this one, `id` the selection through all of them. */
export const selection = z.object({
  id,
  versionId: id,
  number: z.int(),
  name: z.string(),
  note: z.string(),
  cuts: z.array(cut),
  savedBy: personRef,
  savedAt: timestamp,
});
export type Selection = z.infer<typeof selection>;
/** GET …/selections → { selections } (latest versions); GET …/selections/versions/:versionId; POST …/selections → 201; */
/** PUT …/selections/:id → { selection }: a new version; `number` is the one the person saw (409 when stale). */
export const selectionBody = z.strictObject({ name, note, cuts: z.array(cut).max(LIMITS.cuts) });
export const selectionSaveBody = selectionBody.extend({ number: z.int().positive() });
