/**
 * The one error class for refusals and failures that a person should read. `message` says what and why, `hint`
 * what to do. Anything else thrown is a defect and answers with a neutral text.
 */
export interface ErrorMore {
  hint?: string;
  /** By field of the body, for forms. */
  fields?: Record<string, string>;
  /** Machine-readable particulars, e.g. the version that is in force. */
  details?: unknown;
  cause?: unknown;
}

export class AppError extends Error {
  readonly hint?: string;
  readonly fields?: Record<string, string>;
  readonly details?: unknown;

  constructor(
    readonly status: number,
    /** Stable, kebab-case. */
    readonly code: string,
    message: string,
    more: ErrorMore = {},
  ) {
    super(message, { cause: more.cause });
    this.name = "AppError";
    this.hint = more.hint;
    this.fields = more.fields;
    this.details = more.details;
  }
}

/** Also the answer for things of programmes one may not see: there is no telling the two apart. */
export const notFound = (what = "This page or record"): AppError =>
  new AppError(404, "not-found", `${what} does not exist, or you may not see it.`, {
    hint: "Check the address, or ask a member of the programme.",
  });

export const unprocessable = (code: string, message: string, more?: ErrorMore): AppError =>
  new AppError(422, code, message, more);

export const conflict = (code: string, message: string, more?: ErrorMore): AppError =>
  new AppError(409, code, message, more);
