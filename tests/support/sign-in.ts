import { randomBytes } from "node:crypto";
import { sign } from "cookie-signature";
import type { DataSource } from "typeorm";
import { StoredSession } from "#server/database/entities/stored-session.entity.ts";
import { SESSION_COOKIE, sessionHash } from "#server/http/session.ts";

export interface OpenSession {
  cookie: { name: string; value: string };
  csrfToken: string;
}

const DAY_MS = 24 * 3600 * 1000;

/** Opens a session as signing in would, without the cost of hashing a password each time. */
export const openSession = async (
  db: DataSource,
  sessionSecret: string,
  personId: string | null,
): Promise<OpenSession> => {
  const id = randomBytes(24).toString("base64url");
  const csrfToken = randomBytes(24).toString("base64url");
  const row = db.manager.create(StoredSession, {
    hash: sessionHash(id),
    personId,
    data: {
      cookie: { originalMaxAge: DAY_MS, httpOnly: true, sameSite: "lax", path: "/" },
      csrfToken,
      ...(personId === null ? {} : { passport: { user: personId } }),
    },
    expiresAt: new Date(Date.now() + DAY_MS),
  });
  await db.manager.save(row);
  return {
    cookie: { name: SESSION_COOKIE, value: encodeURIComponent(`s:${sign(id, sessionSecret)}`) },
    csrfToken,
  };
};
