import { readdir, rm, stat } from "node:fs/promises";
import { join } from "node:path";
import { Programme } from "../database/entities/programme.entity.ts";
import type { Deps } from "../deps.ts";
import { editionOfFile, type ScanKey } from "./key.ts";

const MOST_FILES = 16;
/** A file that is still being written is never this old. */
const ABANDONED_MS = 6 * 3600 * 1000;

/** Removes what an attempt that failed left of an edition that is not in force yet. */
export const removeOfEdition = async (deps: Deps, folder: string, key: ScanKey): Promise<void> => {
  const programme = await deps.db.manager.findOneBy(Programme, { id: key.programmeId });
  if (!programme || programme.edition >= key.edition) return;
  for (const name of await readdir(folder))
    if ((editionOfFile(name) ?? 0) >= key.edition) await rm(join(folder, name), { force: true });
};

/**
 * Keeps the files built last; older ones are made anew when someone asks for them. A file that is open stays
 * readable for whoever has it open.
 */
export const removeOld = async (folder: string): Promise<void> => {
  const files = await Promise.all(
    (await readdir(folder)).map(async (name) => ({
      path: join(folder, name),
      isWhole: name.endsWith(".duckdb"),
      changed: (await stat(join(folder, name)).catch(() => undefined))?.mtimeMs ?? 0,
    })),
  );
  const old = files
    .filter((f) => f.isWhole)
    .sort((a, b) => b.changed - a.changed)
    .slice(MOST_FILES);
  const abandoned = files.filter((f) => !f.isWhole && Date.now() - f.changed > ABANDONED_MS);
  for (const { path } of [...old, ...abandoned]) await rm(path, { force: true });
};
