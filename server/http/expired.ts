import { LessThan } from "typeorm";
import { AttemptCount } from "../database/entities/attempt-count.entity.ts";
import { StoredSession } from "../database/entities/stored-session.entity.ts";
import type { Deps } from "../deps.ts";

/** Removes sessions and counts whose time is over. They have no effect any more; any process may do it at any time. */
export const removeExpired = async (deps: Deps): Promise<void> => {
  const now = deps.now();
  await deps.db.manager.delete(StoredSession, { expiresAt: LessThan(now) });
  await deps.db.manager.delete(AttemptCount, { resetsAt: LessThan(now) });
};
