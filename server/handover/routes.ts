import { pipeline } from "node:stream/promises";
import { exportQuery } from "#shared/api/lists.ts";
import type { Routes } from "../http/route.ts";
import { exportList } from "./service.ts";

export const addHandoverRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: "/programmes/:programmeId/lists/:listId/export",
      access: "list.export",
      query: exportQuery,
    },
    async ({ deps, programmeId, params, query, res }) => {
      const file = await exportList(deps, programmeId, params.listId ?? "", query.format);
      res.attachment(file.name).type(file.type);
      // A failure on the way breaks the connection: a cut-off file must not look whole.
      await pipeline(file.content, res);
    },
  );
};
