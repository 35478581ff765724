import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import { CampaignVersion } from "../database/entities/campaign.entity.ts";
import { InstrumentCardVersion } from "../database/entities/instrument-card.entity.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";

/** Settings were checked when they were saved, and a version never changes. */
export const cardSettings = async (deps: Deps, programmeId: string, id: string): Promise<CardSettings> => {
  const card = await deps.db.manager.findOneBy(InstrumentCardVersion, { id, programmeId });
  if (!card) throw notFound("This instrument card");
  return card.settings as CardSettings;
};

export const campaignSettings = async (
  deps: Deps,
  programmeId: string,
  id: string,
): Promise<CampaignSettings> => {
  const campaign = await deps.db.manager.findOneBy(CampaignVersion, { id, programmeId });
  if (!campaign) throw notFound("This campaign");
  return campaign.settings as CampaignSettings;
};
