import type { z } from "zod";
import type { selectionBody } from "#shared/api/selections.ts";
import { parseCondition } from "#shared/expression/parse.ts";
import { SelectionVersion } from "../database/entities/selection.entity.ts";
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
import { presentSelection } from "./present.ts";

const SELECTIONS: Kind<SelectionVersion> = {
  entity: SelectionVersion,
  table: "selection",
  rootKey: "selectionId",
  rootColumn: "selection_id",
  idColumn: "selection_version_id",
  word: "selection",
  subject: "selection",
};

type Input = z.output<typeof selectionBody>;

/** A cut that cannot be read would silently be no cut at all: it is not saved. */
const checkCuts = ({ cuts }: Input): void => {
  const fields: Record<string, string> = {};
  cuts.forEach(({ expression }, i) => {
    const parsed = parseCondition(expression);
    if (!parsed.ok) fields[`cuts.${i}.expression`] = `${parsed.message} ${parsed.hint}`;
  });
  const [first] = Object.values(fields);
  if (first !== undefined)
    throw unprocessable(
      "cut-not-read",
      `The selection is not saved, because a cut cannot be read: ${first}`,
      {
        hint: "Correct the cuts named and save it again.",
        fields,
      },
    );
};

export const listSelections = async (deps: Deps, programmeId: string) =>
  (await newestVersions(deps, SELECTIONS, programmeId)).map(presentSelection);

export const readSelection = async (deps: Deps, programmeId: string, versionId: string) =>
  presentSelection(await versionById(deps, SELECTIONS, programmeId, versionId));

export const makeSelection = async (deps: Deps, programmeId: string, editor: Editor, content: Input) => {
  checkCuts(content);
  return presentSelection(await saveFirst(deps, SELECTIONS, programmeId, editor, content));
};

export const saveSelection = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  id: string,
  number: number,
  content: Input,
) => {
  checkCuts(content);
  return presentSelection(await saveNext(deps, SELECTIONS, programmeId, editor, id, number, content));
};
