import { execFileSync } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
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

/**
 * Whether nothing of the process is left but, at most, its entry in the list. While it is ending it has no command
 * line any more but still holds its files and ports; with many threads the first may be done before the others.
 */
const isGone = (pid: number): boolean => {
  if (process.platform !== "linux") return commandOf(pid) === null;
  try {
    const state = readFileSync(`/proc/${pid}/stat`, "utf8").split(") ").at(-1)?.charAt(0);
    return state === "X" || (state === "Z" && readdirSync(`/proc/${pid}/task`).length <= 1);
  } catch {
    return true;
  }
};

const numberIn = (pidFile: string): number | null => {
  try {
    const pid = Number(readFileSync(pidFile, "utf8").trim());
    return Number.isInteger(pid) && pid > 1 ? pid : null;
  } catch {
    return null;
  }
};

/** The number kept in that file if it is of a live process whose command line has that word; else null. */
export const livingProcess = (pidFile: string, word: string): number | null => {
  const pid = numberIn(pidFile);
  return pid !== null && commandOf(pid)?.includes(word) ? pid : null;
};

/** Waits while the process of that file is dying but still holds on to what it had open. */
export const waitWhileEnding = async (pidFile: string, patienceMs: number): Promise<void> => {
  const pid = numberIn(pidFile);
  const until = Date.now() + patienceMs;
  while (pid !== null && commandOf(pid) === null && !isGone(pid) && Date.now() < until) await sleep(20);
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
  const isThere = (): boolean => {
    const now = commandOf(pid);
    // Another command: the number has been given to a new process.
    return now === null || now === before ? !isGone(pid) : false;
  };
  if (!isThere()) return;
  signal(pid, "SIGTERM");
  const until = Date.now() + patienceMs;
  while (isThere() && Date.now() < until) await sleep(50);
  if (isThere()) signal(pid, "SIGKILL");
  while (isThere()) await sleep(20);
};
