import { randomBytes } from "node:crypto";
import { mkdir, open, rename, rm } from "node:fs/promises";
import { join } from "node:path";
import { setImmediate as nextTurn } from "node:timers/promises";
import { type DuckDBConnection, DuckDBInstance } from "@duckdb/node-api";
import { CatalogueEdition } from "../database/entities/catalogue-edition.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { type RecipeInUse, recipeInUse } from "../recipes/queries.ts";
import { Batch } from "./batch.ts";
import { INDEX_COLUMNS } from "./index-columns.ts";
import { createAssessor } from "./instrument.ts";
import { fileName, keyName, programmeFolder, type ScanKey } from "./key.ts";
import { countStars, readStars } from "./read-stars.ts";
import { removeOfEdition, removeOld } from "./remove.ts";
import { campaignSettings, cardSettings } from "./settings.ts";
import { writeHistograms } from "./summarise.ts";

export type BuildProgress = (done: number, total: number) => Promise<void> | void;

export interface BuildOptions extends ScanKey {
  /** Version of the recipe of an edition that is not in force yet; by default the programme's. */
  recipeVersionId?: string;
}

const MEMORY = "512MB";
const PROGRESS_ROWS = 20_480;
const FLUSH_ROWS = 10_240;

/** The recipe that the edition was, or is about to be, derived by. */
const recipeOf = async (
  deps: Deps,
  { programmeId, edition, recipeVersionId }: BuildOptions,
): Promise<RecipeInUse> => {
  const { manager } = deps.db;
  const made = await manager.findOneBy(CatalogueEdition, { programmeId, number: edition });
  const named = made?.recipeVersionId ?? recipeVersionId;
  if (named !== undefined) return recipeInUse(manager, programmeId, named);
  const programme = await manager.findOneBy(Programme, { id: programmeId });
  if (!programme) throw notFound("This programme");
  return recipeInUse(manager, programmeId, programme.recipeVersionId);
};

const assessorOf = async (
  deps: Deps,
  key: BuildOptions,
): Promise<ReturnType<typeof createAssessor> | null> => {
  if (key.cardVersionId === null) return null;
  return createAssessor({
    recipe: (await recipeOf(deps, key)).settings,
    card: await cardSettings(deps, key.programmeId, key.cardVersionId),
    campaign:
      key.campaignVersionId === null
        ? null
        : await campaignSettings(deps, key.programmeId, key.campaignVersionId),
  });
};

const copyStars = async (
  deps: Deps,
  key: BuildOptions,
  connection: DuckDBConnection,
  onProgress: BuildProgress,
): Promise<void> => {
  const columns = INDEX_COLUMNS.map(({ name, type }) => `"${name}" ${type}`).join(", ");
  await connection.run(`CREATE TABLE raw.star (${columns})`);
  const assess = await assessorOf(deps, key);
  const total = await countStars(deps, key);
  const appender = await connection.createAppender("star", "main", "raw");
  const batch = new Batch();
  let done = 0;
  const append = async (): Promise<void> => {
    done += batch.length;
    batch.appendTo(appender);
    // In small parts: what the appender holds is written without a pause.
    if (done % FLUSH_ROWS === 0) appender.flushSync();
    if (done % PROGRESS_ROWS === 0) await onProgress(done, total);
    // Rows that are already here would otherwise be worked off without a pause.
    await nextTurn();
  };
  for await (const cells of readStars(deps, key)) {
    batch.add(cells, assess);
    if (batch.isFull) await append();
  }
  if (batch.length > 0) await append();
  appender.closeSync();
  await onProgress(done, total);
};

/**
 * The stars with their ranks: `tie` orders equals (the brighter first, then by name as text), `name_rank` orders by
 * name. Ranked once here, every later sort handles two numbers a star.
 */
const rankStars = async (connection: DuckDBConnection): Promise<void> => {
  await connection.run(`CREATE TABLE raw.ranked AS SELECT star_id,
    row_number() OVER (ORDER BY g_mag NULLS LAST, card_mag NULLS LAST, ks_mag NULLS LAST,
      designation NULLS LAST, star_id)::INTEGER AS tie FROM raw.star`);
  await connection.run(`CREATE TABLE raw.named AS SELECT star_id,
    row_number() OVER (ORDER BY designation NULLS LAST, star_id)::INTEGER AS name_rank FROM raw.star`);
  await connection.run(`CREATE TABLE star AS SELECT s.*, r.tie, n.name_rank
    FROM raw.star s JOIN raw.ranked r USING (star_id) JOIN raw.named n USING (star_id)`);
};

/** A full disk is told as such; DuckDB says it in words alone. */
const withCode = (error: unknown): unknown =>
  error instanceof Error && /no space left/i.test(error.message)
    ? Object.assign(error, { code: "ENOSPC" })
    : error;

const quoted = (path: string): string => path.replaceAll("'", "''");

const writeFile = async (
  deps: Deps,
  key: BuildOptions,
  path: string,
  onProgress: BuildProgress,
): Promise<void> => {
  const instance = await DuckDBInstance.create(path, { memory_limit: MEMORY, threads: "2" });
  try {
    const connection = await instance.connect();
    try {
      await connection.run(`ATTACH '${quoted(`${path}.raw`)}' AS raw`);
      await copyStars(deps, key, connection, onProgress);
      await rankStars(connection);
      await writeHistograms(connection);
      await connection.run("CHECKPOINT");
    } finally {
      connection.closeSync();
    }
  } catch (error) {
    throw withCode(error);
  } finally {
    instance.closeSync();
  }
};

/** On disk before it gets its name, so that what has the name is whole even after a power cut. */
const settle = async (path: string): Promise<void> => {
  const file = await open(path, "r");
  await file.sync();
  await file.close();
};

/**
 * Mirrors an edition's numbers into the file of that key: complete or absent. The edition need not be in force yet;
 * building its base (no card, no campaign) then removes what an earlier attempt at the same edition left.
 */
export const buildScanIndex = async (
  deps: Deps,
  key: BuildOptions,
  onProgress: BuildProgress = () => undefined,
): Promise<void> => {
  const began = performance.now();
  const folder = await programmeFolder(deps, key.programmeId);
  await mkdir(folder, { recursive: true });
  if (key.cardVersionId === null) await removeOfEdition(deps, folder, key);
  const aside = join(folder, `${fileName(key)}.${randomBytes(6).toString("hex")}.part`);
  try {
    await writeFile(deps, key, aside, onProgress);
    await settle(aside);
    await rename(aside, join(folder, fileName(key)));
  } finally {
    for (const rest of ["", ".wal", ".raw", ".raw.wal"]) await rm(`${aside}${rest}`, { force: true });
  }
  await removeOld(folder);
  deps.log.info("scan", `Built the scan index ${keyName(key)}`, {
    programmeId: key.programmeId,
    ms: Math.round(performance.now() - began),
  });
};
