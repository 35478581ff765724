import { createHash } from "node:crypto";
import type { IncrementResponse, Store } from "express-rate-limit";
import { AttemptCount } from "../database/entities/attempt-count.entity.ts";
import type { Deps } from "../deps.ts";

/** Counts in MariaDB, so that attempts on all web processes add up. */
export class AttemptStore implements Store {
  readonly localKeys = false;

  constructor(
    private readonly deps: Deps,
    readonly prefix: string,
    private readonly windowMs: number,
  ) {}

  async increment(key: string): Promise<IncrementResponse> {
    const now = this.deps.now();
    const ends = new Date(now.getTime() + this.windowMs);
    const keyHash = this.hash(key);
    // Assignments run from left to right: `hits` still sees the old end of the window.
    await this.deps.db.query(
      `INSERT INTO attempt_count (key_hash, hits, resets_at) VALUES (?, 1, ?)
       ON DUPLICATE KEY UPDATE
         hits = IF(resets_at <= ?, 1, hits + 1),
         resets_at = IF(resets_at <= ?, VALUES(resets_at), resets_at)`,
      [keyHash, ends, now, now],
    );
    const count = await this.deps.db.manager.findOneBy(AttemptCount, { keyHash });
    return { totalHits: count?.hits ?? 1, resetTime: count?.resetsAt ?? ends };
  }

  async decrement(key: string): Promise<void> {
    await this.deps.db.query("UPDATE attempt_count SET hits = hits - 1 WHERE key_hash = ? AND hits > 0", [
      this.hash(key),
    ]);
  }

  async resetKey(key: string): Promise<void> {
    await this.deps.db.manager.delete(AttemptCount, { keyHash: this.hash(key) });
  }

  private hash(key: string): string {
    return createHash("sha256").update(`${this.prefix}\n${key}`).digest("hex");
  }
}
