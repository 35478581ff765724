import { queryOptions } from "@tanstack/react-query";
import type { Selection } from "#shared/api/selections.ts";
import type { Cut } from "#shared/catalogue/view.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/selections`;

export const selectionsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "selections"),
    queryFn: async () => (await get<{ selections: Selection[] }>(base(programmeId))).selections,
  });

interface Content {
  name: string;
  note: string;
  cuts: readonly Cut[];
}

export const useMakeSelection = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: Content) =>
    request<{ selection: Selection }>("POST", base(programmeId), body),
  );

export const useSaveSelection = (programmeId: string) =>
  useProgrammeChange(programmeId, ({ id, ...body }: Content & { id: string; number: number }) =>
    request<{ selection: Selection }>("PUT", `${base(programmeId)}/${id}`, body),
  );
