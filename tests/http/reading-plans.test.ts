import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import type { Finding, NamedPlan, ReadingPlan } from "#shared/api/extracts.ts";
import { answered } from "#shared/catalogue/answers.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { extractsUrl, type Received, receive, runJobs } from "#tests/support/extracts.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

const HEADER = "source;RA;Dec;pmRA*;pmDE;Plx;Ksmag;e_Ks;Gmag";
const ROWS = 70;
const comma = (value: number, decimals: number): string => value.toFixed(decimals).replace(".", ",");

/** A southern row, all its numbers with decimal commas. */
const row = (i: number, first: bigint): string =>
  [
    String(first + BigInt(i)),
    i === 0 ? "14,4950" : comma((i * 7.31) % 24, 4),
    comma(-89.9 + i * 1.28, 4),
    comma(120.5 + i, 2),
    comma(-80.25 - i, 2),
    i % 20 === 3 ? comma(-0.4 - i / 100, 3) : comma(20.1 + i, 3),
    comma(8.1 + i / 50, 3),
    i % 6 === 1 ? "-999" : comma(0.02 + i / 5000, 3),
    i % 10 === 2 ? "99,99" : comma(11.2 + i / 40, 3),
  ].join(";");

const FIRST = 3141592653589793239n;
/** With a mark of its encoding, marks for no value, a line too short and one too long. */
const table = (first: bigint, header = HEADER): string => {
  const rows = Array.from({ length: ROWS }, (_, i) => row(i, first));
  rows.splice(40, 0, "1;2;3", `${row(99, first)};7`);
  return `\ufeff${header}\r\n${rows.join("\r\n")}\r\n`;
};

const plansUrl = (programme: Programme): string => `/api/programmes/${programme.id}/reading-plans`;

const save = async (agent: Agent, programme: Programme, { extract }: Received, plan: ReadingPlan) => {
  const answer = await agent
    .put(`${extractsUrl(programme)}/${extract.id}/plan`)
    .send({ plan, version: extract.version })
    .expect(200);
  return answer.body as Received & { findings: Finding[] };
};

const asksOf = (findings: readonly Finding[]): Finding[] => findings.filter((f) => f.level === "ask");

const ANSWERS: Readonly<Record<string, string>> = {
  "ra-unit": "hour",
  "epoch-missing": "2016",
  "magnitude-system": "vega",
};

/** Answers every question as a curator would: hours, marks for no value, the epoch, the scale of Vega. */
const answerAll = ({ preview }: Received): ReadingPlan => {
  if (!preview.plan) throw new Error("A preview without a plan");
  return asksOf(preview.findings).reduce(
    (plan, finding) => answered(plan, finding, ANSWERS[finding.code] ?? finding.answers[0]?.value ?? ""),
    preview.plan,
  );
};

const commit = async (agent: Agent, programme: Programme, { extract }: Received): Promise<string> => {
  const url = `${extractsUrl(programme)}/${extract.id}`;
  await agent.post(`${url}/commit`).send({ version: extract.version }).expect(202);
  await runJobs(app.deps);
  const answer = await agent.get(url).expect(200);
  expect(answer.body.extract).toMatchObject({ state: "committed", failure: null });
  return url;
};

describe("a messy first extract and the ones after it", () => {
  test("asks what only a person can know, and nothing of a second file with the same header", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const first = await receive(agent, programme, table(FIRST));
    expect(first.preview.columns[0]).toMatchObject({ header: "source", means: "source_id" });
    expect(first.preview.knownPlan).toBeNull();
    const asks = asksOf(first.preview.findings);
    expect(asks.map((f) => [f.code, f.column])).toEqual([
      ["ra-unit", "RA"],
      ["epoch-missing", null],
      ["magnitude-system", "Ksmag"],
      ["blank-mark", "e_Ks"],
      ["blank-mark", "Gmag"],
    ]);
    expect(asks.map((f) => f.count).slice(3)).toEqual([12, 7]);
    // Nothing that is asked is taken for granted.
    expect(first.preview.plan).toMatchObject({ raUnit: null, epoch: null });
    expect(first.preview.columns.find((c) => c.header === "RA")).toMatchObject({ unit: "", asks: true });

    const planned = await save(agent, programme, first, answerAll(first));
    expect(asksOf(planned.findings)).toEqual([]);
    expect(planned.findings.map((f) => f.code)).toEqual(
      expect.arrayContaining(["uneven-rows", "parallax-not-positive"]),
    );
    const made = await agent
      .post(plansUrl(programme))
      .send({ name: "South dwarfs 2031a", plan: planned.extract.plan })
      .expect(201);
    expect(made.body.plan).toMatchObject({ name: "South dwarfs 2031a", number: 1 });
    const url = await commit(agent, programme, planned);

    const [star] = await app.deps.db.query<{ source_id: string; ra: number; ks_mag_err: number | null }[]>(
      "SELECT source_id, ra, ks_mag_err FROM entry WHERE extract_id = ? ORDER BY entry.`row_number` LIMIT 1",
      [first.extract.id],
    );
    expect(star?.source_id).toBe(String(FIRST));
    expect(Number(star?.ra)).toBeCloseTo(217.425, 10);
    const [marks] = await app.deps.db.query<{ n: string }[]>(
      "SELECT COUNT(*) AS n FROM entry WHERE extract_id = ? AND (ks_mag_err < 0 OR g_mag > 90)",
      [first.extract.id],
    );
    expect(Number(marks?.n)).toBe(0);
    const refused = await agent.get(`${url}/refused`).expect(200);
    expect(refused.text).toContain("1;2;3");

    const second = await receive(agent, programme, table(FIRST + 1000n));
    expect(second.preview.knownPlan).toMatchObject({
      name: "South dwarfs 2031a",
      number: 1,
      differences: [],
    });
    const again = await save(agent, programme, second, second.preview.knownPlan?.plan as ReadingPlan);
    expect(again.findings.filter((f) => f.level !== "note")).toEqual([]);
    await commit(agent, programme, again);
  });

  test("a changed header says exactly what differs, and the rest needs no answer", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const first = await receive(agent, programme, table(FIRST));
    const plan = answerAll(first);
    await save(agent, programme, first, plan);
    await agent.post(plansUrl(programme)).send({ name: "South", plan }).expect(201);
    const other = await receive(agent, programme, table(FIRST + 1n, HEADER.replace("Gmag", "gmag2")));
    expect(other.preview.knownPlan?.differences).toEqual([
      "“gmag2” is new in this file.",
      "“Gmag” is not in this file.",
    ]);
    const saved = await save(agent, programme, other, other.preview.knownPlan?.plan as ReadingPlan);
    expect(asksOf(saved.findings)).toEqual([]);
  });

  test("the same header with parallaxes of another size asks all the same", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const first = await receive(agent, programme, table(FIRST));
    const plan = answerAll(first);
    await save(agent, programme, first, plan);
    await agent.post(plansUrl(programme)).send({ name: "South", plan }).expect(201);
    const inArcsec = table(FIRST + 1n).replace(
      /^((?:[^;\n]*;){5})(\d+,\d+)/gm,
      (_, before: string, mas: string) => `${before}${comma(Number(mas.replace(",", ".")) / 1000, 6)}`,
    );
    const other = await receive(agent, programme, inArcsec);
    const saved = await save(agent, programme, other, other.preview.knownPlan?.plan as ReadingPlan);
    expect(asksOf(saved.findings).map((f) => [f.code, f.column])).toContainEqual(["values-shifted", "Plx"]);
  });

  test("stars that the catalogue has already tell of a slip of the unit", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const first = await receive(agent, programme, table(FIRST));
    await commit(agent, programme, await save(agent, programme, first, answerAll(first)));
    const rows = Array.from({ length: 20 }, (_, i) => `${FIRST + BigInt(i)},${(20.1 + i) / 1000}`);
    const other = await receive(agent, programme, `source,Plx [mas]\n${rows.join("\n")}\n`);
    const { findings } = await save(agent, programme, other, other.preview.plan as ReadingPlan);
    expect(asksOf(findings)).toMatchObject([
      {
        code: "unit-slip",
        column: "Plx [mas]",
        answers: [{ value: "unit:arcsec" }, { value: "accept" }],
      },
    ]);
    expect(asksOf(findings)[0]?.message).toContain("1000 × smaller");
  });
});

describe("named reading plans", () => {
  const made = async (agent: Agent, programme: Programme): Promise<NamedPlan> => {
    const { preview } = await receive(agent, programme, "source_id,ra,dec,epoch\n1,100.5,20,2016\n");
    const answer = await agent
      .post(plansUrl(programme))
      .send({ name: "Mine", plan: preview.plan })
      .expect(201);
    return answer.body.plan;
  };

  test("are saved in versions, of which the newest is listed", async () => {
    const { agent, programme, person } = await app.asPerson("lead");
    const curator = await app.asPerson("curator", programme);
    const plan = await made(curator.agent, programme);
    const next = await agent
      .put(`${plansUrl(programme)}/${plan.id}`)
      .send({
        name: "Ours",
        plan: { ...plan.plan, release: "DR4", accepted: ["round-number", "unit-doubt:Plx"] },
      })
      .expect(200);
    expect(next.body.plan).toMatchObject({
      id: plan.id,
      number: 2,
      name: "Ours",
      savedBy: { id: person.id },
    });
    const { body } = await agent.get(plansUrl(programme)).expect(200);
    expect(body.plans).toHaveLength(1);
    // What was said of one file alone is not said of the next.
    expect(body.plans[0]).toMatchObject({
      number: 2,
      plan: { release: "DR4", accepted: ["unit-doubt:Plx"] },
    });
  });

  test("are kept from those who do not plan, and from other programmes", async () => {
    const curator = await app.asPerson("curator");
    const plan = await made(curator.agent, curator.programme);
    const scientist = await app.asPerson("scientist", curator.programme);
    await scientist.agent.get(plansUrl(curator.programme)).expect(200);
    const body = { name: "Mine", plan: plan.plan };
    await scientist.agent.post(plansUrl(curator.programme)).send(body).expect(403);
    const other = await app.asPerson("curator");
    await other.agent
      .put(`${plansUrl(other.programme)}/${plan.id}`)
      .send(body)
      .expect(404);
    await curator.agent.post(plansUrl(curator.programme)).send({ name: "", plan: plan.plan }).expect(400);
  });
});
