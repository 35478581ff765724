import { AppError } from "../../errors.ts";

/** A header that does not say what the table holds. */
export const badHeader = (message: string, cause?: unknown): AppError =>
  new AppError(422, "bad-ecsv-header", message, {
    hint: "Write the table again with the program that made it, or mend its header by hand.",
    cause,
  });
