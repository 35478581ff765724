import type { ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import type { Extract } from "../database/entities/extract.entity.ts";
import type { Deps } from "../deps.ts";
import { findKnownPlan, type KnownPlan, presentKnownPlan } from "../reading-plans/known-plan.ts";
import type { Knowledge } from "./findings/look.ts";
import { planFindings } from "./findings.ts";
import { previewOf } from "./preview.ts";
import type { Sample } from "./sample.ts";
import { sharedStarsOf } from "./shared-stars.ts";

type Which = Pick<Extract, "id" | "programmeId">;

const knowledgeOf = async (
  deps: Deps,
  extract: Which,
  sample: Sample,
  plan: ReadingPlan | undefined,
  known: KnownPlan | null,
): Promise<Knowledge> => ({
  shared: plan ? await sharedStarsOf(deps, extract, sample, plan) : null,
  earlier: known?.isSameHeader ? { name: known.row.name, profile: known.profile } : null,
});

/** What is open about a file under a plan, also against what the catalogue knows already. */
export const reviewPlan = async (
  deps: Deps,
  extract: Which,
  sample: Sample,
  plan: ReadingPlan,
): Promise<Finding[]> => {
  const known = await findKnownPlan(deps, extract.programmeId, sample.header);
  return planFindings(sample, plan, await knowledgeOf(deps, extract, sample, plan, known));
};

/** The preview of a file under a plan, or as it shows itself, with the named plan that fits it. */
export const reviewFile = async (
  deps: Deps,
  extract: Which,
  sample: Sample,
  plan?: ReadingPlan,
): Promise<ExtractPreview> => {
  const known = await findKnownPlan(deps, extract.programmeId, sample.header);
  const preview = await previewOf(sample, plan, await knowledgeOf(deps, extract, sample, plan, known));
  const suggested = preview.plan;
  return known && suggested ? { ...preview, knownPlan: presentKnownPlan(known, sample, suggested) } : preview;
};
