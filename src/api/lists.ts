import { queryOptions, useMutation, useQueryClient } from "@tanstack/react-query";
import type { ListMember, ListSky, MEMBER_STATES, TargetList } from "#shared/api/lists.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/lists`;

export const listsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "lists"),
    queryFn: async () => (await get<{ lists: TargetList[] }>(base(programmeId))).lists,
  });

export const listOptions = (programmeId: string, listId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "lists", listId),
    queryFn: async () => (await get<{ list: TargetList }>(`${base(programmeId)}/${listId}`)).list,
  });

export const membersKey = (programmeId: string, listId: string) =>
  programmeKeys.part(programmeId, "lists", listId, "members");

export const readListMembers = async (
  programmeId: string,
  listId: string,
  offset: number,
  limit: number,
  signal?: AbortSignal,
): Promise<ListMember[]> =>
  (
    await get<{ members: ListMember[] }>(
      `${base(programmeId)}/${listId}/members?offset=${offset}&limit=${limit}`,
      signal,
    )
  ).members;

/** Members neither come nor go, so the picture of where they are stays. */
export const listSkyOptions = (programmeId: string, listId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "lists", listId, "sky"),
    queryFn: async () => (await get<{ sky: ListSky }>(`${base(programmeId)}/${listId}/sky`)).sky,
    staleTime: Number.POSITIVE_INFINITY,
  });

export const exportPath = (programmeId: string, listId: string, format: "csv" | "ecsv"): string =>
  `/api${base(programmeId)}/${listId}/export?format=${format}`;

export const useMakeList = (programmeId: string) =>
  useProgrammeChange(programmeId, (body: { name: string; note: string; view: string; first: number }) =>
    request<{ list: TargetList; note: string | null }>("POST", base(programmeId), body),
  );
export const useEditList = (programmeId: string, listId: string) =>
  useProgrammeChange(programmeId, (body: { name?: string; note?: string; version: number }) =>
    request<{ list: TargetList }>("PATCH", `${base(programmeId)}/${listId}`, body),
  );
export const useMoveList = (programmeId: string, listId: string) =>
  useProgrammeChange(programmeId, (body: { state: "draft" | "in-review"; version: number }) =>
    request<{ list: TargetList }>("POST", `${base(programmeId)}/${listId}/state`, body),
  );
/** Deletes a draft; `away` leads the person elsewhere before the list is forgotten, or its page would ask for it again. */
export const useDeleteList = (programmeId: string, listId: string, away: () => Promise<void> | void) => {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => request<void>("DELETE", `${base(programmeId)}/${listId}`),
    onSuccess: async () => {
      await away();
      client.removeQueries({ queryKey: programmeKeys.part(programmeId, "lists", listId) });
      await client.invalidateQueries({ queryKey: programmeKeys.all(programmeId) });
    },
  });
};
export const useSetMember = (programmeId: string, listId: string) =>
  useProgrammeChange(
    programmeId,
    ({
      starId,
      ...body
    }: {
      starId: string;
      state: (typeof MEMBER_STATES)[number];
      reason: string;
      version: number;
    }) =>
      request<{ member: ListMember; list: TargetList }>(
        "PATCH",
        `${base(programmeId)}/${listId}/members/${starId}`,
        body,
      ),
  );
