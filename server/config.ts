import { dirname, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { databaseUrlFrom } from "./config/database-url.ts";
import { keptSecret } from "./config/kept-secret.ts";
import { type Environment, SETTING_NAMES, settingsSchema } from "./config/settings.ts";
import type { LogLevel } from "./log.ts";

const ROOT = join(dirname(fileURLToPath(import.meta.url)), "..");

/** Everything that differs between installations, checked once, before anything is started. */
export interface Config {
  port: number;
  host: string;
  /** Scheme, host and port that people type: the start of links in mails. No slash at the end. */
  publicUrl: string;
  /** Signs session cookies. */
  sessionSecret: string;
  databaseUrl: string;
  /** Null: mails are kept in the local mailbox alone. */
  smtpUrl: string | null;
  mailFrom: string;
  folders: {
    /** What is made while running and is not the database's. */
    var: string;
    files: string;
    scan: string;
    /** The built client. */
    client: string;
  };
  /** How many proxies stand in front; 0 when none does. */
  trustedProxies: number;
  logLevel: LogLevel;
  /** Seeds the invented programme into an empty database and opens the local mailbox to administrators. */
  isDemo: boolean;
  uploadBytes: number;
  /** Only tests switch these off. */
  rateLimits: boolean;
}

/** Before a private database is started there is no address for it yet. */
export type Settings = Omit<Config, "databaseUrl"> & { databaseUrl: string | null };

/** Every setting that cannot be used, one sentence each. */
export class ConfigError extends Error {
  constructor(readonly problems: readonly string[]) {
    super(problems.join("\n"));
    this.name = "ConfigError";
  }
}

/** An empty variable counts as not set, as a shell or a service file often leaves it. */
const withoutEmpty = (env: Environment): Record<string, string> =>
  Object.fromEntries(
    Object.entries(env).flatMap(([name, value]) => (value?.trim() ? [[name, value.trim()]] : [])),
  );

const INTERNAL = ["SHORTLIGHT_API", "SHORTLIGHT_TEST_DATABASE_URL"];

const unknownNames = (given: Record<string, string>): string[] =>
  Object.keys(given)
    .filter((name) => name.startsWith("SHORTLIGHT_"))
    .filter((name) => !SETTING_NAMES.includes(name) && !INTERNAL.includes(name))
    .map((name) => `${name} is not a setting; the README lists those there are.`);

/** The settings of this environment, or a `ConfigError` naming all that is wrong with them at once. */
export const readSettings = (env: Environment): Settings => {
  const given = withoutEmpty(env);
  const parsed = settingsSchema.safeParse(given);
  const database = databaseUrlFrom(given);
  const problems = [...unknownNames(given), ...database.problems];
  if (!parsed.success) problems.push(...parsed.error.issues.map((i) => `${i.path.join(".")} ${i.message}`));
  if (!parsed.success || problems.length > 0) throw new ConfigError(problems);
  const s = parsed.data;
  const varFolder = resolve(ROOT, s.SHORTLIGHT_VAR);
  return {
    port: s.SHORTLIGHT_PORT,
    host: s.SHORTLIGHT_HOST,
    publicUrl: s.SHORTLIGHT_PUBLIC_URL ?? `http://${s.SHORTLIGHT_HOST}:${s.SHORTLIGHT_PORT}`,
    sessionSecret: s.SHORTLIGHT_SESSION_SECRET ?? keptSecret(join(varFolder, "session-secret")),
    databaseUrl: database.url,
    smtpUrl: s.SHORTLIGHT_SMTP_URL ?? null,
    mailFrom: s.SHORTLIGHT_MAIL_FROM,
    folders: {
      var: varFolder,
      files: s.SHORTLIGHT_FILES ? resolve(ROOT, s.SHORTLIGHT_FILES) : join(varFolder, "files"),
      scan: s.SHORTLIGHT_SCAN ? resolve(ROOT, s.SHORTLIGHT_SCAN) : join(varFolder, "scan"),
      client: join(ROOT, "dist"),
    },
    trustedProxies: s.SHORTLIGHT_TRUSTED_PROXIES,
    logLevel: s.SHORTLIGHT_LOG_LEVEL,
    isDemo: s.SHORTLIGHT_DEMO,
    uploadBytes: s.SHORTLIGHT_UPLOAD_BYTES,
    rateLimits: s.SHORTLIGHT_RATE_LIMITS,
  };
};

/** The same for a process that needs the database. */
export const loadConfig = (env: Environment): Config => {
  const settings = readSettings(env);
  if (settings.databaseUrl === null)
    throw new ConfigError([
      "DATABASE_URL is not set; `npm start` sets it, or give the address of a database.",
    ]);
  return { ...settings, databaseUrl: settings.databaseUrl };
};
