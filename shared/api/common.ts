import { z } from "zod";
import { LIMITS } from "../limits.ts";

/** 64-bit ids travel as strings of digits. */
export const id = z.string().regex(/^[1-9][0-9]{0,18}$/, "An id is a whole number.");
export const timestamp = z.iso.datetime();
export const name = z
  .string()
  .trim()
  .min(1, "Give it a name.")
  .max(LIMITS.nameCharacters, `A name has at most ${LIMITS.nameCharacters} characters.`);
export const note = z.string().trim().max(LIMITS.noteCharacters).default("");
/** The version a person saw when they began to edit: a write with a stale one is refused (409). */
export const version = z.int().positive();

/** A person as named beside what they did. */
export const personRef = z.object({ id, name: z.string() });

/** Pages by a cursor that stays right while rows are added. */
export const cursorQuery = z.object({
  cursor: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});

/** The one shape of every refusal and failure. */
export const errorBody = z.object({
  error: z.object({
    code: z.string(),
    /** What happened and why. */
    message: z.string(),
    /** What to do. */
    hint: z.string().optional(),
    fields: z.record(z.string(), z.string()).optional(),
    details: z.unknown().optional(),
  }),
});
export type ErrorBody = z.infer<typeof errorBody>;
