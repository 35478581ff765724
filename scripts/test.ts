import { buildClient } from "./lib/build.ts";
import { runChecks } from "./lib/checks.ts";
import { requireAstropy, requireChromium } from "./lib/debian.ts";
import { addTally, type Tally, tallyLine } from "./lib/tally.ts";
import { startThrowawayDatabase, type ThrowawayDatabase } from "./lib/throwaway-database.ts";
import { describeTrouble } from "./lib/trouble.ts";
import { runVitest } from "./lib/vitest-run.ts";

/** Given to vitest as they are: `npm test -- --project unit science`. The checks run with the whole suite alone. */
const args = process.argv.slice(2);

let database: ThrowawayDatabase | undefined;

/** What a developer has set for the product must not reach the tests. */
const environment = (databaseUrl: string): NodeJS.ProcessEnv => ({
  ...Object.fromEntries(
    Object.entries(process.env).filter(([name]) => !/^(SHORTLIGHT|DATABASE)_/.test(name)),
  ),
  SHORTLIGHT_TEST_DATABASE_URL: databaseUrl,
});

const NONE: Tally = { passed: 0, failed: 0, skipped: 0 };

/** A step that fails counts as one failure and does not keep the others from running. */
const counted = async (step: () => Promise<Tally>): Promise<Tally> => {
  try {
    return await step();
  } catch (error) {
    process.stderr.write(`${describeTrouble(error)}\n`);
    return { ...NONE, failed: 1 };
  }
};

const build = async (): Promise<Tally> => {
  requireChromium();
  await buildClient();
  return NONE;
};

const references = async (): Promise<Tally> => {
  requireAstropy();
  return NONE;
};

const test = async (): Promise<Tally> => {
  database = await startThrowawayDatabase();
  return await runVitest(args, environment(database.url("{database}")));
};

const run = async (): Promise<void> => {
  let tally = NONE;
  for (const step of [...(args.length === 0 ? [runChecks] : []), build, references, test])
    tally = addTally(tally, await counted(step));
  await database?.stop();
  process.exitCode = tally.failed > 0 || tally.passed === 0 ? 1 : 0;
  process.stdout.write(`\n${tallyLine(tally)}\n`);
};

for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const)
  process.once(signal, () => {
    void Promise.resolve(database?.stop()).finally(() => process.exit(130));
  });

await run();
