import type { Role } from "#shared/policy/roles.ts";
import { Member } from "../database/entities/member.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { type AppError, conflict, notFound } from "../errors.ts";
import type { Caller } from "../http/route.ts";
import { writeLine } from "../logbook/service.ts";
import { inOrder } from "./membership.ts";
import { type MemberRow, membersOf } from "./queries.ts";

export const listMembers = (deps: Deps, programmeId: string): Promise<MemberRow[]> =>
  membersOf(deps.db.manager, programmeId);

const lastAdministrator = (name: string): AppError =>
  conflict(
    "last-administrator",
    `${name} is the last administrator of this programme, and without one nobody could let people in.`,
    { hint: "Give the role Administrator to someone else first." },
  );

const isAdministrator = (member: MemberRow): boolean =>
  member.isActive && member.roles.includes("administrator");

/** The member at hand among all, locked; refuses what would leave the programme without an administrator. */
const findChanging = (members: MemberRow[], personId: string, staysAdministrator: boolean): MemberRow => {
  const member = members.find((each) => each.personId === personId);
  if (!member) throw notFound("This member");
  const others = members.filter((each) => each !== member && isAdministrator(each));
  if (isAdministrator(member) && !staysAdministrator && others.length === 0)
    throw lastAdministrator(member.name);
  return member;
};

export const changeRoles = async (
  deps: Deps,
  caller: Caller,
  programmeId: string,
  personId: string,
  wanted: readonly Role[],
): Promise<MemberRow> => {
  const roles = inOrder(wanted);
  return inTransaction(deps.db, async (tx) => {
    const members = await membersOf(tx, programmeId, { lock: true });
    const before = findChanging(members, personId, roles.includes("administrator"));
    await tx.update(Member, { programmeId, personId }, { roles });
    await writeLine(tx, {
      programmeId,
      person: caller,
      action: "member.edit",
      subject: { type: "member", id: personId, name: before.name },
      before: { roles: before.roles },
      after: { roles },
      at: deps.now(),
    });
    return { ...before, roles };
  });
};

/** Takes someone out of the programme, or lets one leave it. What they did stays in the logbook by name. */
export const removeMember = async (
  deps: Deps,
  caller: Caller,
  programmeId: string,
  personId: string,
): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    const members = await membersOf(tx, programmeId, { lock: true });
    const before = findChanging(members, personId, false);
    await tx.delete(Member, { programmeId, personId });
    await writeLine(tx, {
      programmeId,
      person: caller,
      action: personId === caller.id ? "member.leave" : "member.remove",
      subject: { type: "member", id: personId, name: before.name },
      before: { roles: before.roles },
      at: deps.now(),
    });
  });
};
