import { randomBytes, timingSafeEqual } from "node:crypto";
import type { Request, RequestHandler } from "express";
import type { Deps } from "../deps.ts";
import { AppError } from "../errors.ts";

const SAFE = new Set(["GET", "HEAD", "OPTIONS"]);

/** The token of this session, made at its first use. */
export const csrfToken = (req: Request): string => {
  req.session.csrfToken ??= randomBytes(24).toString("base64url");
  return req.session.csrfToken;
};

const isSame = (given: string, expected: string): boolean => {
  const [a, b] = [Buffer.from(given), Buffer.from(expected)];
  return a.length === b.length && timingSafeEqual(a, b);
};

/** A browser names where a request comes from; programs that are no browser do not, and need the token anyway. */
const comesFromHere = (req: Request, publicUrl: string): boolean => {
  const origin = req.get("origin");
  if (origin === undefined) return true;
  return origin === new URL(publicUrl).origin || origin === `${req.protocol}://${req.get("host")}`;
};

const fromElsewhere = (): AppError =>
  new AppError(403, "foreign-origin", "The request came from another site, so nothing was changed.", {
    hint: "Open Shortlight at its own address and do it there.",
  });

const sessionEnded = (): AppError =>
  new AppError(401, "signed-out", "Your session has ended, so nothing was changed.", {
    hint: "Reload the page, sign in and try again.",
  });

const stalePage = (): AppError =>
  new AppError(
    403,
    "stale-page",
    "This page belongs to an earlier session of yours, so nothing was changed.",
    {
      hint: "Reload the page and try again.",
    },
  );

/** Lets a change through only from our own pages: same origin, and the session's token in X-CSRF-Token. */
export const csrfProtection =
  (deps: Deps): RequestHandler =>
  (req, _res, next) => {
    if (SAFE.has(req.method)) return next();
    if (!comesFromHere(req, deps.config.publicUrl)) throw fromElsewhere();
    const expected = req.session.csrfToken;
    if (!expected) throw sessionEnded();
    if (!isSame(req.get("x-csrf-token") ?? "", expected)) throw stalePage();
    next();
  };
