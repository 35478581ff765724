import type { EntityManager } from "typeorm";

/** More pairs than this are built when someone first looks at them. */
const MOST_PAIRS = 6;

export interface InstrumentPair {
  cardVersionId: string;
  campaignVersionId: string;
}

/** The newest version of each instrument card with the newest of each campaign. */
export const instrumentPairs = async (tx: EntityManager, programmeId: string): Promise<InstrumentPair[]> => {
  const cards = await tx.query<{ id: string }[]>(
    `SELECT MAX(instrument_card_id) AS id FROM instrument_card WHERE programme_id = ?
     GROUP BY COALESCE(instrument_id, instrument_card_id) ORDER BY id`,
    [programmeId],
  );
  const campaigns = await tx.query<{ id: string }[]>(
    `SELECT MAX(campaign_version_id) AS id FROM campaign WHERE programme_id = ?
     GROUP BY COALESCE(campaign_id, campaign_version_id) ORDER BY id`,
    [programmeId],
  );
  return cards
    .flatMap((card) =>
      campaigns.map((campaign) => ({
        cardVersionId: String(card.id),
        campaignVersionId: String(campaign.id),
      })),
    )
    .slice(0, MOST_PAIRS);
};
