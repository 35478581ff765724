import { queryOptions } from "@tanstack/react-query";
import type { NamedPlan, ReadingPlan } from "#shared/api/extracts.ts";
import { get, request } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/reading-plans`;

/** Reading plans that were given a name, each as it was last saved. */
export const namedPlansOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "reading-plans"),
    queryFn: async () => (await get<{ plans: NamedPlan[] }>(base(programmeId))).plans,
  });

/** Saves a plan under a new name, or as a further version of the one with that id. */
export const useSaveNamedPlan = (programmeId: string) =>
  useProgrammeChange(
    programmeId,
    async ({ id, ...body }: { id?: string; name: string; plan: ReadingPlan }) =>
      id === undefined
        ? (await request<{ plan: NamedPlan }>("POST", base(programmeId), body)).plan
        : (await request<{ plan: NamedPlan }>("PUT", `${base(programmeId)}/${id}`, body)).plan,
  );
