import type { ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";
import type { Deps } from "../deps.ts";
import type { SharedStars } from "./findings/look.ts";
import type { Sample } from "./sample.ts";

/** Identifiers that are looked up at most: enough to judge a whole column by. */
const MOST = 2000;

/** Temperature and distance as given are kept apart from what the recipe makes of them. */
const storedKey = (means: string): string => means.replace(/^(teff|distance)/, "$1_given");

interface Named {
  /** Column of the entry table that holds the name. */
  readonly column: "source_id" | "designation";
  readonly rows: ReadonlyMap<string, number>;
}

/** The sampled rows by the names that their stars have in the file. */
const namesOf = (sample: Sample, plan: ReadingPlan): Named | null => {
  for (const column of ["source_id", "designation"] as const) {
    const card = plan.columns.find((c) => c.means === column);
    const texts = card && sample.columns[card.index]?.texts;
    if (!texts) continue;
    const rows = new Map<string, number>();
    for (const [row, text] of texts.entries())
      if (text.trim() !== "" && rows.size < MOST) rows.set(text.trim(), row);
    if (rows.size > 0) return { column, rows };
  }
  return null;
};

const numericKeys = (plan: ReadingPlan): string[] =>
  plan.columns.map((c) => c.means).filter((means) => means !== KEPT && findMeaning(means)?.kind === "number");

/**
 * What committed extracts say of the stars of the sample: by identifier, else by name as it is spelled. The same number in
 * two releases is not the same star. Of several extracts the newest that has a value counts.
 */
export const sharedStarsOf = async (
  deps: Deps,
  { id, programmeId }: { id: string; programmeId: string },
  sample: Sample,
  plan: ReadingPlan,
): Promise<SharedStars | null> => {
  const named = namesOf(sample, plan);
  const keys = [...new Set(numericKeys(plan))];
  if (!named || keys.length === 0) return null;
  const columns = keys.map((key) => `e.\`${storedKey(key)}\` AS \`${key}\``).join(", ");
  const rows = await deps.db.manager.query<Record<string, unknown>[]>(
    `SELECT e.\`${named.column}\` AS star_name, ${columns}
     FROM entry e JOIN extract x ON x.extract_id = e.extract_id AND x.state = 'committed'
     WHERE e.programme_id = ? AND e.extract_id <> ? AND e.\`${named.column}\` IN (?)
       AND (? = '' OR e.release IS NULL OR e.release = ?)
     ORDER BY x.number`,
    [programmeId, id, [...named.rows.keys()], plan.release, plan.release],
  );
  if (rows.length === 0) return null;
  const values = new Map(keys.map((key) => [key, new Float64Array(sample.rows.length).fill(Number.NaN)]));
  const stars = new Set<number>();
  for (const entry of rows) {
    const row = named.rows.get(String(entry.star_name));
    if (row === undefined) continue;
    stars.add(row);
    for (const [key, column] of values) if (entry[key] !== null) column[row] = Number(entry[key]);
  }
  return { count: stars.size, values };
};
