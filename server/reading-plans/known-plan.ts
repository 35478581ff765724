import type { ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { readingPlan } from "#shared/api/extracts.ts";
import type { ReadingPlanVersion } from "../database/entities/reading-plan.entity.ts";
import type { Deps } from "../deps.ts";
import type { PlanProfile } from "../extracts/plan-profile.ts";
import type { Sample } from "../extracts/sample.ts";
import { newestVersions } from "../versions/versioned.ts";
import { differencesFrom, fitted, isOfOneKind, likeness } from "./fit.ts";
import { headerHash, headerOf } from "./header.ts";
import { READING_PLANS } from "./kind.ts";

/** A named plan for files like the one at hand. */
export interface KnownPlan {
  readonly row: ReadingPlanVersion;
  readonly plan: ReadingPlan;
  readonly profile: PlanProfile;
  readonly isSameHeader: boolean;
}

const newer = (a: ReadingPlanVersion, b: ReadingPlanVersion): number =>
  b.savedAt.getTime() - a.savedAt.getTime();

/** The plan saved last for this header, else the one for the header most like it; null where none is like it. */
export const findKnownPlan = async (
  deps: Deps,
  programmeId: string,
  header: readonly string[],
): Promise<KnownPlan | null> => {
  if (header.length === 0) return null;
  const hash = headerHash(header);
  const rows = (await newestVersions(deps, READING_PLANS, programmeId))
    .map((saved) => saved.row)
    .toSorted(newer);
  const plans = rows.map((row) => ({
    row,
    plan: readingPlan.parse(row.plan),
    profile: row.profile as PlanProfile,
    isSameHeader: row.headerHash === hash,
  }));
  const same = plans.find((known) => known.isSameHeader);
  if (same) return same;
  const [alike] = plans
    .filter(({ plan }) => isOfOneKind(headerOf(plan), header))
    .toSorted((a, b) => likeness(headerOf(b.plan), header) - likeness(headerOf(a.plan), header));
  return alike ?? null;
};

/** A known plan as the preview offers it. */
export const presentKnownPlan = (
  { row, plan }: KnownPlan,
  sample: Sample,
  suggested: ReadingPlan,
): ExtractPreview["knownPlan"] => ({
  versionId: row.id,
  name: row.name,
  number: row.number,
  plan: fitted(plan, suggested),
  differences: differencesFrom(plan, sample),
});
