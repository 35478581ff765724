import { programmeCreateBody, programmePatchBody, recipeBody } from "#shared/api/programmes.ts";
import type { Routes } from "../http/route.ts";
import { presentJob } from "../jobs/present.ts";
import { changeProgramme, chooseRecipe, createProgramme, listProgrammes, readProgramme } from "./service.ts";

const ONE = "/programmes/:programmeId";

export const addProgrammeRoutes = (routes: Routes): void => {
  routes.add({ method: "get", path: "/programmes", access: "signed-in" }, async ({ deps, caller }) => ({
    programmes: await listProgrammes(deps, caller),
  }));

  routes.add(
    {
      method: "post",
      path: "/programmes",
      access: "installation-administrator",
      body: programmeCreateBody,
      status: 201,
    },
    async ({ deps, caller, body }) => ({ programme: await createProgramme(deps, caller, body) }),
  );

  routes.add({ method: "get", path: ONE, access: "programme.read" }, async ({ deps, programmeId }) => ({
    programme: await readProgramme(deps, programmeId),
  }));

  routes.add(
    { method: "patch", path: ONE, access: "programme.edit", body: programmePatchBody },
    async ({ deps, caller, programmeId, body }) => ({
      programme: await changeProgramme(deps, caller, programmeId, body),
    }),
  );

  routes.add(
    {
      method: "put",
      path: `${ONE}/recipe`,
      access: "programme.choose-recipe",
      body: recipeBody,
      status: 202,
    },
    async ({ deps, caller, programmeId, body }) => ({
      job: presentJob(await chooseRecipe(deps, caller, programmeId, body.recipe)),
    }),
  );
};
