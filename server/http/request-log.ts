import { randomUUID } from "node:crypto";
import type { RequestHandler } from "express";
import type { Deps } from "../deps.ts";

declare global {
  namespace Express {
    interface Request {
      /** Names this request in the log and in the answer to a defect. */
      requestId: string;
    }
  }
}

/** One-time links carry their token in the path. Search parameters stay out of the log altogether. */
const withoutTokens = (url: string): string =>
  (url.split("?")[0] ?? "").replace(/\/(invitations?|password-resets?|reset)\/[^/]{20,}/g, "/$1/[hidden]");

/** One line per request: what was asked, what was answered, how long it took. Never a body or a header. */
export const requestLog =
  (deps: Deps): RequestHandler =>
  (req, res, next) => {
    const began = performance.now();
    req.requestId = randomUUID();
    res.set("X-Request-Id", req.requestId);
    res.once("close", () => {
      deps.log.info("http", `${req.method} ${withoutTokens(req.originalUrl)}`, {
        requestId: req.requestId,
        status: res.statusCode,
        finished: res.writableFinished,
        ms: Math.round(performance.now() - began),
        personId: req.user?.id,
      });
    });
    next();
  };
