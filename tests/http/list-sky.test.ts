import { beforeAll, expect, test } from "vitest";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildSky } from "#tests/support/sky.ts";
import { runJobs } from "#tests/support/worker.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

test("a list says where its stars are, to its own programme alone", async () => {
  const { agent, programme } = await app.asPerson("scientist");
  await buildSky(app.deps, programme, [
    { designation: "North", values: { ra: 10.5, dec: 41.25 } },
    { designation: "South", values: { ra: 350, dec: -60 } },
    { designation: "Nowhere", values: { g_mag: 10 } },
  ]);
  const lists = `/api/programmes/${programme.id}/lists`;
  const body = { name: "Three", note: "", view: "sort=designation", first: 10 };
  await agent.post(lists).send(body);
  await runJobs(app.deps);
  const { list } = (await agent.post(lists).send(body).expect(201)).body;
  const { sky } = (await agent.get(`${lists}/${list.id}/sky`).expect(200)).body;
  expect(sky).toEqual({
    stars: 3,
    without: 1,
    points: [
      [10.5, 41.25],
      [350, -60],
    ],
    cells: [],
  });
  const stranger = await app.asPerson("scientist");
  await stranger.agent.get(`/api/programmes/${stranger.programme.id}/lists/${list.id}/sky`).expect(404);
});
