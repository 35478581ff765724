import type { EntityManager } from "typeorm";
import type { z } from "zod";
import type {
  TargetList as ListJson,
  listPatchBody,
  listStateBody,
  ListMember as MemberJson,
  memberPatchBody,
} from "#shared/api/lists.ts";
import { ListMember } from "../database/entities/list-member.entity.ts";
import { TargetList } from "../database/entities/target-list.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { conflict, notFound } from "../errors.ts";
import { writeLine } from "../logbook/service.ts";
import { presentList, presentMember } from "./present.ts";
import { findList, findLists, findMember, findMembers, lockList } from "./queries.ts";

interface Editor {
  id: string;
  name: string;
}

const STATE_WORDS: Record<TargetList["state"], string> = {
  draft: "a draft",
  "in-review": "in review",
  agreed: "agreed",
  issued: "issued",
  superseded: "superseded",
  withdrawn: "withdrawn",
};

/** The moves there are; agreeing and issuing come with signatures. */
const MOVES: Partial<Record<TargetList["state"], readonly TargetList["state"][]>> = {
  draft: ["in-review"],
  "in-review": ["draft"],
};

const thisList = () => notFound("This target list");

const subjectOf = (list: TargetList) => ({ type: "list", id: list.id, name: list.name });

/** The list as the editor saw it, or what changed meanwhile. */
const lockAsSeen = async (
  tx: EntityManager,
  programmeId: string,
  listId: string,
  version: number,
): Promise<TargetList> => {
  const list = await lockList(tx, programmeId, listId);
  if (!list) throw thisList();
  if (list.version !== version)
    throw conflict("changed-meanwhile", "Someone changed this list after you opened it.", {
      hint: "Look at what is there now, and make your change again if it is still wanted.",
      details: { version: list.version, name: list.name, state: list.state },
    });
  return list;
};

const requireOpen = (list: TargetList): void => {
  if (list.state === "draft" || list.state === "in-review") return;
  throw conflict("list-closed", `This list is ${STATE_WORDS[list.state]} and does not change any more.`, {
    hint: "Make a new list from the same view.",
  });
};

export const listLists = async (deps: Deps, programmeId: string): Promise<ListJson[]> =>
  (await findLists(deps.db.manager, programmeId)).map(presentList);

export const readList = async (deps: Deps, programmeId: string, listId: string): Promise<ListJson> => {
  const row = await findList(deps.db.manager, programmeId, listId);
  if (!row) throw thisList();
  return presentList(row);
};

export const changeList = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  listId: string,
  { version, ...change }: z.output<typeof listPatchBody>,
): Promise<ListJson> => {
  await inTransaction(deps.db, async (tx) => {
    const list = await lockAsSeen(tx, programmeId, listId, version);
    requireOpen(list);
    const before = { name: list.name, note: list.note };
    const after = { name: change.name ?? before.name, note: change.note ?? before.note };
    await tx.save(TargetList, tx.merge(TargetList, list, after));
    await writeLine(tx, {
      programmeId,
      person: editor,
      action: "list.edit",
      subject: subjectOf(list),
      before,
      after,
      at: deps.now(),
    });
  });
  return readList(deps, programmeId, listId);
};

export const moveList = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  listId: string,
  { version, state }: z.output<typeof listStateBody>,
): Promise<ListJson> => {
  await inTransaction(deps.db, async (tx) => {
    const list = await lockAsSeen(tx, programmeId, listId, version);
    if (!MOVES[list.state]?.includes(state))
      throw conflict(
        "no-such-move",
        `A list that is ${STATE_WORDS[list.state]} cannot become ${STATE_WORDS[state]}.`,
        {
          hint: "Look at the states above the list for what can come next.",
        },
      );
    const before = { state: list.state };
    await tx.save(TargetList, tx.merge(TargetList, list, { state }));
    await writeLine(tx, {
      programmeId,
      person: editor,
      action: "list.move",
      subject: subjectOf(list),
      before,
      after: { state },
      at: deps.now(),
    });
  });
  return readList(deps, programmeId, listId);
};

/** Deletes a draft; what was ever in review stays. */
export const deleteList = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  listId: string,
): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    const list = await lockList(tx, programmeId, listId);
    if (!list) throw thisList();
    if (list.state !== "draft")
      throw conflict("not-a-draft", `This list is ${STATE_WORDS[list.state]}; only a draft can be deleted.`, {
        hint: "Take it back to draft first.",
      });
    await tx.delete(ListMember, { listId });
    await tx.delete(TargetList, { id: listId });
    await writeLine(tx, {
      programmeId,
      person: editor,
      action: "list.delete",
      subject: subjectOf(list),
      before: { name: list.name, fingerprint: list.fingerprint },
      at: deps.now(),
    });
  });
};

export const readMembers = async (
  deps: Deps,
  programmeId: string,
  listId: string,
  { offset, limit }: { offset: number; limit: number },
): Promise<{ members: MemberJson[]; count: number }> => {
  const list = await readList(deps, programmeId, listId);
  const members = await findMembers(deps.db.manager, listId, offset, limit);
  return { members: members.map(presentMember), count: list.stars };
};

/** Sets a star In, Reserve, Held or Out; the list's version guards against setting it over someone else's word. */
export const changeMember = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  { listId, starId }: { listId: string; starId: string },
  { version, state, reason }: z.output<typeof memberPatchBody>,
): Promise<{ member: MemberJson; list: ListJson }> => {
  const member = await inTransaction(deps.db, async (tx) => {
    const list = await lockAsSeen(tx, programmeId, listId, version);
    requireOpen(list);
    const found = await findMember(tx, listId, starId);
    if (!found) throw notFound("This star of the list");
    const before = { state: found.state, reason: found.reason };
    await tx.update(ListMember, { listId, starId }, { state, reason });
    // Saving moves the list's version on, so that a second editor is told.
    await tx.query("UPDATE target_list SET version = version + 1 WHERE target_list_id = ?", [listId]);
    await writeLine(tx, {
      programmeId,
      person: editor,
      action: "list.set-star",
      subject: subjectOf(list),
      before: { star: presentMember(found).designation, ...before },
      after: { star: presentMember(found).designation, state, reason },
      at: deps.now(),
    });
    return Object.assign(found, { state, reason });
  });
  return { member: presentMember(member), list: await readList(deps, programmeId, listId) };
};
