import type { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import type { Response } from "express";
import {
  commitBody,
  companionQuery,
  extractCreateBody,
  planBody,
  uploadQuery,
} from "#shared/api/extracts.ts";
import type { Routes } from "../http/route.ts";
import { presentJob } from "../jobs/present.ts";
import { findJob } from "../jobs/service.ts";
import { columnHealthOf } from "./present.ts";
import { refusedRowsCsv } from "./refused-rows.ts";
import {
  commitExtract,
  createExtract,
  deleteExtract,
  listExtracts,
  openOriginal,
  requireExtract,
  savePlan,
  showExtract,
  withdrawExtract,
} from "./service.ts";
import { receiveOriginal } from "./upload.ts";
import { openCompanion, receiveCompanion, removeCompanion } from "./upload-companion.ts";
import { receivePiece } from "./upload-pieces.ts";

const ALL = "/programmes/:programmeId/extracts";
const ONE = `${ALL}/:extractId`;

const send = async (res: Response, name: string, type: string, stream: Readable): Promise<void> => {
  res.attachment(name).set("Content-Type", type);
  await pipeline(stream, res).catch((error: unknown) => {
    // Someone who leaves in the middle of a download is no failure of ours.
    if (!res.destroyed || (error as { code?: string }).code !== "ERR_STREAM_PREMATURE_CLOSE") throw error;
  });
};

export const addExtractRoutes = (routes: Routes): void => {
  routes.add({ method: "get", path: ALL, access: "extract.read" }, async ({ deps, programmeId }) => ({
    extracts: await listExtracts(deps, programmeId),
  }));
  routes.add(
    { method: "post", path: ALL, access: "extract.edit", body: extractCreateBody, status: 201 },
    async ({ deps, programmeId, caller, body }) => ({
      extract: await createExtract(deps, programmeId, caller, body),
    }),
  );
  routes.add({ method: "get", path: ONE, access: "extract.read" }, ({ deps, programmeId, params }) =>
    showExtract(deps, programmeId, params.extractId ?? ""),
  );
  routes.add(
    { method: "delete", path: ONE, access: "extract.edit" },
    ({ deps, programmeId, caller, params }) =>
      deleteExtract(deps, programmeId, caller, params.extractId ?? ""),
  );
  routes.add(
    { method: "put", path: `${ONE}/original`, access: "extract.edit", query: uploadQuery },
    async ({ deps, programmeId, caller, params, query, req }) => {
      const id = params.extractId ?? "";
      if (query.offset === undefined) await receiveOriginal(deps, programmeId, caller, id, req);
      else await receivePiece(deps, programmeId, caller, id, query.offset, req);
      return showExtract(deps, programmeId, id);
    },
  );
  routes.add(
    { method: "put", path: `${ONE}/companion`, access: "extract.edit", query: companionQuery },
    async ({ deps, programmeId, caller, params, query, req }) => {
      const id = params.extractId ?? "";
      await receiveCompanion(deps, programmeId, caller, id, query.name, req);
      return showExtract(deps, programmeId, id);
    },
  );
  routes.add(
    { method: "delete", path: `${ONE}/companion`, access: "extract.edit" },
    async ({ deps, programmeId, caller, params }) => {
      const id = params.extractId ?? "";
      await removeCompanion(deps, programmeId, caller, id);
      return showExtract(deps, programmeId, id);
    },
  );
  routes.add(
    { method: "get", path: `${ONE}/companion`, access: "extract.read" },
    async ({ deps, programmeId, params, res }) => {
      const { companion, stream } = await openCompanion(deps, programmeId, params.extractId ?? "");
      res.set("Content-Length", String(companion.bytes));
      await send(res, companion.fileName, "application/octet-stream", stream);
    },
  );
  routes.add(
    { method: "get", path: `${ONE}/original`, access: "extract.read" },
    async ({ deps, programmeId, params, res }) => {
      const { row, stream } = await openOriginal(deps, programmeId, params.extractId ?? "");
      res.set("Content-Length", row.bytes);
      await send(res, row.fileName, "application/octet-stream", stream);
    },
  );
  routes.add(
    { method: "put", path: `${ONE}/plan`, access: "extract.edit", body: planBody },
    ({ deps, programmeId, caller, params, body }) =>
      savePlan(deps, programmeId, caller, params.extractId ?? "", body),
  );
  routes.add(
    { method: "post", path: `${ONE}/commit`, access: "extract.edit", body: commitBody, status: 202 },
    async ({ deps, programmeId, caller, params, body }) => {
      const { extract, jobId } = await commitExtract(
        deps,
        programmeId,
        caller,
        params.extractId ?? "",
        body.version,
      );
      return { extract, job: presentJob(await findJob(deps, programmeId, jobId)) };
    },
  );
  routes.add(
    { method: "post", path: `${ONE}/withdraw`, access: "extract.edit", status: 202 },
    async ({ deps, programmeId, caller, params }) => ({
      job: presentJob(await withdrawExtract(deps, programmeId, caller, params.extractId ?? "")),
    }),
  );
  routes.add(
    { method: "get", path: `${ONE}/health`, access: "extract.read" },
    async ({ deps, programmeId, params }) => ({
      columns: columnHealthOf(await requireExtract(deps, programmeId, params.extractId ?? "")),
    }),
  );
  routes.add(
    { method: "get", path: `${ONE}/refused`, access: "extract.read" },
    async ({ deps, programmeId, params, res }) => {
      const row = await requireExtract(deps, programmeId, params.extractId ?? "");
      await send(
        res,
        `extract-${row.number}-refused.csv`,
        "text/csv; charset=utf-8",
        refusedRowsCsv(deps, row.id),
      );
    },
  );
};
