import { type ChildProcess, spawn } from "node:child_process";
import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { lineReader, readableLine } from "./log-lines.ts";
import { endProcess, livingProcess } from "./processes.ts";
import { ROOT } from "./root.ts";

export interface ChildSpec {
  /** `web`, `worker` or `vite`: in front of its lines, and the name of its pid file. */
  name: string;
  args: string[];
  env: NodeJS.ProcessEnv;
  /** A word of the command line by which the process is known again after a crash of the starter. */
  mark: string;
}

export interface Child {
  stop(): Promise<void>;
}

/** An end within this time of the start counts as a failed start. */
const QUICK_MS = 5_000;
const QUICK_ENDS_ALLOWED = 3;
const RESTART_MS = 1_000;
/** Longer than the processes give their own work to come to an end. */
const STOP_MS = 30_000;

const print = (line: string): void => {
  process.stdout.write(`${line}\n`);
};

const pidFile = (folder: string, name: string): string => join(folder, `${name}.pid`);

/** Ends what an earlier run left behind, known by its number and its command line. */
export const endLeftOver = async (folder: string, name: string, mark: string): Promise<void> => {
  const pid = livingProcess(pidFile(folder, name), mark);
  if (pid !== null) await endProcess(pid, STOP_MS);
  rmSync(pidFile(folder, name), { force: true });
};

/** Runs a process of ours for as long as the starter runs; one that dies is started again. */
export const keepRunning = (folder: string, spec: ChildSpec, onGivenUp: (why: string) => void): Child => {
  mkdirSync(folder, { recursive: true });
  let isStopping = false;
  let quickEnds = 0;
  let child: ChildProcess;
  let again: NodeJS.Timeout | undefined;

  const launch = (): void => {
    const began = Date.now();
    child = start(folder, spec);
    child.once("exit", (code, signal) => {
      if (isStopping) return;
      const how = signal ?? `code ${code}`;
      quickEnds = Date.now() - began < QUICK_MS ? quickEnds + 1 : 0;
      if (quickEnds >= QUICK_ENDS_ALLOWED)
        return onGivenUp(`The ${spec.name} process keeps ending right after its start (${how}).`);
      print(readableLine(spec.name, `ended with ${how}; starting it again`));
      again = setTimeout(launch, RESTART_MS);
    });
  };
  launch();

  return {
    stop: async () => {
      isStopping = true;
      clearTimeout(again);
      if (child.pid && child.exitCode === null && child.signalCode === null)
        await endProcess(child.pid, STOP_MS);
      rmSync(pidFile(folder, spec.name), { force: true });
    },
  };
};

const start = (folder: string, spec: ChildSpec): ChildProcess => {
  // A group of its own, so that Ctrl-C reaches the starter alone; the channel tells it when the starter is gone.
  const child = spawn(process.execPath, spec.args, {
    cwd: ROOT,
    env: spec.env,
    detached: true,
    stdio: ["ignore", "pipe", "pipe", "ipc"],
  });
  if (child.pid) writeFileSync(pidFile(folder, spec.name), String(child.pid));
  const forward = lineReader((line) => print(readableLine(spec.name, line)));
  child.stdout?.on("data", forward);
  child.stderr?.on("data", forward);
  child.once("error", (error) => print(readableLine(spec.name, error.message)));
  return child;
};
