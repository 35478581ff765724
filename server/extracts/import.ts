import type { EntityManager } from "typeorm";
import { z } from "zod";
import { readingPlan } from "#shared/api/extracts.ts";
import { removeEntries } from "../catalogue/clean.ts";
import { makeEdition, orCleanUp, removePrepared } from "../catalogue/edition.ts";
import { matchEntries } from "../catalogue/match.ts";
import { starsOfExtract } from "../catalogue/star-blocks.ts";
import { Extract } from "../database/entities/extract.entity.ts";
import type { JobRow } from "../database/entities/job.entity.ts";
import type { Cleaner, Failure, JobRun } from "../jobs/job-run.ts";
import { type Loaded, loadEntries } from "./load-entries.ts";

const payload = z.object({ extractId: z.string() });

const extractOf = (run: Pick<JobRun, "deps" | "job">): Promise<Extract> =>
  run.deps.db.manager.findOneByOrFail(Extract, {
    id: payload.parse(run.job.payload).extractId,
    programmeId: run.job.programmeId ?? "0",
  });

const commit =
  (run: JobRun, extract: Extract, { counts, health }: Loaded) =>
  async (tx: EntityManager, edition: number, { added }: { added: number }): Promise<void> => {
    await tx.update(
      Extract,
      { id: extract.id },
      {
        state: "committed",
        edition,
        committedAt: run.deps.now(),
        rowsRead: counts.read,
        rowsAccepted: counts.accepted,
        rowsRefused: counts.refused,
        rowsSkipped: counts.skipped,
        newStars: added,
        health,
        failureMessage: null,
        failureHint: null,
      },
    );
  };

/** Takes away all that an import which was not committed wrote. */
export const cleanImport: Cleaner = async (run) => {
  const extract = await extractOf(run);
  // What a worker committed before it died stays.
  if (extract.state !== "importing") return;
  await removeEntries(run.deps.db, extract.id);
  await removePrepared(run);
};

/** Reads, matches, derives, and puts a new edition in force: all of it, or nothing. */
export const importExtract = async (run: JobRun): Promise<void> => {
  const extract = await extractOf(run);
  // The worker may have died between the commit and the end of the job.
  if (extract.state !== "importing") return;
  const { db } = run.deps;
  await orCleanUp(
    run,
    async () => {
      run.signal.throwIfAborted();
      await removeEntries(db, extract.id);
      const loaded = await loadEntries(run, extract, readingPlan.parse(extract.plan));
      await matchEntries(run, extract.id);
      await makeEdition(run, {
        reason: `extract ${extract.number}, ${extract.name}`,
        withExtract: extract.id,
        stars: () => starsOfExtract(db, extract.id),
        total: loaded.counts.accepted,
        commit: commit(run, extract, loaded),
      });
    },
    () => cleanImport(run),
  );
};

/** An import that will not be done gives the plan back to the curator, with the reason. */
export const afterImport = async (tx: EntityManager, job: JobRow, failure: Failure | null): Promise<void> => {
  await tx.update(
    Extract,
    { id: payload.parse(job.payload).extractId, state: "importing" },
    { state: "planning", failureMessage: failure?.message ?? null, failureHint: failure?.hint ?? null },
  );
};

/** Makes an edition without that extract. Stars of which no other extract speaks end. */
export const withdraw = async (run: JobRun): Promise<void> => {
  const extract = await extractOf(run);
  if (extract.state !== "committed") return;
  const { db } = run.deps;
  await orCleanUp(
    run,
    () =>
      makeEdition(run, {
        reason: `without extract ${extract.number}, ${extract.name}`,
        withoutExtract: extract.id,
        stars: () => starsOfExtract(db, extract.id),
        total: extract.rowsAccepted ?? 0,
        commit: async (tx) => {
          await tx.update(Extract, { id: extract.id }, { state: "withdrawn" });
        },
      }),
    () => removePrepared(run),
  );
};
