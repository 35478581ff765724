import type { EntityManager } from "typeorm";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { CatalogueEdition } from "../database/entities/catalogue-edition.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import { LineBuffer } from "../database/line-buffer.ts";
import { inTransaction } from "../database/transaction.ts";
import { conflict, notFound } from "../errors.ts";
import { type Cleaner, type JobRun, LeaseLost, WorkerStopping } from "../jobs/job-run.ts";
import { writeLine } from "../logbook/service.ts";
import { type RecipeInUse, recipeInUse } from "../recipes/queries.ts";
import { buildScanIndex } from "../scan/build.ts";
import { removeInvisibleStars } from "./clean.ts";
import { Fingerprint } from "./fingerprint.ts";
import { firstPair } from "./first-pair.ts";
import { type Basis, type Changes, prepareBlock, readStarBlock, writeBlock } from "./prepare.ts";

export interface EditionPlan {
  /** "extract 2, Northern motions" */
  reason: string;
  /** Version of the recipe; by default the one in force. */
  recipeVersionId?: string;
  withExtract?: string;
  withoutExtract?: string;
  /** Ids of the stars that may come out differently, in blocks of a few thousand. */
  stars: () => AsyncIterable<string[]>;
  total: number;
  /** What else happens in the transaction that puts the edition in force. */
  commit: (tx: EntityManager, edition: number, changes: Changes) => Promise<void>;
}

const programmeOf = async (run: Pick<JobRun, "deps" | "job">): Promise<Programme> => {
  const programme = await run.deps.db.manager.findOneBy(Programme, { id: run.job.programmeId ?? "0" });
  if (!programme) throw notFound("This programme");
  return programme;
};

const prepareAll = async (
  run: JobRun,
  basis: Basis,
  plan: EditionPlan,
  fingerprint: Fingerprint,
): Promise<Changes> => {
  const changes: Changes = { added: 0, ended: 0 };
  let done = 0;
  // One block is written while the next is read and derived.
  let writing = Promise.resolve();
  let [lines, spare] = [new LineBuffer(), new LineBuffer()];
  await run.progress(0, plan.total, "Deriving", "stars");
  try {
    for await (const ids of plan.stars()) {
      const prepared = prepareBlock(basis, await readStarBlock(run, basis, ids), fingerprint, lines);
      changes.added += prepared.added;
      changes.ended += prepared.ended;
      await writing;
      await run.progress(done, plan.total, "Deriving", "stars");
      writing = writeBlock(run, basis, prepared);
      writing.catch(() => undefined);
      [lines, spare] = [spare, lines];
      done += ids.length;
    }
  } finally {
    // Whatever happens next, a clean-up above all, must not be overtaken by rows still on their way.
    await writing;
  }
  await run.progress(done, plan.total, "Deriving", "stars");
  return changes;
};

const buildIndices = async (
  run: JobRun,
  programmeId: string,
  edition: number,
  recipeVersionId: string,
): Promise<void> => {
  const base = { programmeId, edition, recipeVersionId, cardVersionId: null, campaignVersionId: null };
  const pair = await firstPair(run.deps.db.manager, programmeId);
  for (const key of pair ? [base, { ...base, ...pair }] : [base])
    await buildScanIndex(run.deps, key, (done, total) =>
      run.progress(done, total, "Preparing the table", "stars"),
    );
};

/** Puts the prepared edition in force: one small transaction, and nothing before it shows. */
const putInForce = async (
  run: JobRun,
  plan: EditionPlan,
  before: Programme,
  values: { recipe: RecipeInUse; stars: number; fingerprint: string; changes: Changes },
): Promise<void> => {
  const { deps, job } = run;
  const edition = before.edition + 1;
  await inTransaction(deps.db, async (tx) => {
    await run.holdLease(tx);
    const result = await tx.query<{ affectedRows: number }>(
      "UPDATE programme SET edition = ?, recipe_version_id = ? WHERE programme_id = ? AND edition = ?",
      [edition, values.recipe.versionId, before.id, before.edition],
    );
    if (result.affectedRows !== 1)
      throw conflict("edition-moved", "Another edition of the catalogue came into force meanwhile.", {
        hint: "Begin it again.",
      });
    await tx.insert(CatalogueEdition, {
      programmeId: before.id,
      number: edition,
      reason: plan.reason.slice(0, 200),
      recipeVersionId: values.recipe.versionId,
      stars: values.stars,
      fingerprint: values.fingerprint,
      madeAt: deps.now(),
      madeBy: job.personId,
    });
    await plan.commit(tx, edition, values.changes);
    const [person] = await tx.query<{ name: string }[]>("SELECT name FROM person WHERE person_id = ?", [
      job.personId,
    ]);
    await writeLine(tx, {
      programmeId: before.id,
      person: job.personId !== null && person ? { id: job.personId, name: person.name } : null,
      action: "catalogue.make-edition",
      subject: { type: "catalogue", id: String(edition), name: `Edition ${edition}` },
      after: {
        reason: plan.reason,
        stars: values.stars,
        recipe: recipeLabel(values.recipe),
        fingerprint: values.fingerprint,
      },
      at: deps.now(),
    });
  });
};

/** Makes the next catalogue edition. Whatever stops it, the edition in force stays as it was. */
export const makeEdition = async (run: JobRun, plan: EditionPlan): Promise<void> => {
  const { deps } = run;
  const programme = await programmeOf(run);
  const recipe = await recipeInUse(
    deps.db.manager,
    programme.id,
    plan.recipeVersionId ?? programme.recipeVersionId,
  );
  const basis: Basis = {
    programmeId: programme.id,
    edition: programme.edition,
    recipe: recipe.settings,
    withExtract: plan.withExtract,
    withoutExtract: plan.withoutExtract,
  };
  await removeInvisibleStars(deps.db, programme.id, programme.edition);
  const last = await deps.db.manager.findOneBy(CatalogueEdition, {
    programmeId: programme.id,
    number: programme.edition,
  });
  const fingerprint = new Fingerprint(last?.fingerprint);
  const changes = await prepareAll(run, basis, plan, fingerprint);
  await buildIndices(run, programme.id, programme.edition + 1, recipe.versionId);
  await run.progress(1, 1, "Finishing", "steps");
  await putInForce(run, plan, programme, {
    recipe,
    stars: (last?.stars ?? 0) + changes.added - changes.ended,
    fingerprint: fingerprint.toString(),
    changes,
  });
};

/**
 * Runs work that prepares rows nobody sees yet, and removes them when it does not come to its end. A worker that
 * stops, or lost its lease, leaves that to the next attempt.
 */
export const orCleanUp = async (
  run: JobRun,
  work: () => Promise<void>,
  clean: () => Promise<void>,
): Promise<void> => {
  try {
    await work();
  } catch (error) {
    const reason: unknown = run.signal.aborted ? run.signal.reason : error;
    if (!(reason instanceof LeaseLost) && !(reason instanceof WorkerStopping))
      await clean().catch((problem: unknown) =>
        run.deps.log.warn("catalogue", "Prepared rows are left for the next attempt to remove", {
          error: problem,
        }),
      );
    throw error;
  }
};

/** What `orCleanUp` removes of an edition that did not come into force. */
export const removePrepared: Cleaner = async (run) => {
  const programme = await programmeOf(run);
  await removeInvisibleStars(run.deps.db, programme.id, programme.edition);
};
