import { ReadingPlanVersion } from "../database/entities/reading-plan.entity.ts";
import type { Kind } from "../versions/versioned.ts";

export const READING_PLANS: Kind<ReadingPlanVersion> = {
  entity: ReadingPlanVersion,
  table: "reading_plan",
  rootKey: "readingPlanId",
  rootColumn: "reading_plan_id",
  idColumn: "reading_plan_version_id",
  word: "reading plan",
  subject: "reading-plan",
};
