import type { EntityManager } from "typeorm";
import type { Role } from "#shared/policy/roles.ts";
import { OneTimeLink } from "../database/entities/one-time-link.entity.ts";

export interface MemberRow {
  personId: string;
  name: string;
  email: string;
  isActive: boolean;
  roles: Role[];
  since: Date;
}

/** Members with their names, by name. `lock` holds all of the programme's memberships until the transaction ends. */
export const membersOf = async (
  tx: EntityManager,
  programmeId: string,
  { lock = false } = {},
): Promise<MemberRow[]> => {
  const rows = await tx.query<(Omit<MemberRow, "isActive"> & { isActive: number })[]>(
    `SELECT m.person_id AS personId, p.name, p.email, p.is_active AS isActive, m.roles, m.since
     FROM member m JOIN person p ON p.person_id = m.person_id
     WHERE m.programme_id = ? ORDER BY p.name, p.person_id ${lock ? "FOR UPDATE" : ""}`,
    [programmeId],
  );
  return rows.map((row) => ({ ...row, personId: String(row.personId), isActive: Boolean(row.isActive) }));
};

export const invitationsOf = (tx: EntityManager, programmeId: string): Promise<OneTimeLink[]> =>
  tx.find(OneTimeLink, { where: { programmeId, purpose: "invitation" }, order: { id: "DESC" }, take: 200 });

export const lockInvitation = (
  tx: EntityManager,
  programmeId: string,
  id: string,
): Promise<OneTimeLink | null> =>
  tx.findOne(OneTimeLink, {
    where: { id, programmeId, purpose: "invitation" },
    lock: { mode: "pessimistic_write" },
  });
