import { IsNull, Not } from "typeorm";
import type { z } from "zod";
import { type NamedPlan, type namedPlanBody, type ReadingPlan, readingPlan } from "#shared/api/extracts.ts";
import { Extract } from "../database/entities/extract.entity.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { type PlanProfile, profileOf } from "../extracts/plan-profile.ts";
import { lookInto } from "../extracts/upload-keep.ts";
import { allVersions, type Editor, newestVersions, saveFirst, saveNext } from "../versions/versioned.ts";
import { headerHash, headerOf, ofAnyFile } from "./header.ts";
import { READING_PLANS } from "./kind.ts";
import { presentNamedPlan } from "./present.ts";

type Input = z.output<typeof namedPlanBody>;

/** Extracts among which the one is looked for that a plan was made on. */
const LATEST = 50;

/** What the newest file with that header holds; nothing where there is none. */
const profileFor = async (deps: Deps, programmeId: string, plan: ReadingPlan): Promise<PlanProfile> => {
  const rows = await deps.db.manager.find(Extract, {
    where: { programmeId, plan: Not(IsNull()), originalKey: Not(IsNull()) },
    order: { number: "DESC" },
    take: LATEST,
  });
  const hash = headerHash(headerOf(plan));
  const row = rows.find((each) => headerHash(headerOf(readingPlan.parse(each.plan))) === hash);
  return row ? profileOf(await lookInto(deps.files, row, plan), plan) : {};
};

const contentOf = async (deps: Deps, programmeId: string, { name, plan }: Input) => ({
  name,
  plan: ofAnyFile(plan),
  headerHash: headerHash(headerOf(plan)),
  profile: await profileFor(deps, programmeId, plan),
});

export const listReadingPlans = async (deps: Deps, programmeId: string): Promise<NamedPlan[]> =>
  (await newestVersions(deps, READING_PLANS, programmeId)).map(presentNamedPlan);

export const makeReadingPlan = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  input: Input,
): Promise<NamedPlan> =>
  presentNamedPlan(
    await saveFirst(deps, READING_PLANS, programmeId, editor, await contentOf(deps, programmeId, input)),
  );

/** A further version after the newest. */
export const saveReadingPlan = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  id: string,
  input: Input,
): Promise<NamedPlan> => {
  const [newest] = await allVersions(deps, READING_PLANS, programmeId, id);
  if (!newest) throw notFound("This reading plan");
  const content = await contentOf(deps, programmeId, input);
  return presentNamedPlan(
    await saveNext(deps, READING_PLANS, programmeId, editor, id, newest.row.number, content),
  );
};
