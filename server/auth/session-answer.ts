import type { Request } from "express";
import type { Session } from "#shared/api/session.ts";
import type { Deps } from "../deps.ts";
import { csrfToken } from "../http/csrf.ts";
import type { Caller } from "../http/route.ts";
import { describeSession } from "./service.ts";
import { beginSession } from "./sessions.ts";

interface At {
  deps: Deps;
  req: Request;
}

/** The session as it stands, with the token that changes need. */
export const currentSession = async ({ deps, req }: At): Promise<{ session: Session }> => ({
  session: await describeSession(deps, req.user?.id ?? "", csrfToken(req)),
});

/** Signs in and answers the new session. */
export const signIn = async (at: At, caller: Caller): Promise<{ session: Session }> => {
  await beginSession(at.req, caller);
  return currentSession(at);
};
