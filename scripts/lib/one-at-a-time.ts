import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { livingProcess } from "./processes.ts";
import { Trouble } from "./trouble.ts";

/** Refuses to start a second time over the same folder; answers what to do at the end. */
export const claimFolder = (folder: string): (() => void) => {
  mkdirSync(folder, { recursive: true });
  const file = join(folder, "starter.pid");
  const other = livingProcess(file, "scripts/start.mjs");
  if (other !== null && other !== process.pid)
    throw new Trouble(
      `Shortlight is already running from this folder (process ${other}); stop that one first, with Ctrl-C in its terminal or with kill ${other}.`,
    );
  writeFileSync(file, String(process.pid));
  return () => rmSync(file, { force: true });
};
