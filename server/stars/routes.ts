import { z } from "zod";
import { type OpenView, openView } from "#server/scan/view.ts";
import {
  findQuery,
  histogram,
  starMatch,
  starSheet,
  starWindow,
  viewQuery,
  viewSummary,
  windowQuery,
} from "#shared/api/stars.ts";
import { workings, workingsQuery } from "#shared/api/workings.ts";
import { viewFromParams } from "#shared/catalogue/view.ts";
import { can } from "#shared/policy/rights.ts";
import type { Context, Routes } from "../http/route.ts";
import { readWorkings } from "../workings/service.ts";
import { findMatches, readSheet, readWindow, summarise } from "./service.ts";

const STARS = "/programmes/:programmeId/stars";
const access = "catalogue.read" as const;
const histogramQuery = z.object({ columns: z.string().max(2_000) });

type ViewContext = Pick<Context<unknown, unknown>, "deps" | "programmeId" | "actor" | "req">;

/** The view of the request; what the caller may not see is taken out of it and named among the ignored. */
const viewOf = async ({ deps, programmeId, actor, req }: ViewContext): Promise<OpenView> => {
  const query = req.originalUrl.split("?").slice(1).join("?");
  const { view, ignored } = viewFromParams(new URLSearchParams(query));
  const mayUseMerit = can(actor, "merit.read");
  const open = await openView(deps, programmeId, mayUseMerit ? view : { ...view, merit: null });
  const hidden = view.merit !== null && !mayUseMerit ? ["merit"] : [];
  open.resolved.ignored.unshift(...ignored, ...hidden);
  return open;
};

export const addStarRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: `${STARS}/summary`,
      access,
      query: viewQuery,
      answer: z.object({ summary: viewSummary }),
    },
    async (context) => ({ summary: await summarise(await viewOf(context)) }),
  );

  routes.add(
    {
      method: "get",
      path: `${STARS}/window`,
      access,
      query: viewQuery.extend(windowQuery.shape),
      answer: z.object({ window: starWindow }),
    },
    async (context) => ({ window: await readWindow(context.deps, await viewOf(context), context.query) }),
  );

  routes.add(
    {
      method: "get",
      path: `${STARS}/histograms`,
      access,
      query: viewQuery.extend(histogramQuery.shape),
      answer: z.object({ histograms: z.array(histogram) }),
    },
    async (context) => ({
      histograms: await (await viewOf(context)).histograms(context.query.columns.split(",")),
    }),
  );

  routes.add(
    {
      method: "get",
      path: `${STARS}/find`,
      access,
      query: viewQuery.extend(findQuery.shape),
      answer: z.object({ matches: z.array(starMatch) }),
    },
    async (context) => ({
      matches: await findMatches(
        context.deps,
        await viewOf(context),
        context.query.q,
        can(context.actor, "extract.read"),
      ),
    }),
  );

  routes.add(
    {
      method: "get",
      path: `${STARS}/:starId/workings`,
      access,
      query: viewQuery.extend(workingsQuery.shape),
      answer: z.object({ workings }),
    },
    async (context) => ({
      workings: await readWorkings(
        context.deps,
        await viewOf(context),
        context.params.starId ?? "",
        context.query,
      ),
    }),
  );

  routes.add(
    {
      method: "get",
      path: `${STARS}/:starId`,
      access,
      query: viewQuery,
      answer: z.object({ star: starSheet }),
    },
    async (context) => ({
      star: await readSheet(
        context.deps,
        await viewOf(context),
        context.params.starId ?? "",
        can(context.actor, "extract.read"),
      ),
    }),
  );
};
