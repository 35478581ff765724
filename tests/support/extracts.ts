import type { Programme } from "#server/database/entities/programme.entity.ts";
import type { Deps } from "#server/deps.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import type { Extract, ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import type { Agent } from "./app.ts";

export interface Received {
  extract: Extract;
  preview: ExtractPreview;
}

export const extractsUrl = (programme: Programme): string => `/api/programmes/${programme.id}/extracts`;

/** Announces a file and sends it. */
export const receive = async (
  agent: Agent,
  programme: Programme,
  content: string | Buffer,
  name = "Stars",
): Promise<Received> => {
  const body = Buffer.from(content as string);
  const url = extractsUrl(programme);
  const made = await agent
    .post(url)
    .send({ name, fileName: "stars.csv", bytes: body.length, origin: "" })
    .expect(201);
  const answer = await agent
    .put(`${url}/${made.body.extract.id}/original`)
    .set("Content-Type", "application/octet-stream")
    .send(body)
    .expect(200);
  return answer.body as Received;
};

/** The plan that the suggestions make, with what the test answers. */
export const planOf = (preview: ExtractPreview, answers: Partial<ReadingPlan> = {}): ReadingPlan => ({
  format: preview.format,
  delimiter: preview.delimiter,
  encoding: preview.encoding,
  decimalMark: preview.decimalMark,
  columns: preview.columns.map(({ index, header, means, unit, blankMarks }) => ({
    index,
    header,
    means,
    unit,
    blankMarks,
  })),
  epoch: null,
  release: "",
  raUnit: null,
  frame: "ICRS",
  equinox: null,
  ...answers,
});

export const savePlan = async (
  agent: Agent,
  programme: Programme,
  { extract, preview }: Received,
  answers: Partial<ReadingPlan> = {},
): Promise<{ extract: Extract; findings: Finding[] }> => {
  const answer = await agent
    .put(`${extractsUrl(programme)}/${extract.id}/plan`)
    .send({ plan: planOf(preview, answers), version: extract.version })
    .expect(200);
  return answer.body;
};

/** Saves the plan and queues the import. */
export const commit = async (
  agent: Agent,
  programme: Programme,
  received: Received,
  answers: Partial<ReadingPlan> = {},
): Promise<{ extract: Extract; job: { id: string } }> => {
  const { extract } = await savePlan(agent, programme, received, answers);
  const answer = await agent
    .post(`${extractsUrl(programme)}/${extract.id}/commit`)
    .send({ version: extract.version })
    .expect(202);
  return answer.body;
};

/** Does all jobs that wait. */
export const runJobs = async (deps: Deps): Promise<void> => {
  while (await runNextJob(deps));
};

/** The whole way of a file into the catalogue. */
export const bringIn = async (
  deps: Deps,
  agent: Agent,
  programme: Programme,
  content: string | Buffer,
  answers: Partial<ReadingPlan> = {},
  name?: string,
): Promise<Extract> => {
  const received = await receive(agent, programme, content, name);
  await commit(agent, programme, received, answers);
  await runJobs(deps);
  const answer = await agent.get(`${extractsUrl(programme)}/${received.extract.id}`).expect(200);
  return answer.body.extract;
};
