import type { Request, Response } from "express";
import { z } from "zod";
import {
  type Link,
  link,
  passwordChangeBody,
  passwordResetBody,
  passwordResetRequestBody,
  session,
  signInBody,
} from "#shared/api/session.ts";
import { AppError } from "../errors.ts";
import type { Routes } from "../http/route.ts";
import { SESSION_COOKIE } from "../http/session.ts";
import { authenticate } from "./passport.ts";
import { readPasswordReset, requestPasswordReset, resetPassword } from "./password-reset.ts";
import { presentLink } from "./present.ts";
import { changePassword, signOutEverywhere } from "./service.ts";
import { currentSession, signIn } from "./session-answer.ts";
import { endSession } from "./sessions.ts";

const sessionAnswer = z.object({ session });

const notRecognised = (): AppError =>
  new AppError(401, "not-recognised", "This e-mail address and password do not belong together.", {
    hint: "Check both, or ask for a new password by e-mail.",
  });

const signOut = async (req: Request, res: Response): Promise<undefined> => {
  await endSession(req);
  res.clearCookie(SESSION_COOKIE);
  return undefined;
};

const addSessionRoutes = (routes: Routes): void => {
  routes.add({ method: "get", path: "/session", access: "anyone", answer: sessionAnswer }, currentSession);

  routes.add(
    { method: "post", path: "/session", access: "anyone", body: signInBody, answer: sessionAnswer },
    async (at) => {
      const caller = await authenticate(at.deps, at.req, at.res);
      if (!caller) throw notRecognised();
      return signIn(at, caller);
    },
  );

  routes.add({ method: "delete", path: "/session", access: "signed-in" }, ({ req, res }) =>
    signOut(req, res),
  );

  routes.add(
    { method: "delete", path: "/sessions", access: "signed-in" },
    async ({ deps, caller, req, res }) => {
      await signOutEverywhere(deps, caller);
      return signOut(req, res);
    },
  );
};

const addOwnRoutes = (routes: Routes): void => {
  routes.add(
    { method: "put", path: "/me/password", access: "signed-in", body: passwordChangeBody },
    async ({ deps, caller, body, req }) => {
      await changePassword(deps, caller, body, req.sessionID);
    },
  );
};

const addPasswordResetRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "post",
      path: "/password-resets",
      access: "anyone",
      body: passwordResetRequestBody,
      status: 202,
    },
    async ({ deps, body }) => {
      await requestPasswordReset(deps, body.email);
      return {};
    },
  );

  routes.add(
    { method: "get", path: "/password-resets/:token", access: "anyone", answer: z.object({ link }) },
    async ({ deps, params }): Promise<{ link: Link }> => {
      const found = await readPasswordReset(deps, params.token ?? "");
      return { link: presentLink(found, null, true) };
    },
  );

  routes.add(
    {
      method: "post",
      path: "/password-resets/:token",
      access: "anyone",
      body: passwordResetBody,
      answer: sessionAnswer,
    },
    async (at) => signIn(at, await resetPassword(at.deps, at.params.token ?? "", at.body.password)),
  );
};

export const addAuthRoutes = (routes: Routes): void => {
  addSessionRoutes(routes);
  addOwnRoutes(routes);
  addPasswordResetRoutes(routes);
};
