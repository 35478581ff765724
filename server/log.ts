import pino from "pino";

/** What a line is about. Closed, so that a log can be filtered by it. */
export type LogCategory =
  | "start"
  | "http"
  | "auth"
  | "database"
  | "job"
  | "extract"
  | "catalogue"
  | "derive"
  | "scan"
  | "export"
  | "mail"
  | "storage"
  | "demo";

export const LOG_LEVELS = ["debug", "info", "warn", "error", "silent"] as const;
export type LogLevel = (typeof LOG_LEVELS)[number];

type Write = (category: LogCategory, message: string, extra?: Record<string, unknown>) => void;

export interface Log {
  debug: Write;
  info: Write;
  warn: Write;
  error: Write;
}

const SECRET_NAME = /password|passwd|secret|token|cookie|authori[sz]ation|session-?id|^sid$|csrf/i;
/** Sign-in details inside an address. */
const SECRET_IN_URL = /(\w+:\/\/)[^\s/@]*@/g;
const DEEPEST = 6;

const withoutSignIn = (text: string): string => text.replace(SECRET_IN_URL, "$1[hidden]@");

/** An error's own words only: drivers hang whole statements, with their values, on theirs. */
const describeError = (error: Error, depth: number): Record<string, unknown> => ({
  name: error.name,
  message: withoutSignIn(error.message),
  ...("code" in error ? { code: error.code } : {}),
  stack: error.stack && withoutSignIn(error.stack),
  ...(error.cause === undefined ? {} : { cause: withoutSecrets(error.cause, depth + 1) }),
});

/** A copy in which no value under a secret's name, and no sign-in inside an address, is left readable. */
export const withoutSecrets = (value: unknown, depth = 0): unknown => {
  if (typeof value === "string") return withoutSignIn(value);
  if (typeof value === "bigint") return value.toString();
  if (typeof value !== "object" || value === null || value instanceof Date) return value;
  if (depth > DEEPEST) return "[deeper]";
  if (value instanceof Error) return describeError(value, depth);
  if (Array.isArray(value)) return value.map((item) => withoutSecrets(item, depth + 1));
  return Object.fromEntries(
    Object.entries(value).map(([name, item]) => [
      name,
      SECRET_NAME.test(name) ? "[hidden]" : withoutSecrets(item, depth + 1),
    ]),
  );
};

/** One JSON line per entry on standard output, or wherever `destination` leads. */
export const createLog = (
  level: LogLevel,
  service: string,
  destination: pino.DestinationStream = pino.destination({ fd: 1, sync: true }),
): Log => {
  const logger = pino({ level, base: { service }, timestamp: pino.stdTimeFunctions.isoTime }, destination);
  const at =
    (name: "debug" | "info" | "warn" | "error"): Write =>
    (category, message, extra) =>
      logger[name]({ category, ...(withoutSecrets(extra ?? {}) as object) }, withoutSignIn(message));
  return { debug: at("debug"), info: at("info"), warn: at("warn"), error: at("error") };
};
