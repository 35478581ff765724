import { readSettings, type Settings } from "#server/config.ts";
import { buildClient } from "./lib/build.ts";
import { openDatabase } from "./lib/database.ts";
import { type DemoSignIn, seedWhenEmpty } from "./lib/demo.ts";
import { claimFolder } from "./lib/one-at-a-time.ts";
import { requirePort } from "./lib/ports.ts";
import { startPrivateDatabase } from "./lib/private-database.ts";
import { endLeftOverServices, startServices } from "./lib/services.ts";
import { describeTrouble } from "./lib/trouble.ts";

const isDev = process.argv.includes("--dev");

/** What has been started so far, to be undone in the opposite order. */
const undo: (() => Promise<void> | void)[] = [];
let ending: Promise<void> | undefined;
/** What is being started at this moment: it has to be there before it can be stopped. */
let starting: Promise<unknown> = Promise.resolve();

const end = (code: number): Promise<void> => {
  ending ??= (async () => {
    await starting;
    for (const step of undo.reverse()) await step();
    process.exit(code);
  })();
  return ending;
};

const prepareDatabase = async (settings: Settings): Promise<{ url: string; signIns: DemoSignIn[] }> => {
  let url = settings.databaseUrl;
  if (url === null) {
    const own = await startPrivateDatabase(settings.folders.var);
    undo.push(own.stop);
    url = own.url;
  }
  const db = await openDatabase(url);
  try {
    return {
      url,
      signIns: settings.isDemo ? await seedWhenEmpty(db, { ...settings, databaseUrl: url }) : [],
    };
  } finally {
    await db.destroy();
  }
};

/** Both results, and neither left running behind the other's failure. */
const finished = async <A, B>(a: Promise<A>, b: Promise<B> | undefined): Promise<[A, B | undefined]> => {
  starting = Promise.allSettled([a, b]);
  await starting;
  return Promise.all([a, b]);
};

const describeSignIns = (signIns: DemoSignIn[]): string[] => {
  if (signIns.length === 0) return [];
  const lines = signIns.map(
    ({ email, password, roles }) => `  ${email.padEnd(34)} ${password.padEnd(24)} ${roles}`,
  );
  return ["", "Sign-ins of the practice programme (its people and its sky are invented):", ...lines];
};

const isOpenToOthers = (host: string): boolean => !["127.0.0.1", "::1", "localhost"].includes(host);

const run = async (): Promise<void> => {
  const began = performance.now();
  const settings = readSettings(process.env);
  undo.push(claimFolder(`${settings.folders.var}/run`));
  await endLeftOverServices(settings);
  await requirePort(settings.host, settings.port, "SHORTLIGHT_PORT");
  if (isDev) await requirePort("127.0.0.1", 4500, "the port in vite.config.ts");
  const [database] = await finished(prepareDatabase(settings), isDev ? undefined : buildClient());
  if (ending) return;
  const services = startServices(settings, database.url, isDev);
  undo.push(services.stop);
  await Promise.race([services.ready, services.failed]);
  if (ending) return;
  const seconds = ((performance.now() - began) / 1000).toFixed(1);
  const lines = [
    "",
    `Shortlight is ready at ${services.url} (after ${seconds} s).`,
    ...describeSignIns(database.signIns),
    ...(database.signIns.length > 0 && isOpenToOthers(settings.host)
      ? [
          "",
          "Others can reach this address, and these passwords are known: set SHORTLIGHT_DEMO=false for real work.",
        ]
      : []),
    "",
    "Ctrl-C stops it.",
  ];
  process.stdout.write(`${lines.join("\n")}\n`);
  await services.failed;
};

for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const)
  process.on(signal, () => {
    if (!ending && signal !== "SIGHUP") process.stderr.write("\nStopping ...\n");
    void end(0);
  });
// The terminal may be gone before the processes are.
process.stdout.on("error", () => undefined);
process.stderr.on("error", () => undefined);

run().catch((error: unknown) => {
  if (!ending) process.stderr.write(`${describeTrouble(error)}\n`);
  void end(1);
});
