import type { EntityManager } from "typeorm";
import { ListMember } from "../database/entities/list-member.entity.ts";
import { TargetList } from "../database/entities/target-list.entity.ts";
import { JOINED_RECIPE, type JoinedRecipe } from "../recipes/queries.ts";

/** A list with the names of what it was made from and the count of its members by state. */
export interface ListRecord extends JoinedRecipe {
  target_list_id: string;
  name: string;
  note: string;
  state: TargetList["state"];
  catalogue_edition: number;
  view_params: string;
  fingerprint: string;
  made_at: Date;
  version: number;
  made_by: string;
  maker: string | null;
  is_invented: number;
  instrument_card_id: string | null;
  card_name: string | null;
  card_number: number | null;
  campaign_version_id: string | null;
  campaign_name: string | null;
  campaign_number: number | null;
  merit_version_id: string | null;
  merit_name: string | null;
  merit_number: number | null;
  merit_terms: { label: string }[] | string | null;
  stars_in: string | number;
  stars_reserve: string | number;
  stars_held: string | number;
  stars_out: string | number;
}

const countOf = (state: string): string =>
  `(SELECT COUNT(*) FROM list_member m WHERE m.target_list_id = l.target_list_id AND m.state = '${state}') AS stars_${state}`;

const SELECT_LISTS = `
  SELECT l.target_list_id, l.name, l.note, l.state, l.catalogue_edition, l.view_params, l.fingerprint, l.made_at,
    l.version, l.made_by, person.name AS maker, programme.is_invented, ${JOINED_RECIPE},
    l.instrument_card_id, card.name AS card_name, card.\`number\` AS card_number,
    l.campaign_version_id, campaign.name AS campaign_name, campaign.\`number\` AS campaign_number,
    l.merit_version_id, merit.name AS merit_name, merit.\`number\` AS merit_number, merit.terms AS merit_terms,
    ${["in", "reserve", "held", "out"].map(countOf).join(", ")}
  FROM target_list l
  JOIN programme ON programme.programme_id = l.programme_id
  JOIN recipe r ON r.recipe_version_id = l.recipe_version_id
  LEFT JOIN person ON person.person_id = l.made_by
  LEFT JOIN instrument_card card ON card.instrument_card_id = l.instrument_card_id
  LEFT JOIN campaign ON campaign.campaign_version_id = l.campaign_version_id
  LEFT JOIN merit ON merit.merit_version_id = l.merit_version_id
  WHERE l.programme_id = ?`;

export const findLists = (tx: EntityManager, programmeId: string): Promise<ListRecord[]> =>
  tx.query(`${SELECT_LISTS} ORDER BY l.made_at DESC, l.target_list_id DESC`, [programmeId]);

export const findList = async (
  tx: EntityManager,
  programmeId: string,
  listId: string,
): Promise<ListRecord | undefined> => {
  const rows: ListRecord[] = await tx.query(`${SELECT_LISTS} AND l.target_list_id = ?`, [
    programmeId,
    listId,
  ]);
  return rows[0];
};

/** The list itself, held until the transaction ends. */
export const lockList = (
  tx: EntityManager,
  programmeId: string,
  listId: string,
): Promise<TargetList | null> =>
  tx.findOne(TargetList, { where: { id: listId, programmeId }, lock: { mode: "pessimistic_write" } });

export const findMembers = (
  tx: EntityManager,
  listId: string,
  offset: number,
  limit: number,
): Promise<ListMember[]> =>
  tx.find(ListMember, { where: { listId }, order: { place: "ASC" }, skip: offset, take: limit });

/** Members from a place on, for files: a window by key, so that each read costs the same. */
export const findMembersAfter = (
  tx: EntityManager,
  listId: string,
  place: number,
  limit: number,
): Promise<ListMember[]> =>
  tx
    .createQueryBuilder(ListMember, "m")
    .where("m.listId = :listId AND m.place > :place", { listId, place })
    .orderBy("m.place")
    .limit(limit)
    .getMany();

/** Position of each member as it was put there, in order of place; null where it has none. */
export const findPositions = (
  tx: EntityManager,
  listId: string,
): Promise<{ ra: number | null; declination: number | null }[]> =>
  tx.query(
    `SELECT CAST(JSON_VALUE(m.row, '$.values.ra') AS DOUBLE) AS ra,
        CAST(JSON_VALUE(m.row, '$.values.dec') AS DOUBLE) AS declination
      FROM list_member m WHERE m.target_list_id = ? ORDER BY m.place`,
    [listId],
  );

export const findMember = (tx: EntityManager, listId: string, starId: string): Promise<ListMember | null> =>
  tx.findOne(ListMember, { where: { listId, starId }, lock: { mode: "pessimistic_write" } });
