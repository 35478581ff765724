import type { EntityManager } from "typeorm";
import { GIVEN_KEYS } from "#server/derive/star-columns.ts";
import { STORED_KEYS } from "#server/scan/index-columns.ts";
import { blankKey, columnsOf } from "#shared/catalogue/columns.ts";
import { CatalogueEdition } from "../database/entities/catalogue-edition.entity.ts";
import { METHOD_KEYS } from "../database/star-table.ts";

/** A row of `star` by its SQL names. */
export type StoredStar = Record<string, number | string | null> & {
  star_id: string;
  designation: string;
  source_id: string | null;
  release: string | null;
  from_edition: number;
  flags_bits: number;
};

export interface Scope {
  programmeId: string;
  edition: number;
}

const IN_EDITION = "programme_id = ? AND from_edition <= ? AND (to_edition IS NULL OR to_edition > ?)";
const scopeValues = ({ programmeId, edition }: Scope): unknown[] => [programmeId, edition, edition];

const BLANK_KEYS = columnsOf("stellar").flatMap((c) => (c.key === "flags" ? [] : [blankKey(c.key)]));
const ROW_COLUMNS = [
  "star_id",
  "designation",
  "source_id",
  "release",
  "from_edition",
  "flags_bits",
  ...STORED_KEYS,
  ...BLANK_KEYS,
  ...METHOD_KEYS.map((key) => `${key}_method`),
]
  .map((name) => `\`${name}\``)
  .join(", ");

/** As digits and not as quoted text: comparing a text with a 64-bit number goes through a double. */
const idList = (ids: readonly string[]): string => ids.map(BigInt).join(", ");

/** Rows of those stars as the edition knows them, in no order. */
export const findStars = (
  manager: EntityManager,
  scope: Scope,
  ids: readonly string[],
): Promise<StoredStar[]> =>
  ids.length === 0
    ? Promise.resolve([])
    : manager.query(
        `SELECT ${ROW_COLUMNS} FROM star WHERE ${IN_EDITION} AND star_id IN (${idList(ids)})`,
        scopeValues(scope),
      );

const GIVEN_COLUMNS = ["designation", ...GIVEN_KEYS].map((name) => `\`${name}\``).join(", ");

/** The adopted given values of one star as the edition knows it; null where there is no such star. */
export const findGiven = async (
  manager: EntityManager,
  scope: Scope,
  id: string,
): Promise<{ designation: string; given: Record<string, number> } | null> => {
  const [row] = await manager.query<Record<string, unknown>[]>(
    `SELECT ${GIVEN_COLUMNS} FROM star WHERE ${IN_EDITION} AND star_id = ${BigInt(id)}`,
    scopeValues(scope),
  );
  if (!row) return null;
  const given = GIVEN_KEYS.flatMap((key): [string, number][] => {
    const value = row[key];
    return typeof value === "number" ? [[key, value]] : [];
  });
  return { designation: String(row.designation ?? ""), given: Object.fromEntries(given) };
};

export type StoredEntry = Record<string, number | string | null> & {
  extract_id: string;
  extract_number: number;
  extract_name: string;
  row_number: number;
  designation: string | null;
  source_id: string | null;
  release: string | null;
};

/** What the extracts in force say of a star. */
export const findEntries = (
  manager: EntityManager,
  programmeId: string,
  starId: string,
): Promise<StoredEntry[]> =>
  manager.query(
    `SELECT e.*, x.number AS extract_number, x.name AS extract_name
     FROM entry e JOIN extract x ON x.extract_id = e.extract_id
     WHERE e.programme_id = ? AND e.star_id = ${BigInt(starId)} AND x.state = 'committed'
     ORDER BY x.number, e.row_number LIMIT 50`,
    [programmeId],
  );

const likePrefix = (text: string): string => `${text.replaceAll(/[\\%_]/g, "\\$&")}%`;

const SPELLINGS = ["designation", "source_id"] as const;

const ofCatalogue = (column: string, most: number): string =>
  `(SELECT star_id, \`${column}\` AS spelling FROM star
    WHERE ${IN_EDITION} AND \`${column}\` LIKE ? ORDER BY \`${column}\` LIMIT ${most})`;

const ofExtracts = (column: string, most: number): string =>
  `(SELECT e.star_id, e.\`${column}\` AS spelling FROM entry e JOIN extract x ON x.extract_id = e.extract_id
    WHERE e.programme_id = ? AND e.\`${column}\` LIKE ? AND e.star_id IS NOT NULL AND x.state = 'committed'
    ORDER BY e.\`${column}\` LIMIT ${most})`;

/**
 * Ids of stars whose designation or identifier begins so, in the catalogue's spelling or, for who may read them, in
 * that of any extract in force. Exact spellings come first.
 */
export const findBySpelling = async (
  manager: EntityManager,
  scope: Scope,
  text: string,
  most: number,
  mayReadExtracts: boolean,
): Promise<string[]> => {
  const prefix = likePrefix(text);
  const parts = SPELLINGS.flatMap((column) => [
    { sql: ofCatalogue(column, most), values: [...scopeValues(scope), prefix] },
    ...(mayReadExtracts ? [{ sql: ofExtracts(column, most), values: [scope.programmeId, prefix] }] : []),
  ]);
  const rows = await manager.query<{ star_id: string }[]>(
    `SELECT star_id, MAX(spelling = ?) AS is_exact, MIN(spelling) AS spelling
     FROM (${parts.map((part) => part.sql).join(" UNION ALL ")}) found
     GROUP BY star_id ORDER BY is_exact DESC, spelling, star_id LIMIT ${most}`,
    [text, ...parts.flatMap((part) => part.values)],
  );
  return rows.map((row) => String(row.star_id));
};

export const editionMadeAt = async (
  manager: EntityManager,
  programmeId: string,
  number: number,
): Promise<Date | null> =>
  (await manager.findOneBy(CatalogueEdition, { programmeId, number }))?.madeAt ?? null;
