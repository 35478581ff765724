import { spawn } from "node:child_process";
import { existsSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { ROOT } from "./root.ts";
import { addTally, type Tally } from "./tally.ts";

interface Report {
  numPassedTests: number;
  numFailedTests: number;
  numPendingTests: number;
  numTodoTests: number;
  testResults: { status: string; assertionResults: unknown[] }[];
}

/** Files that failed before their first test count as one failure each; the report's own numbers leave them out. */
const tallyOf = (report: Report): Tally => ({
  passed: report.numPassedTests,
  failed:
    report.numFailedTests +
    report.testResults.filter((file) => file.status === "failed" && file.assertionResults.length === 0)
      .length,
  skipped: report.numPendingTests + report.numTodoTests,
});

/** Runs vitest as a person would, and counts what it reports. */
export const runVitest = async (args: string[], env: NodeJS.ProcessEnv): Promise<Tally> => {
  const file = join(tmpdir(), `shortlight-report-${process.pid}.json`);
  rmSync(file, { force: true });
  const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${file}`];
  const code = await run(["node_modules/vitest/vitest.mjs", "run", ...reporters, ...args], env);
  try {
    if (!existsSync(file)) return { passed: 0, failed: 1, skipped: 0 };
    const tally = tallyOf(JSON.parse(readFileSync(file, "utf8")) as Report);
    // An error outside any test fails the run without failing a test.
    return code !== 0 && tally.failed === 0 ? addTally(tally, { passed: 0, failed: 1, skipped: 0 }) : tally;
  } finally {
    rmSync(file, { force: true });
  }
};

const run = (args: string[], env: NodeJS.ProcessEnv): Promise<number> =>
  new Promise((resolve) => {
    const child = spawn(process.execPath, args, { cwd: ROOT, env, stdio: ["ignore", "inherit", "inherit"] });
    child.once("error", () => resolve(1));
    child.once("close", (code) => resolve(code ?? 1));
  });
