import { setTimeout as wait } from "node:timers/promises";
import { type DataSource, type EntityManager, QueryFailedError } from "typeorm";

const ATTEMPTS = 4;

/** Deadlock, lock wait, or a certification failure of a cluster: the database asks to try again. */
const asksToTryAgain = (error: unknown): boolean =>
  error instanceof QueryFailedError &&
  ["ER_LOCK_DEADLOCK", "ER_LOCK_WAIT_TIMEOUT", "ER_CHECKREAD"].includes(
    String((error.driverError as { code?: unknown }).code),
  );

type Isolation = "READ COMMITTED" | "REPEATABLE READ";

/** Runs the work in a transaction, again where the database asks for it: the work must be repeatable. */
export const inTransaction = async <T>(
  db: DataSource,
  work: (tx: EntityManager) => Promise<T>,
  isolation: Isolation = "REPEATABLE READ",
): Promise<T> => {
  for (let attempt = 1; ; attempt++) {
    try {
      return await db.transaction(isolation, work);
    } catch (error) {
      if (!asksToTryAgain(error) || attempt >= ATTEMPTS) throw error;
      await wait(attempt * 20 * (1 + Math.random()));
    }
  }
};
