import { AppError, type ErrorMore } from "../errors.ts";

/** How a command ended: well; not; or with something left for the person to say, an option or an answer. */
export const EXIT = { done: 0, failed: 1, asks: 2 } as const;

const ASKS = 400;

/** The command cannot be understood, or waits for an answer. */
export const asks = (code: string, message: string, more?: ErrorMore): AppError =>
  new AppError(ASKS, code, message, more);

export const usage = (message: string, hint: string): AppError => asks("usage", message, { hint });

/** Whatever stands behind an error of the operating system, in words; undefined for any other error. */
export const systemWords = (error: unknown): string | undefined => {
  const code = error instanceof Error && "code" in error ? error.code : undefined;
  if (code === "ENOENT") return "it does not exist";
  if (code === "EISDIR") return "it is a folder";
  if (code === "ENOTDIR") return "a part of its path is no folder";
  if (code === "EACCES" || code === "EPERM") return "its permissions do not allow it";
  if (code === "ENOSPC") return "the disk is full";
  return undefined;
};

/** The reader of a pipe, `head` for one, has had enough. */
export const isClosedPipe = (error: unknown): boolean =>
  error instanceof Error &&
  "code" in error &&
  (error.code === "EPIPE" || error.code === "ERR_STREAM_DESTROYED");

const indented = (text: string): string => text.replaceAll("\n", "\n  ");

/** What a person reads of an error: what and why, then what to do. A defect shows where it happened. */
export const troubleText = (error: unknown): string => {
  if (error instanceof AppError)
    return `shortlight: ${error.message}\n${error.hint ? `  ${indented(error.hint)}\n` : ""}`;
  const trace = error instanceof Error ? (error.stack ?? error.message) : String(error);
  return `shortlight: This is a defect of the program.\n  ${indented(trace)}\n`;
};

export const exitCode = (error: unknown): number =>
  error instanceof AppError && error.status === ASKS ? EXIT.asks : EXIT.failed;
