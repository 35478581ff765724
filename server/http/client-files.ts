import { extname, join } from "node:path";
import express, { Router } from "express";
import type { Deps } from "../deps.ts";

/** The built client. Files with a hash in their name never change; every other address without an ending is the page itself. */
export const clientFiles = (deps: Deps): Router => {
  const folder = deps.config.folders.client;
  const router = Router();
  router.use(
    "/assets",
    express.static(join(folder, "assets"), { immutable: true, maxAge: "365d", index: false }),
  );
  router.use(express.static(folder, { index: false, maxAge: 0 }));
  router.get("/{*path}", (req, res, next) => {
    if (!req.accepts("html") || extname(req.path) !== "") return next();
    res.set("Cache-Control", "no-cache");
    res.sendFile("index.html", { root: folder }, (error) => {
      if (!error || res.headersSent) return;
      res
        .status(503)
        .type("text/plain")
        .send("The pages of Shortlight are not built yet. Run `npm run build`, then reload.\n");
    });
  });
  return router;
};
