import { logbookQuery } from "#shared/api/programmes.ts";
import type { Routes } from "../http/route.ts";
import { presentLine } from "./present.ts";
import { readLines } from "./read.ts";

export const addLogbookRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: "/programmes/:programmeId/logbook",
      access: "logbook.read",
      query: logbookQuery,
    },
    async ({ deps, programmeId, query }) => {
      const { lines, next } = await readLines(deps, programmeId, query);
      return { lines: lines.map(presentLine), next };
    },
  );
};
