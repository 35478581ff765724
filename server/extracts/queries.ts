import type { EntityManager } from "typeorm";
import { Extract } from "../database/entities/extract.entity.ts";

export const extractsOf = (manager: EntityManager, programmeId: string): Promise<Extract[]> =>
  manager.find(Extract, { where: { programmeId }, order: { number: "DESC" } });

export const findExtractRow = (
  manager: EntityManager,
  programmeId: string,
  id: string,
): Promise<Extract | null> =>
  /^\d{1,19}$/.test(id) ? manager.findOneBy(Extract, { id, programmeId }) : Promise.resolve(null);

export const lockExtract = (tx: EntityManager, programmeId: string, id: string): Promise<Extract | null> =>
  tx.findOne(Extract, { where: { id, programmeId }, lock: { mode: "pessimistic_write" } });

/** Locks the programme, so that two people do not get the same number. */
export const nextNumber = async (tx: EntityManager, programmeId: string): Promise<number> => {
  await tx.query("SELECT programme_id FROM programme WHERE programme_id = ? FOR UPDATE", [programmeId]);
  const [row] = await tx.query<{ most: number | null }[]>(
    "SELECT MAX(number) AS most FROM extract WHERE programme_id = ?",
    [programmeId],
  );
  return (row?.most ?? 0) + 1;
};

export const namesOf = async (manager: EntityManager, ids: string[]): Promise<Map<string, string>> => {
  if (ids.length === 0) return new Map();
  const rows = await manager.query<{ id: string; name: string }[]>(
    "SELECT person_id AS id, name FROM person WHERE person_id IN (?)",
    [ids],
  );
  return new Map(rows.map((r) => [String(r.id), r.name]));
};
