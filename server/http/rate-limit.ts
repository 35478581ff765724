import { type Request, type RequestHandler, Router } from "express";
import { ipKeyGenerator, rateLimit } from "express-rate-limit";
import { LIMITS } from "#shared/limits.ts";
import type { Deps } from "../deps.ts";
import { AppError } from "../errors.ts";
import { AttemptStore } from "./attempt-store.ts";

const WINDOW_MS = LIMITS.signInWindowMinutes * 60_000;
/** One address, or one account from all addresses, may see this many times the attempts: an institute shares one. */
const WIDER = 10;

const waitInWords = (ms: number): string => {
  const minutes = Math.max(1, Math.ceil(ms / 60_000));
  return minutes === 1 ? "a minute" : `${minutes} minutes`;
};

const tooMany = (waitMs: number): AppError =>
  new AppError(429, "too-many-attempts", "There were too many attempts in a short time.", {
    hint: `Wait ${waitInWords(waitMs)}, then try again.`,
    details: { waitSeconds: Math.ceil(waitMs / 1000) },
  });

const address = (req: Request): string => ipKeyGenerator(req.ip ?? "");

const account = (req: Request): string => {
  const email: unknown = req.body?.email;
  return typeof email === "string" ? email.trim().toLowerCase() : "";
};

interface Limit {
  name: string;
  limit: number;
  key: (req: Request) => string;
  /** Whether an attempt that went well is taken back. */
  forgetsSuccess: boolean;
}

const limiter = (deps: Deps, { name, limit, key, forgetsSuccess }: Limit): RequestHandler =>
  rateLimit({
    windowMs: WINDOW_MS,
    limit,
    keyGenerator: key,
    store: new AttemptStore(deps, name, WINDOW_MS),
    skipSuccessfulRequests: forgetsSuccess,
    standardHeaders: false,
    legacyHeaders: false,
    // The proxies in front are stated in the settings, and the store is our own.
    validate: false,
    handler: (req, res, next) => {
      const resets = (req as Request & { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime;
      const waitMs = Math.max(0, (resets?.getTime() ?? 0) - deps.now().getTime());
      res.set("Retry-After", String(Math.ceil(waitMs / 1000)));
      next(tooMany(waitMs));
    },
  });

/** Limits on everything at which a secret could be guessed or mail be made to flow. */
export const rateLimits = (deps: Deps): Router => {
  const router = Router();
  if (!deps.config.rateLimits) return router;
  const attempts = LIMITS.signInAttempts;
  const byAddress = limiter(deps, {
    name: "address",
    limit: attempts * WIDER,
    key: address,
    forgetsSuccess: true,
  });
  const both = (req: Request): string => `${address(req)}\n${account(req)}`;
  router.post(
    "/session",
    byAddress,
    limiter(deps, { name: "sign-in", limit: attempts, key: both, forgetsSuccess: true }),
    limiter(deps, { name: "account", limit: attempts * WIDER, key: account, forgetsSuccess: true }),
  );
  router.post(
    "/password-resets",
    byAddress,
    limiter(deps, { name: "password-reset", limit: attempts, key: account, forgetsSuccess: false }),
  );
  router.use(["/password-resets/:token", "/invitations/:token"], byAddress);
  router.put(
    "/me/password",
    limiter(deps, {
      name: "password-change",
      limit: attempts,
      key: (req) => req.user?.id ?? address(req),
      forgetsSuccess: true,
    }),
  );
  return router;
};
