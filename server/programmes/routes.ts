import { z } from "zod";
import { job } from "#shared/api/jobs.ts";
import { programme, programmeCreateBody, programmePatchBody } from "#shared/api/programmes.ts";
import { recipeChoiceBody } from "#shared/api/recipes.ts";
import type { Routes } from "../http/route.ts";
import { presentJob } from "../jobs/present.ts";
import { changeProgramme, chooseRecipe, createProgramme, listProgrammes, readProgramme } from "./service.ts";

const programmeAnswer = z.object({ programme });
const ONE = "/programmes/:programmeId";

export const addProgrammeRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: "/programmes",
      access: "signed-in",
      answer: z.object({ programmes: z.array(programme) }),
    },
    async ({ deps, caller }) => ({
      programmes: await listProgrammes(deps, caller),
    }),
  );

  routes.add(
    {
      method: "post",
      path: "/programmes",
      access: "installation-administrator",
      body: programmeCreateBody,
      status: 201,
      answer: programmeAnswer,
    },
    async ({ deps, caller, body }) => ({ programme: await createProgramme(deps, caller, body) }),
  );

  routes.add(
    { method: "get", path: ONE, access: "programme.read", answer: programmeAnswer },
    async ({ deps, programmeId }) => ({
      programme: await readProgramme(deps, programmeId),
    }),
  );

  routes.add(
    {
      method: "patch",
      path: ONE,
      access: "programme.edit",
      body: programmePatchBody,
      answer: programmeAnswer,
    },
    async ({ deps, caller, programmeId, body }) => ({
      programme: await changeProgramme(deps, caller, programmeId, body),
    }),
  );

  routes.add(
    {
      method: "put",
      path: `${ONE}/recipe`,
      access: "programme.choose-recipe",
      body: recipeChoiceBody,
      status: 202,
      answer: z.object({ job }),
    },
    async ({ deps, caller, programmeId, body }) => ({
      job: presentJob(await chooseRecipe(deps, caller, programmeId, body.versionId)),
    }),
  );
};
