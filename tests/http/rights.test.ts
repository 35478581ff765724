import type { IncomingMessage } from "node:http";
import { beforeAll, expect, test } from "vitest";
import { Member } from "#server/database/entities/member.entity.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import type { DefinedRoute } from "#server/http/route.ts";
import { type Action, can, RIGHTS } from "#shared/policy/rights.ts";
import { ROLES } from "#shared/policy/roles.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildMember, buildPerson, buildProgramme } from "#tests/support/factories.ts";

const NO_SUCH_ID = "999999999";
/** Never ends by itself. */
const STREAMS = ["/programmes/:programmeId/events"];

let on: TestApp;
let programme: Programme;
let foreign: Programme;

beforeAll(async () => {
  on = await startTestApp();
  programme = await buildProgramme(on.deps.db);
  // The last administrator is never the one under test.
  await buildMember(on.deps.db, { roles: ["administrator"], programme });
  foreign = (await buildMember(on.deps.db, { roles: ["administrator"] })).programme;
});

const fill = (path: string, programmeId: string): string =>
  `/api${path.replace(":programmeId", programmeId).replace(/:\w+/g, NO_SUCH_ID)}`;

const call = (agent: Agent, route: DefinedRoute, programmeId: string) =>
  agent[route.method as "get"](fill(route.path, programmeId)).timeout({ response: 20_000 });

/** Event streams answer their head and then stay open: the status is all that is wanted. */
const statusOf = async (agent: Agent, route: DefinedRoute, programmeId: string): Promise<number> => {
  if (!STREAMS.includes(route.path)) return (await call(agent, route, programmeId)).status;
  return new Promise((resolve, reject) => {
    const request = call(agent, route, programmeId)
      .buffer(false)
      .parse((res, done) => {
        resolve(res.statusCode ?? 0);
        (res as unknown as IncomingMessage).destroy();
        done(null, undefined);
      });
    request.then((answer) => resolve(answer.status), reject);
  });
};

const name = (route: DefinedRoute): string => `${route.method.toUpperCase()} ${route.path}`;

const isAction = (access: string): access is Action => Object.hasOwn(RIGHTS, access);

test("every route of a programme asks for a right, and every right's route names its programme", () => {
  expect(on.routes.length).toBeGreaterThan(20);
  for (const route of on.routes)
    expect(isAction(route.access), name(route)).toBe(route.path.includes("/:programmeId"));
});

test("a visitor is let in nowhere but at the routes for anyone", async () => {
  const visitor = await on.visitor();
  for (const route of on.routes.filter((each) => each.access !== "anyone"))
    expect(await statusOf(visitor, route, programme.id), name(route)).toBe(401);
});

test("a stranger finds no programme, and cannot tell it from one that does not exist", async () => {
  const { agent } = await on.as(await buildPerson(on.deps.db));
  for (const route of on.routes.filter((each) => isAction(each.access))) {
    const [there, nowhere] = [await call(agent, route, programme.id), await call(agent, route, NO_SUCH_ID)];
    expect(there.status, name(route)).toBe(404);
    expect(there.text, name(route)).toBe(nowhere.text);
  }
});

test("a member of another programme is a stranger here, whatever the role there", async () => {
  const { agent } = await on.asPerson([...ROLES]);
  for (const route of on.routes.filter((each) => isAction(each.access)))
    expect((await call(agent, route, foreign.id)).status, name(route)).toBe(404);
});

test("an installation administrator is no member by that", async () => {
  const { agent } = await on.as(await buildPerson(on.deps.db, { isInstallationAdministrator: true }));
  for (const route of on.routes.filter((each) => isAction(each.access)))
    expect((await call(agent, route, programme.id)).status, name(route)).toBe(404);
});

test.each(ROLES)("the role %s may do exactly what the table of rights grants", async (role) => {
  const { db } = on.deps;
  const { agent, person } = await on.asPerson(role, programme);
  for (const route of on.routes.filter((each) => isAction(each.access))) {
    // A probe may have been the one that leaves.
    await db.manager.save(Member, {
      programmeId: programme.id,
      personId: person.id,
      roles: [role],
      since: new Date(),
    });
    const status = await statusOf(agent, route, programme.id);
    if (can({ roles: [role] }, route.access as Action)) expect([401, 403], name(route)).not.toContain(status);
    else expect(status, name(route)).toBe(403);
  }
});

test("routes of the installation are its administrators' alone", async () => {
  const routes = on.routes.filter((each) => each.access === "installation-administrator");
  const { agent } = await on.asPerson([...ROLES]);
  const chief = await on.as(await buildPerson(on.deps.db, { isInstallationAdministrator: true }));
  expect(routes.length).toBeGreaterThan(0);
  for (const route of routes) {
    expect(await statusOf(agent, route, ""), name(route)).toBe(403);
    expect([401, 403], name(route)).not.toContain(await statusOf(chief.agent, route, ""));
  }
});

test("whoever is deactivated is out at the next request", async () => {
  const { agent, person } = await on.asPerson("lead", programme);
  expect((await agent.get(`/api/programmes/${programme.id}`)).status).toBe(200);
  await on.deps.db.query("UPDATE person SET is_active = 0 WHERE person_id = ?", [person.id]);
  expect((await agent.get(`/api/programmes/${programme.id}`)).status).toBe(401);
});

test.each(["0", "-1", "1e3", "1%20", "00001", "abc", "1'", "99999999999999999999"])(
  "the programme id %s is answered like one that does not exist",
  async (id) => {
    const { agent } = await on.asPerson("lead", programme);
    const [odd, nowhere] = [
      await agent.get(`/api/programmes/${id}`),
      await agent.get(`/api/programmes/${NO_SUCH_ID}`),
    ];
    expect([odd.status, odd.text]).toEqual([404, nowhere.text]);
  },
);
