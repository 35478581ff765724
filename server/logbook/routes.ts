import { z } from "zod";
import { logbookLine, logbookQuery } from "#shared/api/programmes.ts";
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
      answer: z.object({ lines: z.array(logbookLine), next: z.string().optional() }),
    },
    async ({ deps, programmeId, query }) => {
      const { lines, next } = await readLines(deps, programmeId, query);
      return { lines: lines.map(presentLine), next };
    },
  );
};
