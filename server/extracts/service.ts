import type { Readable } from "node:stream";
import type { ExtractPreview, Extract as ExtractShape, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { Extract } from "../database/entities/extract.entity.ts";
import type { JobRow } from "../database/entities/job.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError, conflict, notFound, unprocessable } from "../errors.ts";
import { enqueueJob, newestJobOf } from "../jobs/service.ts";
import { writeLine } from "../logbook/service.ts";
import { isOpen } from "./findings.ts";
import { presentExtract, presentPreview } from "./present.ts";
import { extractsOf, findExtractRow, lockExtract, namesOf, nextNumber } from "./queries.ts";
import { reviewFile, reviewPlan } from "./review.ts";
import { lookInto } from "./upload-keep.ts";
import { growingKey } from "./upload-pieces.ts";

interface Person {
  id: string;
  name: string;
}

const subjectOf = (row: Extract): { type: string; id: string; name: string } => ({
  type: "extract",
  id: row.id,
  name: row.name,
});

export const requireExtract = async (deps: Deps, programmeId: string, id: string): Promise<Extract> => {
  const row = await findExtractRow(deps.db.manager, programmeId, id);
  if (!row) throw notFound("This extract");
  return row;
};

const present = async (deps: Deps, rows: Extract[]): Promise<ExtractShape[]> => {
  const names = await namesOf(deps.db.manager, [...new Set(rows.map((r) => r.uploadedBy))]);
  return Promise.all(
    rows.map(async (row) => {
      const job = await newestJobOf(deps.db.manager, row.programmeId, { type: "extract", id: row.id });
      return presentExtract(row, names.get(row.uploadedBy) ?? "", job);
    }),
  );
};

export const listExtracts = async (deps: Deps, programmeId: string): Promise<ExtractShape[]> =>
  present(deps, await extractsOf(deps.db.manager, programmeId));

interface Shown {
  extract: ExtractShape;
  preview: ExtractPreview | null;
}

export const showExtract = async (deps: Deps, programmeId: string, id: string): Promise<Shown> => {
  const row = await requireExtract(deps, programmeId, id);
  const [extract] = await present(deps, [row]);
  if (!extract) throw notFound("This extract");
  return { extract, preview: presentPreview(row) };
};

export interface NewExtract {
  name: string;
  fileName: string;
  bytes: number;
  origin: string;
}

export const createExtract = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  input: NewExtract,
): Promise<ExtractShape> => {
  const id = await inTransaction(deps.db, async (tx) => {
    const [programme] = await tx.query<{ invented: number }[]>(
      "SELECT is_invented AS invented FROM programme WHERE programme_id = ?",
      [programmeId],
    );
    const row = await tx.save(
      tx.create(Extract, {
        ...input,
        programmeId,
        number: await nextNumber(tx, programmeId),
        bytes: String(input.bytes),
        receivedBytes: "0",
        state: "receiving",
        isInvented: Boolean(programme?.invented),
        uploadedBy: person.id,
        createdAt: deps.now(),
      }),
    );
    await writeLine(tx, {
      programmeId,
      person,
      action: "extract.create",
      subject: subjectOf(row),
      after: input,
      at: deps.now(),
    });
    return row.id;
  });
  return (await showExtract(deps, programmeId, id)).extract;
};

const refuseStale = (row: Extract, version: number): void => {
  if (row.version === version) return;
  throw conflict("stale-version", "Someone changed this extract after you opened it.", {
    hint: "Look at what changed, then do it again.",
    details: { version: row.version },
  });
};

const refuseUnlessPlanning = (row: Extract): void => {
  if (row.state === "planning") return;
  const why =
    row.state === "receiving"
      ? "The file of this extract has not arrived yet."
      : `The reading plan is closed: this extract is ${row.state}.`;
  throw conflict("plan-closed", why, {
    hint: row.state === "receiving" ? "Send the file first." : "Make a new extract to read a file otherwise.",
  });
};

const writePlan = async (
  deps: Deps,
  person: Person,
  before: Extract,
  version: number,
  changes: { plan: ReadingPlan; preview: ExtractPreview },
): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, before.programmeId, before.id);
    if (!row) throw notFound("This extract");
    refuseUnlessPlanning(row);
    refuseStale(row, version);
    const old = row.plan;
    await tx.save(Object.assign(row, changes));
    const used = (plan: unknown): unknown =>
      plan && {
        ...(plan as ReadingPlan),
        columns: (plan as ReadingPlan).columns.filter((c) => c.means !== KEPT),
      };
    await writeLine(tx, {
      programmeId: row.programmeId,
      person,
      action: "extract.plan",
      subject: subjectOf(row),
      before: used(old),
      after: used(changes.plan),
      at: deps.now(),
    });
  });
};

interface Planned extends Shown {
  findings: Finding[];
}

/** Keeps the plan as answered so far and says what is still open under it. */
export const savePlan = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
  input: { plan: ReadingPlan; version: number },
): Promise<Planned> => {
  const row = await requireExtract(deps, programmeId, id);
  refuseUnlessPlanning(row);
  refuseStale(row, input.version);
  const sample = await lookInto(deps.files, row, input.plan);
  // What is open under the plan as answered, not under the one that was suggested.
  const preview = await reviewFile(deps, row, sample, input.plan);
  await writePlan(deps, person, row, input.version, { plan: input.plan, preview });
  return { ...(await showExtract(deps, programmeId, id)), findings: preview.findings };
};

const refuseOpen = (findings: Finding[]): void => {
  const open = findings.filter(isOpen);
  if (open.length === 0) return;
  const [first] = open;
  throw unprocessable(
    "plan-not-ready",
    `${open.length === 1 ? "One question is" : `${open.length} questions are`} open, so the extract cannot be committed yet. ${first?.message ?? ""}`,
    { hint: first?.hint, details: { findings: open } },
  );
};

/** Queues the import under the plan as it stands. */
export const commitExtract = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
  version: number,
): Promise<{ extract: ExtractShape; jobId: string }> => {
  const row = await requireExtract(deps, programmeId, id);
  refuseUnlessPlanning(row);
  refuseStale(row, version);
  const plan = row.plan as ReadingPlan | null;
  if (!plan)
    throw unprocessable("plan-not-ready", "The reading plan has not been confirmed.", {
      hint: "Look through the columns and confirm the plan first.",
    });
  refuseOpen(await reviewPlan(deps, row, await lookInto(deps.files, row, plan), plan));
  const jobId = await inTransaction(deps.db, async (tx) => {
    const locked = await lockExtract(tx, programmeId, id);
    if (!locked) throw notFound("This extract");
    refuseUnlessPlanning(locked);
    refuseStale(locked, version);
    await tx.save(
      Object.assign(locked, { state: "importing", failureMessage: null, failureHint: null } as const),
    );
    await writeLine(tx, {
      programmeId,
      person,
      action: "extract.commit",
      subject: subjectOf(locked),
      at: deps.now(),
    });
    const job = await enqueueJob(tx, {
      programmeId,
      personId: person.id,
      kind: "import-extract",
      payload: { extractId: id },
      subject: { type: "extract", id },
      total: Number(locked.bytes),
      unit: "rows",
    });
    return job.id;
  });
  return { extract: (await showExtract(deps, programmeId, id)).extract, jobId };
};

/** Removes an extract that never became part of the catalogue; its number is not given again to another file. */
export const deleteExtract = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
): Promise<void> => {
  const keys = await inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, programmeId, id);
    if (!row) throw notFound("This extract");
    if (row.state !== "receiving" && row.state !== "planning")
      throw conflict("extract-in-use", `Extract ${row.number} is ${row.state} and cannot be deleted.`, {
        hint: row.state === "committed" ? "Withdraw it instead." : "Cancel its import first.",
      });
    await tx.query("DELETE FROM refused_row WHERE extract_id = ?", [id]);
    await tx.delete(Extract, { id, programmeId });
    await writeLine(tx, {
      programmeId,
      person,
      action: "extract.delete",
      subject: subjectOf(row),
      before: { fileName: row.fileName, sha256: row.sha256 },
      at: deps.now(),
    });
    return [row.originalKey ?? growingKey(row), row.companion?.key];
  });
  for (const key of keys) if (key !== undefined) await deps.files.remove(key);
};

/** Queues the making of an edition without that extract. */
export const withdrawExtract = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
): Promise<JobRow> =>
  inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, programmeId, id);
    if (!row) throw notFound("This extract");
    if (row.state !== "committed")
      throw conflict("extract-not-committed", `Extract ${row.number} is not part of the catalogue.`, {
        hint: "Only a committed extract can be withdrawn.",
      });
    const running = await newestJobOf(tx, programmeId, { type: "extract", id });
    if (running && (running.state === "queued" || running.state === "running"))
      throw new AppError(409, "already-withdrawing", `Extract ${row.number} is being withdrawn already.`, {
        hint: "Wait for the job to end.",
      });
    await writeLine(tx, {
      programmeId,
      person,
      action: "extract.withdraw",
      subject: subjectOf(row),
      at: deps.now(),
    });
    return enqueueJob(tx, {
      programmeId,
      personId: person.id,
      kind: "withdraw-extract",
      payload: { extractId: id },
      subject: { type: "extract", id },
      unit: "stars",
    });
  });

export const openOriginal = async (
  deps: Deps,
  programmeId: string,
  id: string,
): Promise<{ row: Extract; stream: Readable }> => {
  const row = await requireExtract(deps, programmeId, id);
  if (row.originalKey === null) throw notFound("This file");
  return { row, stream: await deps.files.read(row.originalKey) };
};
