import { execFileSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { setTimeout as sleep } from "node:timers/promises";

/** The command line of a running process, or null when there is none of that number. */
export const commandOf = (pid: number): string | null => {
  try {
    const text = readFileSync(`/proc/${pid}/cmdline`, "utf8");
    // A process that has ended but was not yet collected by its parent has an empty command line.
    return text === "" ? null : text.replaceAll("\0", " ").trim();
  } catch {
    return process.platform === "linux" ? null : commandByPs(pid);
  }
};

const commandByPs = (pid: number): string | null => {
  try {
    return execFileSync("ps", ["-o", "command=", "-p", String(pid)], { encoding: "utf8" }).trim() || null;
  } catch {
    return null;
  }
};

/** The number kept in that file if it is of a live process whose command line has that word; else null. */
export const livingProcess = (pidFile: string, word: string): number | null => {
  let pid: number;
  try {
    pid = Number(readFileSync(pidFile, "utf8").trim());
  } catch {
    return null;
  }
  if (!Number.isInteger(pid) || pid < 2) return null;
  return commandOf(pid)?.includes(word) ? pid : null;
};

const signal = (pid: number, name: NodeJS.Signals): void => {
  try {
    process.kill(pid, name);
  } catch {
    // Already gone.
  }
};

/** Asks the process to end, insists after `patienceMs`, and resolves once it is gone. */
export const endProcess = async (pid: number, patienceMs: number): Promise<void> => {
  const before = commandOf(pid);
  if (before === null) return;
  const isThere = () => commandOf(pid) === before;
  signal(pid, "SIGTERM");
  const until = Date.now() + patienceMs;
  while (isThere() && Date.now() < until) await sleep(50);
  if (!isThere()) return;
  signal(pid, "SIGKILL");
  while (isThere()) await sleep(20);
};
