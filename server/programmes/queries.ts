import type { EntityManager } from "typeorm";
import type { Programme as ProgrammeJson } from "#shared/api/programmes.ts";
import { Programme } from "../database/entities/programme.entity.ts";

type Counts = ProgrammeJson["counts"] & { stars: number };

/** How much there is of everything; things with versions count once. */
export const countsOf = async (tx: EntityManager, programme: Programme): Promise<Counts> => {
  const [row] = await tx.query<Record<string, string | number | null>[]>(
    `SELECT
       (SELECT COUNT(*) FROM extract WHERE programme_id = ?) AS extracts,
       (SELECT COUNT(DISTINCT COALESCE(instrument_id, instrument_card_id)) FROM instrument_card WHERE programme_id = ?)
         AS instruments,
       (SELECT COUNT(DISTINCT COALESCE(selection_id, selection_version_id)) FROM selection WHERE programme_id = ?)
         AS selections,
       (SELECT COUNT(DISTINCT COALESCE(merit_id, merit_version_id)) FROM merit WHERE programme_id = ?) AS merits,
       (SELECT COUNT(*) FROM target_list WHERE programme_id = ?) AS lists,
       (SELECT COUNT(*) FROM member WHERE programme_id = ?) AS members,
       (SELECT stars FROM catalogue_edition WHERE programme_id = ? AND number = ?) AS stars`,
    [...Array<string>(7).fill(programme.id), programme.edition],
  );
  const count = (key: string): number => Number(row?.[key] ?? 0);
  return {
    extracts: count("extracts"),
    instruments: count("instruments"),
    selections: count("selections"),
    merits: count("merits"),
    lists: count("lists"),
    members: count("members"),
    stars: count("stars"),
  };
};

export const lockProgramme = (tx: EntityManager, id: string): Promise<Programme | null> =>
  tx.findOne(Programme, { where: { id }, lock: { mode: "pessimistic_write" } });
