import supertest from "supertest";
import { beforeAll, expect, test } from "vitest";
import type { z } from "zod";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp({ isDemo: true });
});

interface Operation {
  description: string;
  parameters: { name: string; in: string }[];
  requestBody?: { content: { "application/json": { schema: { required?: string[] } } } };
  responses: Record<string, unknown>;
}

test("every route is described, with who may call it, its parameters and its body", async () => {
  const { body } = await supertest(on.app).get("/api/openapi.json").expect(200);
  const paths = body.paths as Record<string, Record<string, Operation>>;
  for (const route of on.routes) {
    const path = `/api${route.path.replace(/:(\w+)/g, "{$1}")}`;
    const operation = paths[path]?.[route.method];
    expect(operation?.description, path).toBeTruthy();
    const inPath = operation?.parameters.filter((each) => each.in === "path").map((each) => each.name);
    expect(inPath).toEqual([...route.path.matchAll(/:(\w+)/g)].map((match) => match[1]));
    expect(operation?.requestBody !== undefined, path).toBe(route.body !== undefined);
  }
  const signIn = paths["/api/session"]?.post;
  expect(signIn?.requestBody?.content["application/json"].schema.required).toEqual(["email", "password"]);
  const logbook = paths["/api/programmes/{programmeId}/logbook"]?.get;
  expect(logbook?.parameters.map((each) => each.name)).toEqual(["programmeId", "cursor", "limit", "subject"]);
  expect(logbook?.description).toMatch(/Curator, Scientist.*Administrator/);
  expect(JSON.stringify(body)).not.toContain('"$schema"');
});

test("the answers are what the description says", async () => {
  const { agent, programme } = await on.asPerson(["administrator", "lead"]);
  const chief = await on.as(await buildPerson(on.deps.db, { isInstallationAdministrator: true }));
  const own = `/programmes/${programme.id}`;
  await agent
    .post(`/api${own}/invitations`)
    .send({ email: "someone@example.org", roles: ["guest"] })
    .expect(201);
  const answerOf = (path: string): z.ZodType => {
    const route = on.routes.find((each) => each.method === "get" && each.path === path);
    if (!route?.answer) throw new Error(`GET ${path} does not say what it answers.`);
    return route.answer;
  };
  for (const path of [
    "/session",
    "/programmes",
    "/programmes/:programmeId",
    "/programmes/:programmeId/members",
    "/programmes/:programmeId/invitations",
    "/programmes/:programmeId/logbook",
  ]) {
    const { body } = await agent.get(`/api${path.replace("/programmes/:programmeId", own)}`).expect(200);
    expect(answerOf(path).safeParse(body).error, path).toBeUndefined();
  }
  const { body } = await chief.agent.get("/api/mailbox").expect(200);
  expect(body.mails).toHaveLength(1);
  expect(answerOf("/mailbox").safeParse(body).error).toBeUndefined();
});
