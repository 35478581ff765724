import { beforeAll, describe, expect, test } from "vitest";
import { JobRow } from "#server/database/entities/job.entity.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { contentHash } from "#server/recipes/content-hash.ts";
import { type Recipe, recipe as recipeJson } from "#shared/api/recipes.ts";
import type { Catalogue } from "#shared/api/stars.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type RecipeSettings } from "#shared/science/recipes.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { bringIn, runJobs } from "#tests/support/extracts.ts";
import { buildPerson, buildProgramme } from "#tests/support/factories.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

const { settings } = DEFAULT_RECIPE;
const CENTRAL: RecipeSettings = { ...settings, duration: "central" };

const urlOf = (programme: Programme, rest = ""): string => `/api/programmes/${programme.id}${rest}`;

const recipesOf = async (agent: Agent, programme: Programme): Promise<Recipe[]> =>
  recipeJson.array().parse((await agent.get(urlOf(programme, "/recipes")).expect(200)).body.recipes);

const named = (recipes: readonly Recipe[], name: string): Recipe => {
  const found = recipes.find((recipe) => recipe.name === name);
  if (!found) throw new Error(`There is no recipe ${name}.`);
  return found;
};

const make = async (agent: Agent, programme: Programme, body: object): Promise<Recipe> =>
  recipeJson.parse((await agent.post(urlOf(programme, "/recipes")).send(body).expect(201)).body.recipe);

const catalogueOf = async (agent: Agent, programme: Programme): Promise<Catalogue> =>
  (await agent.get(urlOf(programme, "/catalogue")).expect(200)).body.catalogue;

describe("recipes of a programme", () => {
  test("begin with the default, which is in force, and the practice one", async () => {
    const chief = await app.as(await buildPerson(app.deps.db, { isInstallationAdministrator: true }));
    const { programme } = (await chief.agent.post("/api/programmes").send({ name: "Suns" }).expect(201)).body;
    const recipes = await recipesOf(chief.agent, programme);
    expect(recipes).toMatchObject([
      { name: "Default", number: 1, savedBy: null, hash: contentHash(settings), settings },
      { name: "Practice", number: 1, savedBy: null, settings: PRACTICE_RECIPE.settings },
    ]);
    expect(programme.recipe).toEqual({
      versionId: recipes[0]?.versionId,
      name: "Default",
      number: 1,
      hash: contentHash(settings),
    });
  });

  test("are saved in versions: the old one stays as it was, under its own hash", async () => {
    const { agent, programme, person } = await app.asPerson("curator");
    const first = named(await recipesOf(agent, programme), "Default");
    const url = urlOf(programme, `/recipes/${first.id}`);
    const body = { name: "Default", note: "Central transits.", settings: CENTRAL, number: 1 };
    const second = recipeJson.parse((await agent.put(url).send(body).expect(200)).body.recipe);
    expect(second).toMatchObject({
      id: first.id,
      number: 2,
      note: "Central transits.",
      settings: CENTRAL,
      hash: contentHash(CENTRAL),
      savedBy: { id: person.id, name: person.name },
    });
    const { body: versions } = await agent.get(`${url}/versions`).expect(200);
    expect(versions.recipes).toEqual([second, first]);
    expect(await recipesOf(agent, programme)).toContainEqual(second);
    const again = await agent.get(urlOf(programme, `/recipes/versions/${first.versionId}`)).expect(200);
    expect(again.body.recipe).toEqual(first);
    const { lines } = (await agent.get(urlOf(programme, "/logbook"))).body;
    expect(lines[0]).toMatchObject({ action: "recipe.save", subject: "recipe Default" });
  });

  test("the second of two editors is told, and overwrites nothing", async () => {
    const { agent, programme } = await app.asPerson("lead");
    const { id } = named(await recipesOf(agent, programme), "Default");
    const save = (note: string) =>
      agent.put(urlOf(programme, `/recipes/${id}`)).send({ name: "Default", note, settings, number: 1 });
    const answers = await Promise.all([save("A"), save("B")]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const refused = answers.find(({ status }) => status === 409);
    expect(refused?.body.error).toMatchObject({ code: "changed-meanwhile", details: { number: 2 } });
  });

  test("a copy has the content and the hash of what it was copied from", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const source = named(await recipesOf(agent, programme), "Practice");
    const copy = await make(agent, programme, { name: "Ours", copyOf: source.versionId });
    expect(copy).toMatchObject({ name: "Ours", number: 1, hash: source.hash, settings: source.settings });
    expect(copy.id).not.toBe(source.id);
  });

  test("settings that cannot hold are refused at the setting", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const wrong = { ...settings, ranges: { ...settings.ranges, faintestAbsKs: 10.4 }, teff: [] };
    const { body } = await agent
      .post(urlOf(programme, "/recipes"))
      .send({ name: "Wide", settings: wrong })
      .expect(400);
    expect(body.error.fields).toEqual({
      "settings.ranges.faintestAbsKs": "The faintest M_Ks lies between 4.6 and 9.8 mag.",
      "settings.teff": "At least one way to a temperature is needed.",
    });
  });

  test("everyone reads them, curators and leads alone change and choose", async () => {
    const { agent, programme } = await app.asPerson("guest");
    const { id, versionId } = named(await recipesOf(agent, programme), "Practice");
    const scientist = (await app.asPerson("scientist", programme)).agent;
    for (const who of [agent, scientist]) {
      await who.post(urlOf(programme, "/recipes")).send({ name: "Mine", settings }).expect(403);
      const next = { name: "Mine", settings, number: 1 };
      await who
        .put(urlOf(programme, `/recipes/${id}`))
        .send(next)
        .expect(403);
      await who.put(urlOf(programme, "/recipe")).send({ versionId }).expect(403);
    }
  });

  test("those of another programme do not exist here", async () => {
    const { agent, programme } = await app.asPerson("lead");
    const foreign = await buildProgramme(app.deps.db);
    const versionId = foreign.recipeVersionId;
    await agent.get(urlOf(programme, `/recipes/versions/${versionId}`)).expect(404);
    await agent.put(urlOf(programme, "/recipe")).send({ versionId }).expect(404);
    await agent.post(urlOf(programme, "/recipes")).send({ name: "Mine", copyOf: versionId }).expect(404);
    await agent
      .put(urlOf(programme, `/recipes/${versionId}`))
      .send({ name: "Mine", settings, number: 1 })
      .expect(404);
    expect(await app.deps.db.manager.countBy(JobRow, { programmeId: programme.id })).toBe(0);
  });
});

const STARS = `name,source_id,ra,dec,ref_epoch,plx,e_plx,Ks,e_Ks,Teff,card_mag
A,3141592653589793239,150.1,-12.5,2016.0,60.00,0.05,7.912,0.02,3350,10.2
B,1234567890123456789,200.2,40.25,2016.0,81.30,0.05,9.431,0.02,2950,12.4
C,6917529027641081857,310.3,-0.5,2016.0,38.50,0.05,6.850,0.02,3650,9.1
`;

const furnished = async () => {
  const programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  const { agent } = await app.asPerson(["curator", "scientist"], programme);
  await bringIn(app.deps, agent, programme, STARS);
  return { agent, programme };
};

/** Asks for that version and does what a worker would. */
const choose = async (agent: Agent, programme: Programme, { versionId }: Recipe): Promise<void> => {
  await agent.put(urlOf(programme, "/recipe")).send({ versionId }).expect(202);
  await runJobs(app.deps);
};

const rowsWritten = async (programme: Programme): Promise<number> => {
  const [row] = await app.deps.db.query("SELECT COUNT(*) AS n FROM star WHERE programme_id = ?", [
    programme.id,
  ]);
  return Number(row.n);
};

/** Every value of every star as one edition has them. */
const valuesAt = async (agent: Agent, programme: Programme, edition: number): Promise<unknown> => {
  const view = `edition=${edition}&offset=0&limit=10`;
  const ask = () => agent.get(urlOf(programme, `/stars/window?${view}`));
  let answer = await ask();
  if (answer.status === 503) {
    await runJobs(app.deps);
    answer = await ask();
  }
  return answer.body.window.rows.map((row: { values: object }) => row.values);
};

describe("another version in force", () => {
  test("is a job that derives the catalogue anew, in the logbook", async () => {
    const { agent, programme, person } = await app.asPerson("curator");
    const recipes = await recipesOf(agent, programme);
    const wanted = named(recipes, "Practice");
    const { body } = await agent
      .put(urlOf(programme, "/recipe"))
      .send({ versionId: wanted.versionId })
      .expect(202);
    expect(body.job).toMatchObject({ kind: "recompute", state: "queued" });
    const job = await app.deps.db.manager.findOneByOrFail(JobRow, { id: body.job.id });
    expect(job).toMatchObject({ programmeId: programme.id, personId: person.id });
    const { lines } = (await agent.get(urlOf(programme, "/logbook"))).body;
    expect(lines[0]).toMatchObject({
      action: "programme.choose-recipe",
      before: { recipe: recipeLabel(named(recipes, "Default")) },
      after: { recipe: recipeLabel(wanted) },
    });
    await runJobs(app.deps);
  });

  test("that is in force already, or is none, starts nothing", async () => {
    const { agent, programme } = await app.asPerson("lead");
    const put = (versionId: string) => agent.put(urlOf(programme, "/recipe")).send({ versionId });
    const again = await put(programme.recipeVersionId);
    expect([again.status, again.body.error.code]).toEqual([409, "recipe-in-force"]);
    expect((await put("magic")).status).toBe(400);
    expect(await app.deps.db.manager.countBy(JobRow, { programmeId: programme.id })).toBe(0);
  });

  test("makes an edition; the one before keeps its label and its numbers", async () => {
    const { agent, programme } = await furnished();
    const before = await valuesAt(agent, programme, 1);
    const recipes = await recipesOf(agent, programme);
    await choose(agent, programme, named(recipes, "Default"));
    const catalogue = await catalogueOf(agent, programme);
    expect(catalogue.editions.map(({ recipe }) => recipe.name)).toEqual(["Default", "Practice"]);
    expect(catalogue.editions[0]?.reason).toBe(`recipe ${recipeLabel(named(recipes, "Default"))}`);
    expect(catalogue.editions[0]?.fingerprint).not.toBe(catalogue.editions[1]?.fingerprint);
    expect(await valuesAt(agent, programme, 2)).not.toEqual(before);
    expect(await valuesAt(agent, programme, 1)).toEqual(before);
    const summary = (edition: number) =>
      agent.get(urlOf(programme, `/stars/summary?edition=${edition}`)).expect(200);
    expect((await summary(1)).body.summary.recipe.name).toBe("Practice");
    expect((await summary(2)).body.summary.recipe.name).toBe("Default");
  });

  test("of the same content comes out bit for bit the same, and writes no star again", async () => {
    const { agent, programme } = await furnished();
    const first = (await catalogueOf(agent, programme)).editions[0];
    const practice = named(await recipesOf(agent, programme), "Practice");
    const copy = await make(agent, programme, { name: "Ours", copyOf: practice.versionId });
    const rows = await rowsWritten(programme);
    await choose(agent, programme, copy);
    const [second] = (await catalogueOf(agent, programme)).editions;
    expect(second).toMatchObject({ number: 2, stars: 3, recipe: { name: "Ours", hash: practice.hash } });
    expect(second?.fingerprint).toBe(first?.fingerprint);
    expect(await rowsWritten(programme)).toBe(rows);
  });

  test("there and back: the same numbers, and later extracts come in by the version in force", async () => {
    const { agent, programme } = await furnished();
    const recipes = await recipesOf(agent, programme);
    await choose(agent, programme, named(recipes, "Default"));
    await choose(agent, programme, named(recipes, "Practice"));
    await bringIn(app.deps, agent, programme, `${STARS}\n`);
    const { editions } = await catalogueOf(agent, programme);
    expect(editions.map(({ recipe }) => recipe.name)).toEqual([
      "Practice",
      "Practice",
      "Default",
      "Practice",
    ]);
    expect(editions[1]?.fingerprint).toBe(editions[3]?.fingerprint);
    expect(await rowsWritten(programme)).toBe(9);
  });

  test("leaves lists made before as they were, with the label of what they used", async () => {
    const { agent, programme } = await furnished();
    const body = { name: "Before", view: "edition=1", first: 3 };
    const made = (await agent.post(urlOf(programme, "/lists")).send(body).expect(201)).body.list;
    const url = urlOf(programme, `/lists/${made.id}`);
    const members = (await agent.get(`${url}/members`).expect(200)).body.members;
    const recipes = await recipesOf(agent, programme);
    const practice = named(recipes, "Practice");
    await agent
      .put(urlOf(programme, `/recipes/${practice.id}`))
      .send({ name: "Renamed", settings: CENTRAL, number: 1 })
      .expect(200);
    await choose(agent, programme, named(await recipesOf(agent, programme), "Renamed"));
    const list = (await agent.get(url).expect(200)).body.list;
    expect(recipeLabel(list.recipe)).toBe(recipeLabel(practice));
    expect((await agent.get(`${url}/members`).expect(200)).body.members).toEqual(members);
    const file = await agent.get(`${url}/export?format=ecsv`).expect(200);
    expect(file.text).toContain(`# - recipe: "${recipeLabel(practice)}"`);
  });
});
