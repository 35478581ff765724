import { queryOptions } from "@tanstack/react-query";
import type { Campaign, Card } from "#shared/api/instruments.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string, what: "instruments" | "campaigns"): string =>
  `/programmes/${programmeId}/${what}`;

export const cardsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "instruments"),
    queryFn: async () => (await get<{ cards: Card[] }>(base(programmeId, "instruments"))).cards,
  });

export const campaignsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "campaigns"),
    queryFn: async () => (await get<{ campaigns: Campaign[] }>(base(programmeId, "campaigns"))).campaigns,
  });

type CardContent = Pick<Card, "name" | "settings"> & { source: string };
type CampaignContent = Pick<Campaign, "name" | "settings">;

export const useMakeCard = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: CardContent) =>
    request<{ card: Card }>("POST", base(programmeId, "instruments"), body),
  );
export const useSaveCard = (programmeId: string) =>
  useProgrammeChange(programmeId, ({ id, ...body }: CardContent & { id: string; number: number }) =>
    request<{ card: Card }>("PUT", `${base(programmeId, "instruments")}/${id}`, body),
  );
export const useMakeCampaign = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: CampaignContent) =>
    request<{ campaign: Campaign }>("POST", base(programmeId, "campaigns"), body),
  );
export const useSaveCampaign = (programmeId: string) =>
  useProgrammeChange(programmeId, ({ id, ...body }: CampaignContent & { id: string; number: number }) =>
    request<{ campaign: Campaign }>("PUT", `${base(programmeId, "campaigns")}/${id}`, body),
  );
