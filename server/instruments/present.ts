import type { Campaign, Card } from "#shared/api/instruments.ts";
import type { CampaignVersion } from "../database/entities/campaign.entity.ts";
import type { InstrumentCardVersion } from "../database/entities/instrument-card.entity.ts";
import type { Saved } from "../versions/versioned.ts";

export const presentCard = ({ row, savedBy }: Saved<InstrumentCardVersion>): Card => ({
  id: row.instrumentId ?? row.id,
  versionId: row.id,
  number: row.number,
  name: row.name,
  source: row.source,
  isVerified: row.source.trim() !== "",
  settings: row.settings as Card["settings"],
  savedBy,
  savedAt: row.savedAt.toISOString(),
});

export const presentCampaign = ({ row, savedBy }: Saved<CampaignVersion>): Campaign => ({
  id: row.campaignId ?? row.id,
  versionId: row.id,
  number: row.number,
  name: row.name,
  settings: row.settings as Campaign["settings"],
  savedBy,
  savedAt: row.savedAt.toISOString(),
});
