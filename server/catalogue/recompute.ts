import { z } from "zod";
import { findRecipe } from "#shared/science/recipes.ts";
import { CatalogueEdition } from "../database/entities/catalogue-edition.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import type { JobRun } from "../jobs/job-run.ts";
import { makeEdition, orCleanUp, removePrepared } from "./edition.ts";
import { starsOfEdition } from "./star-blocks.ts";

const payload = z.object({ recipe: z.string() });

/** Derives the whole catalogue anew by another recipe. */
export const recompute = async (run: JobRun): Promise<void> => {
  const { recipe } = payload.parse(run.job.payload);
  const { db } = run.deps;
  const programme = await db.manager.findOneByOrFail(Programme, { id: run.job.programmeId ?? "0" });
  const { id, edition } = programme;
  const inForce = await db.manager.findOneBy(CatalogueEdition, { programmeId: id, number: edition });
  await orCleanUp(
    run,
    () =>
      makeEdition(run, {
        reason: `recipe ${findRecipe(recipe).key}`,
        recipe,
        stars: () => starsOfEdition(db, id, edition),
        total: inForce?.stars ?? 0,
        commit: async () => undefined,
      }),
    () => removePrepared(run),
  );
};
