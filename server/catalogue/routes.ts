import type { Routes } from "../http/route.ts";
import { readCatalogue } from "./service.ts";

export const addCatalogueRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: "/programmes/:programmeId/catalogue", access: "catalogue.read" },
    async ({ deps, programmeId }) => ({ catalogue: await readCatalogue(deps, programmeId) }),
  );
};
