import { z } from "zod";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { CatalogueEdition } from "../database/entities/catalogue-edition.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import type { JobRun } from "../jobs/job-run.ts";
import { recipeInUse } from "../recipes/queries.ts";
import { makeEdition, orCleanUp, removePrepared } from "./edition.ts";
import { starsOfEdition } from "./star-blocks.ts";

const payload = z.object({ recipeVersionId: z.string() });

/** Derives the whole catalogue anew by another recipe. */
export const recompute = async (run: JobRun): Promise<void> => {
  const { recipeVersionId } = payload.parse(run.job.payload);
  const { db } = run.deps;
  const programme = await db.manager.findOneByOrFail(Programme, { id: run.job.programmeId ?? "0" });
  const { id, edition } = programme;
  const inForce = await db.manager.findOneBy(CatalogueEdition, { programmeId: id, number: edition });
  const recipe = await recipeInUse(db.manager, id, recipeVersionId);
  await orCleanUp(
    run,
    () =>
      makeEdition(run, {
        reason: `recipe ${recipeLabel(recipe)}`,
        recipeVersionId,
        stars: () => starsOfEdition(db, id, edition),
        total: inForce?.stars ?? 0,
        commit: async () => undefined,
      }),
    () => removePrepared(run),
  );
};
