import { spawn } from "node:child_process";
import { join } from "node:path";
import { ROOT } from "#scripts/lib/root.ts";
import type { Ended } from "./support.ts";

/** Runs the command as people do: a process of its own, called from some folder. */
export const shortlight = (folder: string, ...args: string[]): Promise<Ended> =>
  new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [join(ROOT, "scripts/shortlight.mjs"), ...args], {
      cwd: folder,
      stdio: ["ignore", "pipe", "pipe"],
    });
    let out = "";
    let err = "";
    child.stdout.setEncoding("utf8").on("data", (text: string) => {
      out += text;
    });
    child.stderr.setEncoding("utf8").on("data", (text: string) => {
      err += text;
    });
    child.once("error", reject);
    child.once("close", (code) => resolve({ code: code ?? -1, out, err }));
  });
