import type { z } from "zod";
import { AppError } from "../errors.ts";

/** Parses what came from outside, or refuses with one message per field. */
export const parse = (schema: z.ZodType | undefined, value: unknown, part: "body" | "query"): unknown => {
  if (!schema) return undefined;
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  const fields: Record<string, string> = {};
  for (const issue of result.error.issues) fields[issue.path.join(".") || part] ??= issue.message;
  const [first] = Object.entries(fields);
  throw new AppError(
    400,
    "unreadable-request",
    first ? `${first[0]}: ${first[1]}` : "The request could not be read.",
    {
      hint: "Correct the fields named and send it again.",
      fields,
    },
  );
};
