import { mkdtempSync, rmSync } from "node:fs";
import { createServer } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Express } from "express";
import supertest from "supertest";
import { afterAll } from "vitest";
import { createApp } from "#server/app.ts";
import { type Config, loadConfig } from "#server/config.ts";
import type { Person } from "#server/database/entities/person.entity.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import type { Deps } from "#server/deps.ts";
import type { DefinedRoute } from "#server/http/route.ts";
import { createLog, type LogLevel } from "#server/log.ts";
import { FolderStorage } from "#server/storage/folder-storage.ts";
import type { Role } from "#shared/policy/roles.ts";
import { testDatabaseUrl, testDataSource } from "./database.ts";
import { buildMember } from "./factories.ts";
import { type OpenSession, openSession } from "./sign-in.ts";

export type Agent = ReturnType<typeof supertest.agent>;

interface Someone {
  agent: Agent;
  person: Person;
  session: OpenSession;
}

export interface TestApp {
  app: Express;
  routes: DefinedRoute[];
  deps: Deps;
  /** Someone who is not signed in, with a session for the CSRF token. */
  visitor(): Promise<Agent>;
  /** That person, signed in; the token is sent along with every request. */
  as(person: Person): Promise<Someone>;
  /** A new member with those roles, signed in; in a programme of their own unless one is given. */
  asPerson(roles: Role | readonly Role[], programme?: Programme): Promise<Someone & { programme: Programme }>;
  /** Listens on a free port, for a real browser or a raw client; answers the address. */
  listen(): Promise<string>;
}

const toClose: (() => Promise<void> | void)[] = [];
afterAll(async () => {
  for (const close of toClose.splice(0).reverse()) await close();
});

/** The settings of a test installation; the folders are temporary and removed after the file. */
const testConfig = (more: Partial<Config>): Config => {
  const folder = mkdtempSync(join(tmpdir(), "shortlight-test-files-"));
  toClose.push(() => rmSync(folder, { recursive: true, force: true }));
  const config = loadConfig({
    DATABASE_URL: testDatabaseUrl(),
    SHORTLIGHT_VAR: folder,
    SHORTLIGHT_RATE_LIMITS: "false",
    SHORTLIGHT_SESSION_SECRET: "a secret for tests alone, long enough",
  });
  return { ...config, ...more };
};

/** The real application on this worker's database. Failures of the program itself are logged to the test's output. */
export const startTestApp = async (more: Partial<Config> = {}): Promise<TestApp> => {
  const config = testConfig({ logLevel: (process.env.TEST_LOG_LEVEL ?? "error") as LogLevel, ...more });
  const deps: Deps = {
    config,
    log: createLog(config.logLevel, "test"),
    db: await testDataSource(),
    files: new FolderStorage(config.folders.files),
    now: () => new Date(),
  };
  const { app, routes } = createApp(deps);

  const agentFor = (session: OpenSession): Agent =>
    supertest
      .agent(app)
      .set("Cookie", `${session.cookie.name}=${session.cookie.value}`)
      .set("X-CSRF-Token", session.csrfToken);

  const as = async (person: Person): Promise<Someone> => {
    const session = await openSession(deps.db, config.sessionSecret, person.id);
    return { agent: agentFor(session), person, session };
  };

  const listen = async (): Promise<string> => {
    const server = createServer(app);
    await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
    toClose.push(
      () =>
        new Promise<void>((resolve) => {
          server.close(() => resolve());
          server.closeAllConnections();
        }),
    );
    const address = server.address();
    const url = `http://127.0.0.1:${typeof address === "object" && address ? address.port : 0}`;
    config.publicUrl = url;
    return url;
  };

  return {
    app,
    routes,
    deps,
    visitor: async () => agentFor(await openSession(deps.db, config.sessionSecret, null)),
    as,
    asPerson: async (roles, programme) => {
      const made = await buildMember(deps.db, { roles: [roles].flat(), programme });
      return { ...(await as(made.person)), programme: made.programme };
    },
    listen,
  };
};
