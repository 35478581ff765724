import { z } from "zod";
import { namedPlan, namedPlanBody } from "#shared/api/extracts.ts";
import type { Routes } from "../http/route.ts";
import { listReadingPlans, makeReadingPlan, saveReadingPlan } from "./service.ts";

const PLANS = "/programmes/:programmeId/reading-plans";
const one = z.object({ plan: namedPlan });

export const addReadingPlanRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: PLANS, access: "plan.read", answer: z.object({ plans: z.array(namedPlan) }) },
    async ({ deps, programmeId }) => ({ plans: await listReadingPlans(deps, programmeId) }),
  );
  routes.add(
    { method: "post", path: PLANS, access: "plan.edit", body: namedPlanBody, status: 201, answer: one },
    async ({ deps, programmeId, caller, body }) => ({
      plan: await makeReadingPlan(deps, programmeId, caller, body),
    }),
  );
  routes.add(
    { method: "put", path: `${PLANS}/:planId`, access: "plan.edit", body: namedPlanBody, answer: one },
    async ({ deps, programmeId, caller, params, body }) => ({
      plan: await saveReadingPlan(deps, programmeId, caller, params.planId ?? "", body),
    }),
  );
};
