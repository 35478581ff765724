import { z } from "zod";
import {
  campaign,
  campaignBody,
  campaignSaveBody,
  card,
  cardBody,
  cardSaveBody,
} from "#shared/api/instruments.ts";
import type { Routes } from "../http/route.ts";
import {
  listCampaigns,
  listCampaignVersions,
  listCards,
  listCardVersions,
  makeCampaign,
  makeCard,
  readCampaign,
  readCard,
  saveCampaign,
  saveCard,
} from "./service.ts";

const CARDS = "/programmes/:programmeId/instruments";
const CAMPAIGNS = "/programmes/:programmeId/campaigns";
const oneCard = z.object({ card });
const cards = z.object({ cards: z.array(card) });
const oneCampaign = z.object({ campaign });
const campaigns = z.object({ campaigns: z.array(campaign) });

const addCardRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: CARDS, access: "instrument.read", answer: cards },
    async ({ deps, programmeId }) => ({ cards: await listCards(deps, programmeId) }),
  );
  routes.add(
    { method: "get", path: `${CARDS}/:cardId/versions`, access: "instrument.read", answer: cards },
    async ({ deps, programmeId, params }) => ({
      cards: await listCardVersions(deps, programmeId, params.cardId ?? ""),
    }),
  );
  routes.add(
    { method: "get", path: `${CARDS}/versions/:versionId`, access: "instrument.read", answer: oneCard },
    async ({ deps, programmeId, params }) => ({
      card: await readCard(deps, programmeId, params.versionId ?? ""),
    }),
  );
  routes.add(
    { method: "post", path: CARDS, access: "instrument.edit", body: cardBody, status: 201, answer: oneCard },
    async ({ deps, programmeId, caller, body }) => ({
      card: await makeCard(deps, programmeId, caller, body),
    }),
  );
  routes.add(
    {
      method: "put",
      path: `${CARDS}/:cardId`,
      access: "instrument.edit",
      body: cardSaveBody,
      answer: oneCard,
    },
    async ({ deps, programmeId, caller, params, body: { number, ...content } }) => ({
      card: await saveCard(deps, programmeId, caller, params.cardId ?? "", number, content),
    }),
  );
};

const addCampaignRoutes = (routes: Routes): void => {
  routes.add(
    { method: "get", path: CAMPAIGNS, access: "instrument.read", answer: campaigns },
    async ({ deps, programmeId }) => ({ campaigns: await listCampaigns(deps, programmeId) }),
  );
  routes.add(
    {
      method: "get",
      path: `${CAMPAIGNS}/:campaignId/versions`,
      access: "instrument.read",
      answer: campaigns,
    },
    async ({ deps, programmeId, params }) => ({
      campaigns: await listCampaignVersions(deps, programmeId, params.campaignId ?? ""),
    }),
  );
  routes.add(
    {
      method: "get",
      path: `${CAMPAIGNS}/versions/:versionId`,
      access: "instrument.read",
      answer: oneCampaign,
    },
    async ({ deps, programmeId, params }) => ({
      campaign: await readCampaign(deps, programmeId, params.versionId ?? ""),
    }),
  );
  routes.add(
    {
      method: "post",
      path: CAMPAIGNS,
      access: "instrument.edit",
      body: campaignBody,
      status: 201,
      answer: oneCampaign,
    },
    async ({ deps, programmeId, caller, body }) => ({
      campaign: await makeCampaign(deps, programmeId, caller, body),
    }),
  );
  routes.add(
    {
      method: "put",
      path: `${CAMPAIGNS}/:campaignId`,
      access: "instrument.edit",
      body: campaignSaveBody,
      answer: oneCampaign,
    },
    async ({ deps, programmeId, caller, params, body: { number, ...content } }) => ({
      campaign: await saveCampaign(deps, programmeId, caller, params.campaignId ?? "", number, content),
    }),
  );
};

export const addInstrumentRoutes = (routes: Routes): void => {
  addCardRoutes(routes);
  addCampaignRoutes(routes);
};
