import { createServer } from "node:http";
import { createApp } from "./app.ts";
import { ConfigError, loadConfig } from "./config.ts";
import { closeDeps, createDeps, type Deps } from "./deps.ts";
import { removeUnfinishedUploads } from "./extracts/upload-unfinished.ts";
import { removeExpired } from "./http/expired.ts";
import { createLog } from "./log.ts";

/** Requests under way get this long to finish before their connections are cut; event streams never would. */
const GRACE_MS = 2_000;

const SWEEP_EVERY_MS = 15 * 60_000;

const sweep = (deps: Deps): void => {
  removeExpired(deps).catch((error: unknown) =>
    deps.log.warn("database", "Expired rows stay for now", { error }),
  );
  removeUnfinishedUploads(deps).catch((error: unknown) =>
    deps.log.warn("extract", "Unfinished uploads stay for now", { error }),
  );
};

const start = async (): Promise<void> => {
  const config = loadConfig(process.env);
  const log = createLog(config.logLevel, "web");
  const deps = await createDeps(config, log);
  const server = createServer(createApp(deps).app);

  const sweeping = setInterval(sweep, SWEEP_EVERY_MS, deps);

  let isStopping = false;
  const stop = (): void => {
    if (isStopping) return;
    isStopping = true;
    clearInterval(sweeping);
    setTimeout(() => server.closeAllConnections(), GRACE_MS).unref();
    server.close(() => {
      closeDeps(deps).then(
        () => process.exit(0),
        () => process.exit(1),
      );
    });
    server.closeIdleConnections();
  };
  process.once("SIGTERM", stop);
  process.once("SIGINT", stop);

  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(config.port, config.host, resolve);
  });
  log.info("start", `Answering at ${config.publicUrl}`);
};

/** One clear sentence for what whoever starts it can put right. */
const describe = (error: unknown): string => {
  if (error instanceof ConfigError) return error.message;
  const code = error instanceof Error && "code" in error ? error.code : undefined;
  if (code === "EADDRINUSE")
    return "The port is taken by another program. Stop it, or set SHORTLIGHT_PORT to a free one.";
  if (code === "EACCES") return "There is no right to use that port. Set SHORTLIGHT_PORT to one above 1023.";
  return error instanceof Error ? error.message : String(error);
};

start().catch((error: unknown) => {
  console.error(describe(error));
  process.exit(1);
});
