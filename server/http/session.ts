import { createHash } from "node:crypto";
import type { RequestHandler } from "express";
import session, { type SessionData, Store } from "express-session";
import { LIMITS } from "#shared/limits.ts";
import { StoredSession } from "../database/entities/stored-session.entity.ts";
import type { Deps } from "../deps.ts";
import type { Caller } from "./route.ts";

declare module "express-session" {
  interface SessionData {
    csrfToken?: string;
    /** Set by passport at sign-in. */
    passport?: { user: string };
    /** Expiry as the database has it, in milliseconds: tells whether a touch is worth a write. */
    storedUntil?: number;
  }
}

declare global {
  namespace Express {
    interface User extends Caller {}
  }
}

export const SESSION_COOKIE = "shortlight";
const DAY = 24 * 60 * 60 * 1000;
const SIGNED_IN_FOR = LIMITS.sessionDays * DAY;
/** A visitor's session holds a CSRF token and nothing else. */
const VISITOR_FOR = DAY;
/** A table that is scrolled sends many requests: their sessions are prolonged in the database once a minute. */
const TOUCH_EVERY = 60_000;

/** Only the hash of a session id is stored: a stolen table opens no session. */
export const sessionHash = (id: string): string => createHash("sha256").update(id).digest("hex");

type Done = (error?: unknown) => void;

/** Sessions in MariaDB, so that any web process can serve anyone. */
class DatabaseSessionStore extends Store {
  constructor(private readonly deps: Deps) {
    super();
  }

  override get(id: string, done: (error: unknown, data?: SessionData | null) => void): void {
    this.find(id).then((data) => done(null, data), done);
  }

  override set(id: string, data: SessionData, done: Done = () => {}): void {
    this.write(id, data).then(() => done(), done);
  }

  override destroy(id: string, done: Done = () => {}): void {
    this.deps.db.manager.delete(StoredSession, { hash: sessionHash(id) }).then(() => done(), done);
  }

  override touch(id: string, data: SessionData, done: Done = () => {}): void {
    const until = this.until(data);
    if (until.getTime() - (data.storedUntil ?? 0) < TOUCH_EVERY) {
      done();
      return;
    }
    this.deps.db.manager
      .update(StoredSession, { hash: sessionHash(id) }, { expiresAt: until })
      .then(() => done(), done);
  }

  private until(data: SessionData): Date {
    return new Date(this.deps.now().getTime() + (data.passport ? SIGNED_IN_FOR : VISITOR_FOR));
  }

  private async find(id: string): Promise<SessionData | null> {
    const row = await this.deps.db.manager.findOneBy(StoredSession, { hash: sessionHash(id) });
    if (!row || row.expiresAt <= this.deps.now()) return null;
    return { ...(row.data as unknown as SessionData), storedUntil: row.expiresAt.getTime() };
  }

  private async write(id: string, { storedUntil: _, ...data }: SessionData): Promise<void> {
    await this.deps.db.query(
      `INSERT INTO session (session_hash, person_id, data, expires_at) VALUES (?, ?, ?, ?)
       ON DUPLICATE KEY UPDATE person_id = VALUES(person_id), data = VALUES(data), expires_at = VALUES(expires_at)`,
      [sessionHash(id), data.passport?.user ?? null, JSON.stringify(data), this.until(data as SessionData)],
    );
  }
}

export const sessions = (deps: Deps): RequestHandler =>
  session({
    name: SESSION_COOKIE,
    secret: deps.config.sessionSecret,
    store: new DatabaseSessionStore(deps),
    resave: false,
    saveUninitialized: false,
    cookie: {
      httpOnly: true,
      sameSite: "lax",
      secure: deps.config.publicUrl.startsWith("https:"),
      maxAge: SIGNED_IN_FOR,
    },
  });
