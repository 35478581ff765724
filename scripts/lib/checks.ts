import { spawn } from "node:child_process";
import { ROOT } from "./root.ts";
import type { Tally } from "./tally.ts";

/** The parts of `npm run check`, each counted like a test. */
const CHECKS = [
  { name: "types", args: ["node_modules/typescript/bin/tsc", "-b"] },
  {
    name: "lint and format",
    args: ["node_modules/@biomejs/biome/bin/biome", "check", "--error-on-warnings", "."],
  },
  { name: "unused exports", args: ["node_modules/knip/bin/knip.js"] },
];

const run = (args: string[]): Promise<{ code: number; said: string }> =>
  new Promise((resolve) => {
    const child = spawn(process.execPath, args, { cwd: ROOT, stdio: ["ignore", "pipe", "pipe"] });
    let said = "";
    const listen = (chunk: Buffer): void => {
      said += chunk.toString("utf8");
    };
    child.stdout.on("data", listen);
    child.stderr.on("data", listen);
    child.once("error", (error) => resolve({ code: 1, said: error.message }));
    child.once("close", (code) => resolve({ code: code ?? 1, said }));
  });

/** Runs them one after another; what a failing one said is printed. */
export const runChecks = async (): Promise<Tally> => {
  const tally: Tally = { passed: 0, failed: 0, skipped: 0 };
  for (const { name, args } of CHECKS) {
    const { code, said } = await run(args);
    if (code === 0) tally.passed++;
    else tally.failed++;
    process.stdout.write(`${code === 0 ? "ok" : "FAILED"}  ${name}\n${code === 0 ? "" : said}`);
  }
  return tally;
};
