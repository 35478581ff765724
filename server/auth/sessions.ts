import type { Request } from "express";
import type { EntityManager } from "typeorm";
import { StoredSession } from "../database/entities/stored-session.entity.ts";
import type { Caller } from "../http/route.ts";
import { sessionHash } from "../http/session.ts";

/** Signs in under a new session id: one that somebody planted before is worth nothing after. */
export const beginSession = (req: Request, caller: Caller): Promise<void> =>
  new Promise((resolve, reject) => {
    req.logIn(caller, (error?: unknown) => (error ? reject(error) : resolve()));
  });

export const endSession = (req: Request): Promise<void> =>
  new Promise((resolve, reject) => {
    req.session.destroy((error?: unknown) => (error ? reject(error) : resolve()));
  });

/** Ends every session of the person, but for the one at hand where it is given. */
export const endSessionsOf = async (tx: EntityManager, personId: string, exceptId = ""): Promise<void> => {
  await tx
    .createQueryBuilder()
    .delete()
    .from(StoredSession)
    .where("personId = :personId AND hash <> :kept", { personId, kept: sessionHash(exceptId) })
    .execute();
};
