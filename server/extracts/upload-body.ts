import type { IncomingMessage } from "node:http";
import { PassThrough } from "node:stream";
import { AppError } from "../errors.ts";

/**
 * The body as a stream of its own: when its reader fails, what is still on the way is thrown away, so that the
 * refusal can be answered on a connection that is still whole.
 *
 * @param lost what is said where the connection ends before the body
 */
export const bodyOf = (req: IncomingMessage, lost: AppError): PassThrough => {
  if (req.readableEnded)
    throw new AppError(415, "not-a-stream", "The file came as JSON and was not taken.", {
      hint: "Send it as application/octet-stream.",
    });
  const through = new PassThrough();
  req.pipe(through);
  req.once("error", () => through.destroy(lost));
  req.once("close", () => {
    if (!req.complete) through.destroy(lost);
  });
  through.once("close", () => {
    req.unpipe(through);
    req.resume();
  });
  return through;
};

/** Bytes that the request announces; 0 where it does not say. */
export const announcedBytes = (req: IncomingMessage): number => Number(req.headers["content-length"] ?? 0);
