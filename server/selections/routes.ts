import { z } from "zod";
import { selection, selectionBody, selectionSaveBody } from "#shared/api/selections.ts";
import type { Routes } from "../http/route.ts";
import { listSelections, makeSelection, readSelection, saveSelection } from "./service.ts";

const SELECTIONS = "/programmes/:programmeId/selections";
const one = z.object({ selection });

export const addSelectionRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: SELECTIONS,
      access: "selection.read",
      answer: z.object({ selections: z.array(selection) }),
    },
    async ({ deps, programmeId }) => ({ selections: await listSelections(deps, programmeId) }),
  );
  routes.add(
    { method: "get", path: `${SELECTIONS}/versions/:versionId`, access: "selection.read", answer: one },
    async ({ deps, programmeId, params }) => ({
      selection: await readSelection(deps, programmeId, params.versionId ?? ""),
    }),
  );
  routes.add(
    {
      method: "post",
      path: SELECTIONS,
      access: "selection.edit",
      body: selectionBody,
      status: 201,
      answer: one,
    },
    async ({ deps, programmeId, caller, body }) => ({
      selection: await makeSelection(deps, programmeId, caller, body),
    }),
  );
  routes.add(
    {
      method: "put",
      path: `${SELECTIONS}/:selectionId`,
      access: "selection.edit",
      body: selectionSaveBody,
      answer: one,
    },
    async ({ deps, programmeId, caller, params, body: { number, ...content } }) => ({
      selection: await saveSelection(deps, programmeId, caller, params.selectionId ?? "", number, content),
    }),
  );
};
