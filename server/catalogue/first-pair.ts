import type { EntityManager } from "typeorm";

export interface InstrumentPair {
  cardVersionId: string;
  campaignVersionId: string;
}

/** The newest version of the thing whose name comes first. */
const firstByName = async (
  tx: EntityManager,
  programmeId: string,
  table: "instrument_card" | "campaign",
  version: string,
  root: string,
): Promise<string | undefined> => {
  const [row] = await tx.query<{ id: string }[]>(
    `SELECT v.${version} AS id FROM \`${table}\` v
     WHERE v.programme_id = ? AND NOT EXISTS
       (SELECT 1 FROM \`${table}\` newer WHERE newer.${root} = v.${root} AND newer.\`number\` > v.\`number\`)
     ORDER BY v.name, v.${version} LIMIT 1`,
    [programmeId],
  );
  return row && String(row.id);
};

/**
 * The card and campaign that the catalogue opens with, whose index an edition brings along. Those of other pairs are
 * built when someone first looks through them: with every card and campaign, one more would slow every import.
 */
export const firstPair = async (tx: EntityManager, programmeId: string): Promise<InstrumentPair | null> => {
  const cardVersionId = await firstByName(
    tx,
    programmeId,
    "instrument_card",
    "instrument_card_id",
    "instrument_id",
  );
  const campaignVersionId = await firstByName(
    tx,
    programmeId,
    "campaign",
    "campaign_version_id",
    "campaign_id",
  );
  return cardVersionId && campaignVersionId ? { cardVersionId, campaignVersionId } : null;
};
