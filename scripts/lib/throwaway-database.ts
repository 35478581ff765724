import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { startMariaDb } from "./mariadb.ts";
import { commandOf, endProcess, livingProcess } from "./processes.ts";

const PREFIX = "shortlight-throwaway-";

export interface ThrowawayDatabase {
  url(database: string): string;
  stop(): Promise<void>;
}

/** Ends and removes what a run left behind that was killed before it could tidy up. */
const sweep = async (): Promise<void> => {
  for (const name of readdirSync(tmpdir()).filter((entry) => entry.startsWith(PREFIX))) {
    const folder = join(tmpdir(), name);
    try {
      if (commandOf(Number(readFileSync(join(folder, "owner"), "utf8"))) !== null) continue;
      const pid = livingProcess(join(folder, "mariadb.pid"), `--datadir=${join(folder, "data")} `);
      if (pid !== null) await endProcess(pid, 0);
      rmSync(folder, { recursive: true, force: true });
    } catch {
      // Another user's, or being made or swept by another run at this moment.
    }
  }
};

/** A MariaDB of its own in a temporary folder, gone with all its data at the end. */
export const startThrowawayDatabase = async (): Promise<ThrowawayDatabase> => {
  await sweep();
  mkdirSync(tmpdir(), { recursive: true });
  const folder = mkdtempSync(join(tmpdir(), PREFIX));
  writeFileSync(join(folder, "owner"), String(process.pid));
  const remove = () => rmSync(folder, { recursive: true, force: true });
  try {
    const server = await startMariaDb({ folder, isThrowaway: true });
    const stop = async (): Promise<void> => {
      await server.stop();
      remove();
    };
    return { url: server.url, stop };
  } catch (error) {
    remove();
    throw error;
  }
};
