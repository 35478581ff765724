import { z } from "zod";
import type { Routes } from "../http/route.ts";
import { streamEvents } from "./events.ts";
import { AFTERMATHS } from "./handlers.ts";
import type { JobKind } from "./job-run.ts";
import { presentJob } from "./present.ts";
import { cancelJob, findJob, findJobs } from "./service.ts";

const jobsQuery = z.object({ active: z.stringbool().default(false) });

export const addJobRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: "/programmes/:programmeId/jobs", access: "job.read", query: jobsQuery },
    async ({ deps, programmeId, query }) => ({
      jobs: (await findJobs(deps, programmeId, query.active)).map(presentJob),
    }),
  );
  routes.add(
    { method: "get", path: "/programmes/:programmeId/jobs/:jobId", access: "job.read" },
    async ({ deps, programmeId, params }) => ({
      job: presentJob(await findJob(deps, programmeId, params.jobId ?? "")),
    }),
  );
  routes.add(
    { method: "post", path: "/programmes/:programmeId/jobs/:jobId/cancel", access: "job.cancel" },
    async ({ deps, programmeId, caller, params }) => ({
      job: presentJob(
        await cancelJob(deps, programmeId, caller, params.jobId ?? "", (kind) => AFTERMATHS[kind as JobKind]),
      ),
    }),
  );
  routes.add(
    { method: "get", path: "/programmes/:programmeId/events", access: "job.read" },
    ({ deps, programmeId, res }) => streamEvents(deps, programmeId, res),
  );
};
