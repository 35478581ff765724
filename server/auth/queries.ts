import type { EntityManager } from "typeorm";
import type { Role } from "#shared/policy/roles.ts";
import { Person } from "../database/entities/person.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";

export interface OwnProgramme {
  id: string;
  name: string;
  isInvented: boolean;
  roles: Role[];
}

/** The programmes a person is a member of, by name. */
export const programmesOf = async (tx: EntityManager, personId: string): Promise<OwnProgramme[]> => {
  const rows = await tx.query<{ id: string; name: string; isInvented: number; roles: Role[] }[]>(
    `SELECT p.programme_id AS id, p.name, p.is_invented AS isInvented, m.roles
     FROM member m JOIN programme p ON p.programme_id = m.programme_id
     WHERE m.person_id = ? ORDER BY p.name, p.programme_id`,
    [personId],
  );
  return rows.map((row) => ({ ...row, id: String(row.id), isInvented: Boolean(row.isInvented) }));
};

export const programmeName = async (
  tx: EntityManager,
  programmeId: string | null,
): Promise<string | null> => {
  if (programmeId === null) return null;
  return (await tx.findOneBy(Programme, { id: programmeId }))?.name ?? null;
};

export const personByEmail = (tx: EntityManager, email: string): Promise<Person | null> =>
  tx.findOneBy(Person, { email });

/** Locked until the transaction ends, so that two changes of one person follow each other. */
export const lockPerson = (tx: EntityManager, id: string): Promise<Person | null> =>
  tx.findOne(Person, { where: { id }, lock: { mode: "pessimistic_write" } });
