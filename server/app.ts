import express, { type Express, Router } from "express";
import { signedInPerson } from "./auth/passport.ts";
import { addAuthRoutes } from "./auth/routes.ts";
import { addCatalogueRoutes } from "./catalogue/routes.ts";
import type { Deps } from "./deps.ts";
import { addExtractRoutes } from "./extracts/routes.ts";
import { addHandoverRoutes } from "./handover/routes.ts";
import { clientFiles } from "./http/client-files.ts";
import { csrfProtection } from "./http/csrf.ts";
import { errorHandler, noSuchRoute } from "./http/error-handler.ts";
import { addHealthRoutes } from "./http/health.ts";
import { rateLimits } from "./http/rate-limit.ts";
import { requestLog } from "./http/request-log.ts";
import { type DefinedRoute, Routes } from "./http/route.ts";
import { securityHeaders } from "./http/security-headers.ts";
import { sessions } from "./http/session.ts";
import { addInstrumentRoutes } from "./instruments/routes.ts";
import { addJobRoutes } from "./jobs/routes.ts";
import { addListRoutes } from "./lists/routes.ts";
import { addLogbookRoutes } from "./logbook/routes.ts";
import { addMailRoutes } from "./mail/routes.ts";
import { addMeritRoutes } from "./merit/routes.ts";
import { addInterfaceRoutes } from "./openapi.ts";
import { addPeopleRoutes } from "./people/routes.ts";
import { addProgrammeRoutes } from "./programmes/routes.ts";
import { addReadingPlanRoutes } from "./reading-plans/routes.ts";
import { addRecipeRoutes } from "./recipes/routes.ts";
import { addSelectionRoutes } from "./selections/routes.ts";
import { addStarRoutes } from "./stars/routes.ts";

/** Every subject's routes; a subject that is not listed here does not exist for callers. */
const SUBJECTS: readonly ((routes: Routes) => void)[] = [
  addHealthRoutes,
  addAuthRoutes,
  addPeopleRoutes,
  addProgrammeRoutes,
  addLogbookRoutes,
  addMailRoutes,
  addInterfaceRoutes,
  addJobRoutes,
  addExtractRoutes,
  addReadingPlanRoutes,
  addCatalogueRoutes,
  addRecipeRoutes,
  addInstrumentRoutes,
  addHandoverRoutes,
  addListRoutes,
  addSelectionRoutes,
  addMeritRoutes,
  addStarRoutes,
];

const api = (deps: Deps): { router: Router; routes: DefinedRoute[] } => {
  const router = Router();
  router.use(
    (_req, res, next) => {
      res.set("Cache-Control", "no-store");
      next();
    },
    sessions(deps),
    signedInPerson(deps),
    csrfProtection(deps),
    express.json({ limit: "1mb" }),
    rateLimits(deps),
  );
  const routes = new Routes(router, deps);
  for (const add of SUBJECTS) add(routes);
  router.use(noSuchRoute);
  return { router, routes: routes.defined };
};

/** The whole web application, not yet listening. */
export const createApp = (deps: Deps): { app: Express; routes: DefinedRoute[] } => {
  const app = express();
  const { router, routes } = api(deps);
  app.disable("x-powered-by");
  app.set("trust proxy", deps.config.trustedProxies);
  app.use(requestLog(deps), securityHeaders(deps));
  app.use("/api", router);
  app.use(clientFiles(deps));
  app.use(noSuchRoute);
  app.use(errorHandler(deps));
  return { app, routes };
};
