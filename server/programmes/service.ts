import type { Programme as ProgrammeJson } from "#shared/api/programmes.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { programmesOf } from "../auth/queries.ts";
import type { JobRow } from "../database/entities/job.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { conflict, notFound } from "../errors.ts";
import type { Caller } from "../http/route.ts";
import { enqueueJob } from "../jobs/service.ts";
import { writeLine } from "../logbook/service.ts";
import { addMember } from "../people/membership.ts";
import { recipeInUse, refOf } from "../recipes/queries.ts";
import { addShippedRecipes } from "../recipes/shipped.ts";
import { presentProgramme } from "./present.ts";
import { countsOf, lockProgramme } from "./queries.ts";

export const readProgramme = async (deps: Deps, id: string): Promise<ProgrammeJson> => {
  const programme = await deps.db.manager.findOneBy(Programme, { id });
  if (!programme) throw notFound("This programme");
  const tx = deps.db.manager;
  const recipe = await recipeInUse(tx, id, programme.recipeVersionId);
  return presentProgramme(programme, refOf(recipe), await countsOf(tx, programme));
};

export const listProgrammes = async (deps: Deps, caller: Caller): Promise<ProgrammeJson[]> => {
  const own = await programmesOf(deps.db.manager, caller.id);
  return Promise.all(own.map(({ id }) => readProgramme(deps, id)));
};

/** Whoever makes a programme is its first administrator. */
export const createProgramme = async (
  deps: Deps,
  caller: Caller,
  input: { name: string; description: string; isInvented?: boolean },
): Promise<ProgrammeJson> => {
  const made = await inTransaction(deps.db, async (tx) => {
    const at = deps.now();
    const { name, description, isInvented = false } = input;
    const programme = await tx.save(
      Programme,
      tx.create(Programme, { name, description, isInvented, createdAt: at }),
    );
    await addShippedRecipes(tx, programme.id, at);
    await writeLine(tx, {
      programmeId: programme.id,
      person: caller,
      action: "programme.make",
      subject: { type: "programme", id: programme.id, name },
      after: { name, description },
      at,
    });
    await addMember(tx, {
      programmeId: programme.id,
      person: caller,
      roles: ["administrator"],
      by: caller,
      at,
    });
    return programme.id;
  });
  return readProgramme(deps, made);
};

export const changeProgramme = async (
  deps: Deps,
  caller: Caller,
  id: string,
  input: { name?: string; description?: string; version: number },
): Promise<ProgrammeJson> => {
  await inTransaction(deps.db, async (tx) => {
    const programme = await lockProgramme(tx, id);
    if (!programme) throw notFound("This programme");
    const before = { name: programme.name, description: programme.description };
    if (programme.version !== input.version)
      throw conflict("changed-meanwhile", "Someone changed this programme after you opened it.", {
        hint: "Look at what is there now, and make your change again if it is still wanted.",
        details: { version: programme.version, ...before },
      });
    const after = {
      name: input.name ?? before.name,
      description: input.description ?? before.description,
    };
    await tx.save(Programme, tx.merge(Programme, programme, after));
    await writeLine(tx, {
      programmeId: id,
      person: caller,
      action: "programme.edit",
      subject: { type: "programme", id, name: after.name },
      before,
      after,
      at: deps.now(),
    });
  });
  return readProgramme(deps, id);
};

/** Asks for the catalogue to be derived anew by another version; it is in force once that edition is. */
export const chooseRecipe = (deps: Deps, caller: Caller, id: string, versionId: string): Promise<JobRow> =>
  inTransaction(deps.db, async (tx) => {
    const programme = await lockProgramme(tx, id);
    if (!programme) throw notFound("This programme");
    const wanted = await recipeInUse(tx, id, versionId);
    if (programme.recipeVersionId === versionId)
      throw conflict("recipe-in-force", "The catalogue is derived by this version of the recipe already.", {
        hint: "Choose another version or another recipe, or leave it as it is.",
      });
    const inForce = await recipeInUse(tx, id, programme.recipeVersionId);
    const subject = { type: "programme", id };
    await writeLine(tx, {
      programmeId: id,
      person: caller,
      action: "programme.choose-recipe",
      subject: { ...subject, name: programme.name },
      before: { recipe: recipeLabel(inForce) },
      after: { recipe: recipeLabel(wanted) },
      at: deps.now(),
    });
    return enqueueJob(tx, {
      programmeId: id,
      personId: caller.id,
      kind: "recompute",
      payload: { recipeVersionId: versionId },
      subject,
    });
  });
