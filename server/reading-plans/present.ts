import { type NamedPlan, readingPlan } from "#shared/api/extracts.ts";
import type { ReadingPlanVersion } from "../database/entities/reading-plan.entity.ts";
import type { Saved } from "../versions/versioned.ts";

export const presentNamedPlan = ({ row, savedBy }: Saved<ReadingPlanVersion>): NamedPlan => ({
  id: row.readingPlanId ?? row.id,
  versionId: row.id,
  number: row.number,
  name: row.name,
  plan: readingPlan.parse(row.plan),
  savedBy,
  savedAt: row.savedAt.toISOString(),
});
