import { spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { expect, test } from "vitest";
import { commandOf, endProcess, livingProcess } from "#scripts/lib/processes.ts";

test("a process is known again by its number and a word of its command, and only so", async () => {
  const child = spawn(process.execPath, ["-e", "setInterval(() => {}, 1000) // a-word-to-know"]);
  await once(child, "spawn");
  const folder = mkdtempSync(join(tmpdir(), "shortlight-pid-"));
  const file = join(folder, "it.pid");
  writeFileSync(file, String(child.pid));
  await expect.poll(() => livingProcess(file, "a-word-to-know")).toBe(child.pid);
  expect(livingProcess(file, "another-word")).toBeNull();

  await endProcess(child.pid ?? 0, 5000);
  expect(livingProcess(file, "a-word-to-know")).toBeNull();
  expect(child.signalCode ?? "SIGTERM").toBe("SIGTERM");
  rmSync(folder, { recursive: true });
});

test("one that does not listen is ended all the same", async () => {
  const script = "process.on('SIGTERM', () => {}); setInterval(() => {}, 1000); process.stdout.write('up')";
  const child = spawn(process.execPath, ["-e", script]);
  await once(child.stdout, "data");
  await endProcess(child.pid ?? 0, 100);
  expect(commandOf(child.pid ?? 0)).toBeNull();
});

test("a file that names no process is no process", () => {
  expect(livingProcess("/nonexistent.pid", "")).toBeNull();
});
