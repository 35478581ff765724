#!/usr/bin/env node
import { handOverTo } from "./lib/bootstrap.mjs";

// Files are named from where the person stands; the hand-over goes to the checkout.
const folder = process.cwd();
await handOverTo("server/command-line/run.ts");
const { runCommandLine } = await import("../server/command-line/run.ts");
process.exitCode = await runCommandLine(process.argv.slice(2), {
  folder,
  out: process.stdout,
  err: process.stderr,
});
