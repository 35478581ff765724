import type { Recipe } from "#shared/science/recipes.ts";
import { bulkInsert, encodeValue, type Value } from "../database/bulk.ts";
import type { JobRun } from "../jobs/job-run.ts";
import { adopt, GIVEN } from "./adopt.ts";
import { deriveRows, STAR_VALUES } from "./derive-rows.ts";
import type { Fingerprint } from "./fingerprint.ts";

/** Which extracts count for the edition being made, besides those committed. */
export interface Basis {
  programmeId: string;
  /** Edition in force. */
  edition: number;
  recipe: Recipe;
  withExtract?: string;
  withoutExtract?: string;
}

export interface Changes {
  added: number;
  ended: number;
}

type Row = Record<string, Value>;

/** Looks the listed ids up one by one in the index: as a derived table they would be joined by a scan. */
const BY_INDEX = "SET STATEMENT in_predicate_conversion_threshold = 0 FOR";

const list = (columns: readonly string[], alias: string): string =>
  columns.map((c) => `${alias}.\`${c}\``).join(", ");
const ENTRY_COLUMNS = list(GIVEN, "e");
const STAR_COLUMNS = list(STAR_VALUES, "s");

/** What the extracts that count say of those stars, the preferred first: the extract committed last. */
const entriesOf = async (run: JobRun, basis: Basis, ids: string[]): Promise<Map<string, Value[][]>> => {
  const rows = await run.deps.db.query<Row[]>(
    `${BY_INDEX} SELECT e.star_id, e.extract_id, x.edition, ${ENTRY_COLUMNS}
     FROM entry e FORCE INDEX (entry_star) JOIN extract x ON x.extract_id = e.extract_id
     WHERE e.star_id IN (?) AND x.programme_id = ?
       AND (x.state = 'committed' OR x.extract_id = ?) AND x.extract_id <> ?`,
    [ids, basis.programmeId, basis.withExtract ?? 0, basis.withoutExtract ?? 0],
  );
  const age = (row: Row): number =>
    String(row.extract_id) === basis.withExtract ? Number.POSITIVE_INFINITY : Number(row.edition);
  rows.sort((a, b) => age(b) - age(a) || Number(b.extract_id) - Number(a.extract_id));
  const byStar = new Map<string, Value[][]>();
  for (const row of rows) {
    const values = GIVEN.map((key) => row[key] ?? null);
    const before = byStar.get(String(row.star_id));
    if (before) before.push(values);
    else byStar.set(String(row.star_id), [values]);
  }
  return byStar;
};

/** Those stars as the edition in force has them, as one text each. */
const textsInForce = async (run: JobRun, basis: Basis, ids: string[]): Promise<Map<string, string>> => {
  if (basis.edition === 0) return new Map();
  const rows = await run.deps.db.query<Row[]>(
    `${BY_INDEX} SELECT s.star_id, ${STAR_COLUMNS} FROM star s FORCE INDEX (PRIMARY)
     WHERE s.programme_id = ? AND s.star_id IN (?) AND s.from_edition <= ? AND s.to_edition IS NULL`,
    [basis.programmeId, ids, basis.edition],
  );
  return new Map(
    rows.map((row) => [String(row.star_id), textOf(STAR_VALUES.map((key) => row[key] ?? null))]),
  );
};

const textOf = (values: readonly Value[]): string => values.map(encodeValue).join("\t");

const close = async (run: JobRun, basis: Basis, ids: string[]): Promise<void> => {
  if (ids.length === 0) return;
  await run.deps.db.query(
    `${BY_INDEX} UPDATE star FORCE INDEX (PRIMARY) SET to_edition = ?
     WHERE programme_id = ? AND star_id IN (?) AND from_edition <= ? AND to_edition IS NULL`,
    [basis.edition + 1, basis.programmeId, ids, basis.edition],
  );
};

/**
 * Adopts and derives a block of stars for the edition after the one in force. Only stars that came out differently
 * get a new row; nothing of it shows before that edition is in force.
 */
export const prepareStars = async (
  run: JobRun,
  basis: Basis,
  ids: string[],
  fingerprint: Fingerprint,
): Promise<Changes> => {
  const entries = await entriesOf(run, basis, ids);
  const before = await textsInForce(run, basis, ids);
  const living = ids.filter((id) => entries.has(id));
  const rows = deriveRows(
    living.map((id) => adopt(entries.get(id) ?? [])),
    basis.recipe,
  );
  const written: Value[][] = [];
  const closed: string[] = [];
  const changes: Changes = { added: 0, ended: 0 };
  living.forEach((id, i) => {
    const values = rows[i] ?? [];
    const text = textOf(values);
    const old = before.get(id);
    if (old === text) return;
    if (old === undefined) changes.added++;
    else {
      fingerprint.remove(old);
      closed.push(id);
    }
    fingerprint.add(text);
    written.push([basis.programmeId, id, basis.edition + 1, ...values]);
  });
  for (const id of ids) {
    const old = before.get(id);
    if (old === undefined || entries.has(id)) continue;
    fingerprint.remove(old);
    closed.push(id);
    changes.ended++;
  }
  await close(run, basis, closed);
  await bulkInsert(run.deps.db, "star", ["programme_id", "star_id", "from_edition", ...STAR_VALUES], written);
  return changes;
};
