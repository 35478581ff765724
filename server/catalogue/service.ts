import type { Catalogue } from "#shared/api/stars.ts";
import type { Deps } from "../deps.ts";
import { JOINED_RECIPE, type JoinedRecipe, joinedRef } from "../recipes/queries.ts";

interface Row extends JoinedRecipe {
  number: number;
  reason: string;
  stars: number;
  fingerprint: string;
  madeAt: Date;
  madeBy: string | null;
}

/** The editions of a programme's catalogue, newest first. */
export const readCatalogue = async (deps: Deps, programmeId: string): Promise<Catalogue> => {
  const rows = await deps.db.query<Row[]>(
    `SELECT e.number, e.reason, e.stars, e.fingerprint, e.made_at AS madeAt, p.name AS madeBy,
       ${JOINED_RECIPE}
     FROM catalogue_edition e JOIN recipe r ON r.recipe_version_id = e.recipe_version_id
       LEFT JOIN person p ON p.person_id = e.made_by
     WHERE e.programme_id = ? ORDER BY e.number DESC`,
    [programmeId],
  );
  return {
    edition: rows[0]?.number ?? null,
    editions: rows.map((row) => ({
      number: row.number,
      reason: row.reason,
      stars: row.stars,
      recipe: joinedRef(row),
      fingerprint: row.fingerprint,
      madeAt: row.madeAt.toISOString(),
      madeBy: row.madeBy ?? "Shortlight",
    })),
  };
};
