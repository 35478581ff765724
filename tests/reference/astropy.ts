import { spawn } from "node:child_process";
import { join } from "node:path";
import { findAstropy } from "#scripts/lib/debian.ts";
import { ROOT } from "#scripts/lib/root.ts";

const FOLDER = join(ROOT, "tests/reference");

/**
 * Runs a Python script of this folder with Debian's astropy, and gives what it prints.
 *
 * The input reaches the script as JSON on its standard input; it answers with JSON on its standard output. JSON has no
 * NaN: a script writes `None` for one.
 *
 * @param script name of a file in tests/reference, such as `"sky.py"`
 * @throws when astropy is missing, the script fails or prints something else: a comparison is never skipped
 */
export const runAstropy = async (script: string, input: unknown): Promise<unknown> => {
  const python = findAstropy();
  if (!python) throw new Error("astropy or astropy_healpix is not installed; `npm test` installs them.");
  const { code, said, complaint } = await run(python, join(FOLDER, script), JSON.stringify(input));
  if (code !== 0) throw new Error(`${script} ended with code ${code}:\n${complaint.slice(-4000)}`);
  return JSON.parse(said);
};

interface Ended {
  code: number | null;
  said: string;
  complaint: string;
}

const run = (python: string, file: string, input: string): Promise<Ended> =>
  new Promise((resolve, reject) => {
    // -E and -s: neither the environment nor the person's own packages may stand in for Debian's.
    const child = spawn(python, ["-E", "-s", "-B", file], { cwd: FOLDER, stdio: ["pipe", "pipe", "pipe"] });
    let said = "";
    let complaint = "";
    child.stdout.setEncoding("utf8").on("data", (text: string) => {
      said += text;
    });
    child.stderr.setEncoding("utf8").on("data", (text: string) => {
      complaint += text;
    });
    child.once("error", reject);
    child.once("close", (code) => resolve({ code, said, complaint }));
    // A script that fails early closes its input; its own words say more than the broken pipe.
    child.stdin.on("error", () => undefined);
    child.stdin.end(input);
  });
