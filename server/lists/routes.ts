import { z } from "zod";
import {
  listCreateBody,
  listMember,
  listPatchBody,
  listSky,
  listStateBody,
  memberPatchBody,
  type TargetList,
  targetList,
} from "#shared/api/lists.ts";
import { windowQuery } from "#shared/api/stars.ts";
import { type Actor, can } from "#shared/policy/rights.ts";
import type { Routes } from "../http/route.ts";
import { makeList } from "./make.ts";
import { memberWithoutMerit, withoutMerit } from "./present.ts";
import {
  changeList,
  changeMember,
  deleteList,
  listLists,
  moveList,
  readList,
  readMembers,
} from "./service.ts";
import { readSky } from "./sky.ts";

const ALL = "/programmes/:programmeId/lists";
const ONE = `${ALL}/:listId`;
const oneList = z.object({ list: targetList });

/** What the reader may see of it: a guest sees no figure of merit, here as little as in the catalogue. */
const seenBy = (actor: Actor, list: TargetList): TargetList =>
  can(actor, "merit.read") ? list : withoutMerit(list);

const addMemberRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: `${ONE}/members`,
      access: "list.read",
      query: windowQuery,
      answer: z.object({ members: z.array(listMember), count: z.int() }),
    },
    async ({ deps, programmeId, actor, params, query }) => {
      const { members, count } = await readMembers(deps, programmeId, params.listId ?? "", query);
      return { members: can(actor, "merit.read") ? members : members.map(memberWithoutMerit), count };
    },
  );
  routes.add(
    {
      method: "patch",
      path: `${ONE}/members/:starId`,
      access: "list.edit",
      body: memberPatchBody,
      answer: z.object({ member: listMember, list: targetList }),
    },
    ({ deps, programmeId, caller, params, body }) =>
      changeMember(
        deps,
        programmeId,
        caller,
        { listId: params.listId ?? "", starId: params.starId ?? "" },
        body,
      ),
  );
};

export const addListRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: ALL, access: "list.read", answer: z.object({ lists: z.array(targetList) }) },
    async ({ deps, programmeId, actor }) => ({
      lists: (await listLists(deps, programmeId)).map((list) => seenBy(actor, list)),
    }),
  );
  routes.add(
    {
      method: "post",
      path: ALL,
      access: "list.make",
      body: listCreateBody,
      status: 201,
      answer: z.object({ list: targetList, note: z.string().nullable() }),
    },
    async ({ deps, programmeId, caller, body }) => {
      const { listId, note } = await makeList(deps, programmeId, caller, body);
      return { list: await readList(deps, programmeId, listId), note };
    },
  );
  routes.add(
    { method: "get", path: ONE, access: "list.read", answer: oneList },
    async ({ deps, programmeId, actor, params }) => ({
      list: seenBy(actor, await readList(deps, programmeId, params.listId ?? "")),
    }),
  );
  routes.add(
    { method: "patch", path: ONE, access: "list.edit", body: listPatchBody, answer: oneList },
    async ({ deps, programmeId, caller, params, body }) => ({
      list: await changeList(deps, programmeId, caller, params.listId ?? "", body),
    }),
  );
  routes.add(
    { method: "delete", path: ONE, access: "list.make" },
    async ({ deps, programmeId, caller, params }) => {
      await deleteList(deps, programmeId, caller, params.listId ?? "");
    },
  );
  routes.add(
    {
      method: "post",
      path: `${ONE}/state`,
      access: "list.send-to-review",
      body: listStateBody,
      answer: oneList,
    },
    async ({ deps, programmeId, caller, params, body }) => ({
      list: await moveList(deps, programmeId, caller, params.listId ?? "", body),
    }),
  );
  routes.add(
    { method: "get", path: `${ONE}/sky`, access: "list.read", answer: z.object({ sky: listSky }) },
    async ({ deps, programmeId, params }) => ({ sky: await readSky(deps, programmeId, params.listId ?? "") }),
  );
  addMemberRoutes(routes);
};
