import { setTimeout as wait } from "node:timers/promises";
import { type DataSource, type EntityManager, QueryFailedError } from "typeorm";

const ATTEMPTS = 4;

/** Deadlock, lock wait, or a certification failure of a cluster: the database asks to try again. */
const asksToTryAgain = (error: unknown): boolean =>
  error instanceof QueryFailedError &&
  ["ER_LOCK_DEADLOCK", "ER_LOCK_WAIT_TIMEOUT", "ER_CHECKREAD"].includes(
    String((error.driverError as { code?: unknown }).code),
  );

/** Runs the work in a transaction, again where the database asks for it: the work must be repeatable. */
export const inTransaction = async <T>(
  db: DataSource,
  work: (tx: EntityManager) => Promise<T>,
  attempt = 1,
): Promise<T> => {
  try {
    return await db.transaction(work);
  } catch (error) {
    if (!asksToTryAgain(error) || attempt >= ATTEMPTS) throw error;
    await wait(attempt * 20 * (1 + Math.random()));
    return inTransaction(db, work, attempt + 1);
  }
};
