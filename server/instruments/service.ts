import type { z } from "zod";
import type { campaignBody, cardBody } from "#shared/api/instruments.ts";
import { CampaignVersion } from "../database/entities/campaign.entity.ts";
import { InstrumentCardVersion } from "../database/entities/instrument-card.entity.ts";
import type { Deps } from "../deps.ts";
import {
  allVersions,
  type Editor,
  type Kind,
  newestVersions,
  saveFirst,
  saveNext,
  versionById,
} from "../versions/versioned.ts";
import { presentCampaign, presentCard } from "./present.ts";

const CARDS: Kind<InstrumentCardVersion> = {
  entity: InstrumentCardVersion,
  table: "instrument_card",
  rootKey: "instrumentId",
  rootColumn: "instrument_id",
  idColumn: "instrument_card_id",
  word: "instrument card",
  subject: "instrument-card",
};

const CAMPAIGNS: Kind<CampaignVersion> = {
  entity: CampaignVersion,
  table: "campaign",
  rootKey: "campaignId",
  rootColumn: "campaign_id",
  idColumn: "campaign_version_id",
  word: "campaign",
  subject: "campaign",
};

type CardInput = z.output<typeof cardBody>;
type CampaignInput = z.output<typeof campaignBody>;

export const listCards = async (deps: Deps, programmeId: string) =>
  (await newestVersions(deps, CARDS, programmeId)).map(presentCard);

export const readCard = async (deps: Deps, programmeId: string, versionId: string) =>
  presentCard(await versionById(deps, CARDS, programmeId, versionId));

export const listCardVersions = async (deps: Deps, programmeId: string, id: string) =>
  (await allVersions(deps, CARDS, programmeId, id)).map(presentCard);

export const makeCard = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  { name, source, settings }: CardInput,
) => presentCard(await saveFirst(deps, CARDS, programmeId, editor, { name, source, settings }));

export const saveCard = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  id: string,
  number: number,
  { name, source, settings }: CardInput,
) => presentCard(await saveNext(deps, CARDS, programmeId, editor, id, number, { name, source, settings }));

export const listCampaigns = async (deps: Deps, programmeId: string) =>
  (await newestVersions(deps, CAMPAIGNS, programmeId)).map(presentCampaign);

export const readCampaign = async (deps: Deps, programmeId: string, versionId: string) =>
  presentCampaign(await versionById(deps, CAMPAIGNS, programmeId, versionId));

export const listCampaignVersions = async (deps: Deps, programmeId: string, id: string) =>
  (await allVersions(deps, CAMPAIGNS, programmeId, id)).map(presentCampaign);

export const makeCampaign = async (deps: Deps, programmeId: string, editor: Editor, content: CampaignInput) =>
  presentCampaign(await saveFirst(deps, CAMPAIGNS, programmeId, editor, content));

export const saveCampaign = async (
  deps: Deps,
  programmeId: string,
  editor: Editor,
  id: string,
  number: number,
  content: CampaignInput,
) => presentCampaign(await saveNext(deps, CAMPAIGNS, programmeId, editor, id, number, content));
