import { readFileSync } from "node:fs";
import { join } from "node:path";
import { setTimeout as wait } from "node:timers/promises";
import { ROOT } from "#scripts/lib/root.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import type { Agent } from "./app.ts";
import { commit, extractsUrl, receive } from "./extracts.ts";
import { buildProgramme } from "./factories.ts";
import type { LiveApp } from "./live-app.ts";
import type { OpenSession } from "./sign-in.ts";

export const demoFile = (name: string): string => readFileSync(join(ROOT, "data-demo", name), "utf8");
export const SURVEY_FILE = join(ROOT, "tests/fixtures/extracts/survey-162-columns.csv");
export const PRACTICE_FILE = join(ROOT, "data-demo/practice-stars.csv");

/** Everyone's work in one person, so that one browser can walk the whole path. */
export const ALL_ROLES = ["lead", "curator", "scientist", "administrator"] as const;

const PATIENCE_MS = 60_000;

/** Asks until the answer is there; the worker does its part meanwhile. */
const until = async <T>(ask: () => Promise<T | undefined>): Promise<T> => {
  const end = Date.now() + PATIENCE_MS;
  while (Date.now() < end) {
    const answer = await ask();
    if (answer !== undefined) return answer;
    await wait(100);
  }
  throw new Error("It did not come about in a minute.");
};

const bringInFile = async (
  agent: Agent,
  programme: Programme,
  file: string,
  name: string,
): Promise<string> => {
  const received = await receive(agent, programme, readFileSync(file), name);
  await commit(agent, programme, received);
  const url = `${extractsUrl(programme)}/${received.extract.id}`;
  await until(async () => {
    const { extract } = (await agent.get(url).expect(200)).body;
    if (extract.failure) throw new Error(extract.failure.message);
    return extract.state === "committed" ? true : undefined;
  });
  return received.extract.id;
};

/** Makes a list once the table it is made from is prepared. */
const makeList = async (agent: Agent, url: string, body: object): Promise<string> => {
  const answer = await agent.post(`${url}/lists`).send(body);
  if (answer.body.error?.code !== "scan-index-building") return answer.body.list.id;
  await until(async () => {
    const { job } = (await agent.get(`${url}/jobs/${answer.body.error.details.jobId}`).expect(200)).body;
    return job.state === "done" ? true : undefined;
  });
  return (await agent.post(`${url}/lists`).send(body).expect(201)).body.list.id;
};

export interface Furnished {
  session: OpenSession;
  agent: Agent;
  programme: Programme;
  committed: string;
  planning: string;
  list: string;
  /** The first star of the list. */
  star: string;
  /** The workbench on the practice card, campaign and figure of merit, as search parameters. */
  view: string;
}

/** A programme with something on every screen: extracts, instrument, campaign, figure of merit, selection, list. */
export const buildFurnished = async (app: LiveApp): Promise<Furnished> => {
  const programme = await buildProgramme(app.deps.db, { name: "Furnished sky", recipe: "practice" });
  const { agent, session } = await app.asPerson(ALL_ROLES, programme);
  const url = `/api/programmes/${programme.id}`;
  const post = async (path: string, body: unknown) =>
    (
      await agent
        .post(`${url}${path}`)
        .send(body as object)
        .expect(201)
    ).body;
  await bringInFile(agent, programme, SURVEY_FILE, "Survey");
  const committed = await bringInFile(agent, programme, PRACTICE_FILE, "Practice stars");
  const { extract } = await receive(
    agent,
    programme,
    "name,ra,dec,plx,Ks\nOne,10.5,-3.25,40,8\nTwo,11.5,-4.25,-999,9\n",
    "Still open",
  );
  const { card } = await post("/instruments", JSON.parse(demoFile("practice-30.json")));
  const { campaign } = await post("/campaigns", JSON.parse(demoFile("practice-180d.json")));
  const { merit } = await post("/merits", JSON.parse(demoFile("small-suns-warm-rocks.json")));
  await post("/selections", {
    name: "Cool stars",
    note: "",
    cuts: [{ label: "cool", expression: "teff < 3900", blanks: "drop" }],
  });
  const view = new URLSearchParams({
    card: card.versionId,
    campaign: campaign.versionId,
    merit: merit.versionId,
    sort: "-merit",
  });
  const list = await makeList(agent, url, {
    name: "First stars",
    note: "For the screens.",
    view: view.toString(),
    first: 5,
  });
  const members = await agent.get(`${url}/lists/${list}/members?offset=0&limit=1`).expect(200);
  const star = members.body.members[0].id;
  return { session, agent, programme, committed, planning: extract.id, list, star, view: view.toString() };
};
