import { LIMITS } from "#shared/limits.ts";
import { AppError } from "../errors.ts";

interface Shape {
  code?: unknown;
  errno?: unknown;
  fatal?: unknown;
  type?: unknown;
  driverError?: Shape;
}

const LOST = new Set([
  "PROTOCOL_CONNECTION_LOST",
  "ECONNREFUSED",
  "ER_SERVER_SHUTDOWN",
  "ER_CON_COUNT_ERROR",
  "ER_TOO_MANY_USER_CONNECTIONS",
]);
const LOST_WHEN_FATAL = new Set(["ECONNRESET", "ETIMEDOUT", "EPIPE", "ENOENT"]);
const FULL = new Set([
  "ENOSPC",
  "EDQUOT",
  "ER_DISK_FULL",
  "ER_RECORD_FILE_FULL",
  "ER_TEMP_FILE_WRITE_FAILURE",
]);

const databaseUnavailable = (cause: unknown): AppError =>
  new AppError(
    503,
    "database-unavailable",
    "The database does not answer just now, so nothing was read or changed.",
    {
      hint: "Try again in a minute. If it stays so, tell whoever runs this installation.",
      cause,
    },
  );

const diskFull = (cause: unknown): AppError =>
  new AppError(507, "disk-full", "The server's disk is full, so nothing was kept of this step.", {
    hint: "Tell whoever runs this installation to make room, then do it again.",
    cause,
  });

const unreadableBody = (cause: unknown): AppError =>
  new AppError(400, "unreadable-request", "The request is not readable as JSON.", {
    hint: "Send it again; if a program of yours made it, look at the syntax.",
    cause,
  });

const bodyTooLarge = (cause: unknown): AppError =>
  new AppError(413, "too-large", "The request is larger than the server takes for this.", {
    hint: `Make it shorter. Files of up to ${LIMITS.fileBytes / 1024 ** 3} GiB go through the upload of an extract.`,
    cause,
  });

const isOf = (codes: Set<string>, error: Shape): boolean => codes.has(String(error.code));

/** The refusal a person should read for a failure whose cause is known; undefined for a defect. */
export const knownError = (error: unknown): AppError | undefined => {
  if (error instanceof AppError) return error;
  if (typeof error !== "object" || error === null) return undefined;
  const shape = error as Shape;
  const cause = shape.driverError ?? shape;
  if (isOf(FULL, cause)) return diskFull(error);
  if (isOf(LOST, cause)) return databaseUnavailable(error);
  if (isOf(LOST_WHEN_FATAL, cause) && (cause.fatal === true || shape.driverError))
    return databaseUnavailable(error);
  if (String((error as Error).message) === "Pool is closed.") return databaseUnavailable(error);
  if (shape.type === "entity.too.large") return bodyTooLarge(error);
  if (typeof shape.type === "string" && /^(entity|encoding|charset|request|parameters)\./.test(shape.type))
    return unreadableBody(error);
  if (error instanceof URIError) return unreadableBody(error);
  return undefined;
};
