import type { EntityManager } from "typeorm";
import { ROLES, type Role } from "#shared/policy/roles.ts";
import { Member } from "../database/entities/member.entity.ts";
import { writeLine } from "../logbook/service.ts";

interface Named {
  id: string;
  name: string;
}

/** Each once, in the order of the roles' own list. */
export const inOrder = (roles: readonly Role[]): Role[] => ROLES.filter((role) => roles.includes(role));

export interface NewMember {
  programmeId: string;
  person: Named;
  roles: readonly Role[];
  by: Named | null;
  at: Date;
}

/** Makes someone a member; one who is a member already gains the roles. */
export const addMember = async (tx: EntityManager, member: NewMember): Promise<void> => {
  const key = { programmeId: member.programmeId, personId: member.person.id };
  const before = await tx.findOne(Member, { where: key, lock: { mode: "pessimistic_write" } });
  const roles = inOrder([...member.roles, ...((before?.roles ?? []) as Role[])]);
  await tx.save(Member, { ...key, roles, since: before?.since ?? member.at });
  await writeLine(tx, {
    programmeId: member.programmeId,
    person: member.by,
    action: before ? "member.edit" : "member.join",
    subject: { type: "member", id: member.person.id, name: member.person.name },
    before: before && { roles: before.roles },
    after: { roles },
    at: member.at,
  });
};
