import { join } from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import type { Settings } from "#server/config.ts";
import { type Child, type ChildSpec, endLeftOver, keepRunning } from "./children.ts";
import { ROOT } from "./root.ts";
import { Trouble } from "./trouble.ts";

/** The C library would keep freed memory apart for each of a dozen threads. */
const MALLOC_ARENA_MAX = "2";
const READY_MS = 60_000;
const DEV_URL = "http://127.0.0.1:4500";

const at = (path: string): string => join(ROOT, path);

/**
 * The web process keeps its young objects in little room and so gives memory back early; the worker, which makes
 * millions of short-lived ones, is given more, as collecting them took a third of an import.
 */
const HEAP: Record<string, string[]> = {
  "server/web.ts": ["--max-semi-space-size=4", "--max-old-space-size=256"],
  "server/worker.ts": ["--max-semi-space-size=64"],
};

const serverArgs = (file: string, isDev: boolean): string[] => {
  const follow = ["--import", at("scripts/lib/follow-parent.mjs")];
  if (!isDev) return [...(HEAP[file] ?? []), "--import", "tsx", ...follow, at(file)];
  const watch = ["watch", "--clear-screen=false", "--tsconfig", at("server/tsconfig.json")];
  return [...follow, at("node_modules/tsx/dist/cli.mjs"), ...watch, at(file)];
};

const PARTS = ["DATABASE_HOST", "DATABASE_PORT", "DATABASE_USER", "DATABASE_PASSWORD", "DATABASE_NAME"];

const environment = (databaseUrl: string, isDev: boolean): NodeJS.ProcessEnv => {
  const own = Object.entries(process.env).filter(([name]) => !PARTS.includes(name));
  return {
    ...(isDev ? { SHORTLIGHT_PUBLIC_URL: DEV_URL } : {}),
    ...Object.fromEntries(own),
    DATABASE_URL: databaseUrl,
    TSX_TSCONFIG_PATH: at("server/tsconfig.json"),
  };
};

/** Where this machine reaches an address that a server listens on. */
const localUrl = (host: string, port: number): string => {
  const name = host === "0.0.0.0" ? "127.0.0.1" : host === "::" ? "::1" : host;
  return `http://${name.includes(":") ? `[${name}]` : name}:${port}`;
};

const specs = (settings: Settings, databaseUrl: string, isDev: boolean): ChildSpec[] => {
  const env = environment(databaseUrl, isDev);
  const server = (name: string, file: string): ChildSpec => ({
    name,
    args: serverArgs(file, isDev),
    env: { MALLOC_ARENA_MAX, ...env },
    mark: at(file),
  });
  const all = [server("web", "server/web.ts"), server("worker", "server/worker.ts")];
  if (!isDev) return all;
  const vite = at("node_modules/vite/bin/vite.js");
  const api = localUrl(settings.host, settings.port);
  const args = ["--import", at("scripts/lib/follow-parent.mjs"), vite, "--clearScreen", "false"];
  return [...all, { name: "vite", args, env: { ...env, SHORTLIGHT_API: api }, mark: vite }];
};

const pidFolder = (settings: Settings): string => join(settings.folders.var, "run");

/** Ends processes of an earlier run whose starter was killed, before their port and database are wanted again. */
export const endLeftOverServices = async (settings: Settings): Promise<void> => {
  const known = specs(settings, "", true).map((spec) =>
    endLeftOver(pidFolder(settings), spec.name, spec.mark),
  );
  await Promise.all(known);
};

export interface Services {
  /** What to open in a browser. */
  url: string;
  /** Resolves once the API is answered. */
  ready: Promise<void>;
  /** Rejects when a process cannot be kept running. */
  failed: Promise<never>;
  stop(): Promise<void>;
}

/** Starts the web and worker processes, and the development server. */
export const startServices = (settings: Settings, databaseUrl: string, isDev: boolean): Services => {
  let giveUp: (error: Trouble) => void = () => {};
  const failed = new Promise<never>((_, reject) => {
    giveUp = reject;
  });
  failed.catch(() => undefined);
  const children: Child[] = specs(settings, databaseUrl, isDev).map((spec) =>
    keepRunning(pidFolder(settings), spec, (why) => giveUp(new Trouble(`${why} Its last lines are above.`))),
  );
  const stop = async (): Promise<void> => {
    await Promise.all(children.map((child) => child.stop()));
  };
  const ready = untilAnswered(`${localUrl(settings.host, settings.port)}/api/health`);
  ready.catch(() => undefined);
  return { url: isDev ? DEV_URL : settings.publicUrl, ready, failed, stop };
};

const untilAnswered = async (url: string): Promise<void> => {
  const until = Date.now() + READY_MS;
  while (Date.now() < until) {
    try {
      if ((await fetch(url)).ok) return;
    } catch {
      // Not listening yet.
    }
    await sleep(100);
  }
  throw new Trouble(
    `The web process did not answer at ${url} within ${READY_MS / 1000} s. Its last lines are above.`,
  );
};
