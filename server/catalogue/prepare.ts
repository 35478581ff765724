import type { RecipeSettings } from "#shared/science/recipes.ts";
import { bulkInsertBuffer, encodeRow, type Value } from "../database/bulk.ts";
import type { LineBuffer } from "../database/line-buffer.ts";
import { readArrays } from "../database/rows.ts";
import type { JobRun } from "../jobs/job-run.ts";
import { adopt, GIVEN } from "./adopt.ts";
import { deriveRows, STAR_VALUES } from "./derive-rows.ts";
import type { Fingerprint } from "./fingerprint.ts";

/** Which extracts count for the edition being made, besides those committed. */
export interface Basis {
  programmeId: string;
  /** Edition in force. */
  edition: number;
  recipe: RecipeSettings;
  withExtract?: string;
  withoutExtract?: string;
}

export interface Changes {
  added: number;
  ended: number;
}

/** Looks the listed ids up one by one in the index: as a derived table they would be joined by a scan. */
const BY_INDEX = "SET STATEMENT in_predicate_conversion_threshold = 0 FOR";

const list = (columns: readonly string[], alias: string): string =>
  columns.map((c) => `${alias}.\`${c}\``).join(", ");
const ENTRY_COLUMNS = list(GIVEN, "e");
const STAR_COLUMNS = list(STAR_VALUES, "s");
const WRITTEN_COLUMNS = ["programme_id", "star_id", "from_edition", ...STAR_VALUES];

/** What is read of a block of stars: what extracts say of them, and their rows in the edition in force. */
export interface StarBlock {
  ids: string[];
  entries: Map<string, Value[][]>;
  inForce: Map<string, string>;
}

/** What the extracts that count say of those stars, the preferred first: the extract committed last. */
const entriesOf = async (run: JobRun, basis: Basis, ids: string[]): Promise<Map<string, Value[][]>> => {
  const rows = await readArrays(
    run.deps.db,
    `${BY_INDEX} SELECT e.star_id, e.extract_id, x.edition, ${ENTRY_COLUMNS}
     FROM entry e FORCE INDEX (entry_star) JOIN extract x ON x.extract_id = e.extract_id
     WHERE e.star_id IN (?) AND x.programme_id = ?
       AND (x.state = 'committed' OR x.extract_id = ?) AND x.extract_id <> ?`,
    [ids, basis.programmeId, basis.withExtract ?? 0, basis.withoutExtract ?? 0],
  );
  const age = ([, extractId, edition]: Value[]): number =>
    String(extractId) === basis.withExtract ? Number.POSITIVE_INFINITY : Number(edition);
  rows.sort((a, b) => age(b) - age(a) || Number(b[1]) - Number(a[1]));
  const byStar = new Map<string, Value[][]>();
  for (const [id, , , ...values] of rows) {
    const before = byStar.get(String(id));
    if (before) before.push(values);
    else byStar.set(String(id), [values]);
  }
  return byStar;
};

/** Those stars as the edition in force has them, as one encoded line each. */
const linesInForce = async (run: JobRun, basis: Basis, ids: string[]): Promise<Map<string, string>> => {
  if (basis.edition === 0) return new Map();
  const rows = await readArrays(
    run.deps.db,
    `${BY_INDEX} SELECT s.star_id, ${STAR_COLUMNS} FROM star s FORCE INDEX (PRIMARY)
     WHERE s.programme_id = ? AND s.star_id IN (?) AND s.from_edition <= ? AND s.to_edition IS NULL`,
    [basis.programmeId, ids, basis.edition],
  );
  return new Map(rows.map(([id, ...values]) => [String(id), encodeRow(values)]));
};

export const readStarBlock = async (run: JobRun, basis: Basis, ids: string[]): Promise<StarBlock> => ({
  ids,
  entries: await entriesOf(run, basis, ids),
  inForce: await linesInForce(run, basis, ids),
});

/** What the next edition writes of a block, and which rows it takes the place of. */
export interface PreparedBlock extends Changes {
  lines: LineBuffer;
  closed: string[];
}

/**
 * Adopts and derives a block of stars: only those that come out differently get a new row.
 *
 * @param lines receives the new rows; what was in it before must have been written
 */
export const prepareBlock = (
  basis: Basis,
  { ids, entries, inForce }: StarBlock,
  fingerprint: Fingerprint,
  lines: LineBuffer,
): PreparedBlock => {
  lines.clear();
  const living = ids.filter((id) => entries.has(id));
  const writeStar = deriveRows(
    living.map((id) => adopt(entries.get(id) ?? [])),
    basis.recipe,
  );
  const prepared: PreparedBlock = { lines, closed: [], added: 0, ended: 0 };
  living.forEach((id, i) => {
    const begin = lines.length;
    lines.plain(basis.programmeId);
    lines.plain(id);
    lines.number(basis.edition + 1);
    const values = lines.length + 1;
    writeStar(i, lines);
    const row = lines.view().subarray(values);
    const old = inForce.get(id);
    if (old !== undefined && row.equals(Buffer.from(old))) {
      lines.rewind(begin);
      return;
    }
    if (old === undefined) prepared.added++;
    else {
      fingerprint.remove(old);
      prepared.closed.push(id);
    }
    fingerprint.add(row);
    lines.endRow();
  });
  for (const id of ids) {
    const old = inForce.get(id);
    if (old === undefined || entries.has(id)) continue;
    fingerprint.remove(old);
    prepared.closed.push(id);
    prepared.ended++;
  }
  return prepared;
};

/** Nothing of it shows before the edition is in force. */
export const writeBlock = async (
  run: JobRun,
  basis: Basis,
  { lines, closed }: PreparedBlock,
): Promise<void> => {
  if (closed.length > 0)
    await run.deps.db.query(
      `${BY_INDEX} UPDATE star FORCE INDEX (PRIMARY) SET to_edition = ?
       WHERE programme_id = ? AND star_id IN (?) AND from_edition <= ? AND to_edition IS NULL`,
      [basis.edition + 1, basis.programmeId, closed, basis.edition],
    );
  await bulkInsertBuffer(run.deps.db, "star", WRITTEN_COLUMNS, lines);
};
