import { z } from "zod";
import type { Routes } from "./route.ts";

/** For whoever watches the process: it answers, and so does its database. */
export const addHealthRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: "/health", access: "anyone", answer: z.object({ status: z.literal("ready") }) },
    async ({ deps }) => {
      await deps.db.query("SELECT 1");
      return { status: "ready" as const };
    },
  );
};
