import type { Catalogue } from "#shared/api/stars.ts";
import type { Deps } from "../deps.ts";

interface Row {
  number: number;
  reason: string;
  stars: number;
  recipe: string;
  fingerprint: string;
  madeAt: Date;
  madeBy: string | null;
}

/** The editions of a programme's catalogue, newest first. */
export const readCatalogue = async (deps: Deps, programmeId: string): Promise<Catalogue> => {
  const rows = await deps.db.query<Row[]>(
    `SELECT e.number, e.reason, e.stars, e.recipe, e.fingerprint, e.made_at AS madeAt, p.name AS madeBy
     FROM catalogue_edition e LEFT JOIN person p ON p.person_id = e.made_by
     WHERE e.programme_id = ? ORDER BY e.number DESC`,
    [programmeId],
  );
  return {
    edition: rows[0]?.number ?? null,
    editions: rows.map((row) => ({
      ...row,
      madeAt: row.madeAt.toISOString(),
      madeBy: row.madeBy ?? "Shortlight",
    })),
  };
};
