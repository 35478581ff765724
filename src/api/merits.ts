import { queryOptions } from "@tanstack/react-query";
import type { Merit, Term } from "#shared/api/merits.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/merits`;

export const meritsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "merits"),
    queryFn: async () => (await get<{ merits: Merit[] }>(base(programmeId))).merits,
  });

interface Content {
  name: string;
  note: string;
  terms: Term[];
}

export const useMakeMerit = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: Content) =>
    request<{ merit: Merit }>("POST", base(programmeId), body),
  );
export const useSaveMerit = (programmeId: string) =>
  useProgrammeChange(programmeId, ({ id, ...body }: Content & { id: string; number: number }) =>
    request<{ merit: Merit }>("PUT", `${base(programmeId)}/${id}`, body),
  );
