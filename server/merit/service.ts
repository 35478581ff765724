import type { z } from "zod";
import type { meritBody } from "#shared/api/merits.ts";
import { compileMerit } from "#shared/merit/score.ts";
import { MeritVersion } from "../database/entities/merit.entity.ts";
import type { Deps } from "../deps.ts";
import { unprocessable } from "../errors.ts";
import {
  type Editor,
  type Kind,
  newestVersions,
  saveFirst,
  saveNext,
  versionById,
} from "../versions/versioned.ts";
import { presentMerit } from "./present.ts";

const MERITS: Kind<MeritVersion> = {
  entity: MeritVersion,
  table: "merit",
  rootKey: "meritId",
  rootColumn: "merit_id",
  idColumn: "merit_version_id",
  word: "figure of merit",
  subject: "merit",
};

type Input = z.output<typeof meritBody>;

const checkTerms = ({ terms }: Input): void => {
  const compiled = compileMerit(terms);
  if (compiled.ok) return;
  const fields = Object.fromEntries(
    compiled.refusals.map(({ term, message, hint }) => [`terms.${term}.expression`, `${message} ${hint}`]),
  );
  throw unprocessable(
    "term-not-read",
    `The figure of merit is not saved, because a term cannot be read: ${Object.values(fields)[0]}`,
    { hint: "Correct the terms named and save it again.", fields },
  );
};

export const listMerits = async (deps: Deps, programmeId: string) =>
  (await newestVersions(deps, MERITS, programmeId)).map(presentMerit);

export const readMerit = async (deps: Deps, programmeId: string, versionId: string) =>
  presentMerit(await versionById(deps, MERITS, programmeId, versionId));

export const makeMerit = async (deps: Deps, programmeId: string, editor: Editor, content: Input) => {
  checkTerms(content);
  return presentMerit(await saveFirst(deps, MERITS, programmeId, editor, content));
};

export const saveMerit = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  id: string,
  number: number,
  content: Input,
) => {
  checkTerms(content);
  return presentMerit(await saveNext(deps, MERITS, programmeId, editor, id, number, content));
};
