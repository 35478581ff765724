import type { Selection } from "#shared/api/selections.ts";
import type { SelectionVersion } from "../database/entities/selection.entity.ts";
import type { Saved } from "../versions/versioned.ts";

export const presentSelection = ({ row, savedBy }: Saved<SelectionVersion>): Selection => ({
  id: row.selectionId ?? row.id,
  versionId: row.id,
  number: row.number,
  name: row.name,
  note: row.note,
  cuts: row.cuts as Selection["cuts"],
  savedBy,
  savedAt: row.savedAt.toISOString(),
});
