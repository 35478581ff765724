import { z } from "zod";
import { merit, meritBody, meritSaveBody } from "#shared/api/merits.ts";
import type { Routes } from "../http/route.ts";
import { listMerits, makeMerit, readMerit, saveMerit } from "./service.ts";

const MERITS = "/programmes/:programmeId/merits";
const one = z.object({ merit });

export const addMeritRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: MERITS, access: "merit.read", answer: z.object({ merits: z.array(merit) }) },
    async ({ deps, programmeId }) => ({ merits: await listMerits(deps, programmeId) }),
  );
  routes.add(
    { method: "get", path: `${MERITS}/versions/:versionId`, access: "merit.read", answer: one },
    async ({ deps, programmeId, params }) => ({
      merit: await readMerit(deps, programmeId, params.versionId ?? ""),
    }),
  );
  routes.add(
    { method: "post", path: MERITS, access: "merit.edit", body: meritBody, status: 201, answer: one },
    async ({ deps, programmeId, caller, body }) => ({
      merit: await makeMerit(deps, programmeId, caller, body),
    }),
  );
  routes.add(
    {
      method: "put",
      path: `${MERITS}/:meritId`,
      access: "merit.edit",
      body: meritSaveBody,
      answer: one,
    },
    async ({ deps, programmeId, caller, params, body: { number, ...content } }) => ({
      merit: await saveMerit(deps, programmeId, caller, params.meritId ?? "", number, content),
    }),
  );
};
