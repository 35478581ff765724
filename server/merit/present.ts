import type { Merit } from "#shared/api/merits.ts";
import type { MeritVersion } from "../database/entities/merit.entity.ts";
import type { Saved } from "../versions/versioned.ts";

export const presentMerit = ({ row, savedBy }: Saved<MeritVersion>): Merit => ({
  id: row.meritId ?? row.id,
  versionId: row.id,
  number: row.number,
  name: row.name,
  note: row.note,
  terms: row.terms as Merit["terms"],
  savedBy,
  savedAt: row.savedAt.toISOString(),
});
