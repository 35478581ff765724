import { queryOptions, useQueryClient } from "@tanstack/react-query";
import type { ColumnHealth, Extract, ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import type { Job } from "#shared/api/jobs.ts";
import { get, request, sendFile } from "./client.ts";
import { programmeKeys, useProgrammeChange } from "./programmes.ts";

const base = (programmeId: string): string => `/programmes/${programmeId}/extracts`;
const one = (programmeId: string, id: string): string => `${base(programmeId)}/${id}`;

/** An extract, and while its plan is open what its file looks like. */
export interface ExtractShown {
  extract: Extract;
  preview: ExtractPreview | null;
}

export const extractsOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "extracts"),
    queryFn: async () => (await get<{ extracts: Extract[] }>(base(programmeId))).extracts,
  });

export const readExtract = (programmeId: string, id: string): Promise<ExtractShown> =>
  get<ExtractShown>(one(programmeId, id));

export const extractOptions = (programmeId: string, id: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "extract", id),
    queryFn: () => readExtract(programmeId, id),
  });

/** What the committed rows of an extract hold, column by column. */
export const healthOptions = (programmeId: string, id: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "extract", id, "health"),
    queryFn: async () => (await get<{ columns: ColumnHealth[] }>(`${one(programmeId, id)}/health`)).columns,
  });

/** Addresses of files that the browser fetches itself. */
export const originalAddress = (programmeId: string, id: string): string =>
  `/api${one(programmeId, id)}/original`;
export const companionAddress = (programmeId: string, id: string): string =>
  `/api${one(programmeId, id)}/companion`;
export const refusedAddress = (programmeId: string, id: string): string =>
  `/api${one(programmeId, id)}/refused`;

export interface NewExtract {
  name: string;
  fileName: string;
  bytes: number;
  origin: string;
}

export const makeExtract = async (programmeId: string, body: NewExtract): Promise<Extract> =>
  (await request<{ extract: Extract }>("POST", base(programmeId), body)).extract;

/** Sends one piece of the file; after the last one the preview is there. */
export const sendPiece = (
  programmeId: string,
  id: string,
  { offset, piece }: { offset: number; piece: Blob },
  onProgress: (sent: number) => void,
  signal: AbortSignal,
): Promise<ExtractShown> =>
  sendFile<ExtractShown>(`${one(programmeId, id)}/original?offset=${offset}`, piece, onProgress, signal);

/** Sends the file that describes the table of an extract. */
export const sendCompanion = (programmeId: string, id: string, file: File): Promise<ExtractShown> =>
  sendFile<ExtractShown>(
    `${one(programmeId, id)}/companion?name=${encodeURIComponent(file.name)}`,
    file,
    () => undefined,
    new AbortController().signal,
  );

export const removeCompanion = (programmeId: string, id: string): Promise<ExtractShown> =>
  request<ExtractShown>("DELETE", `${one(programmeId, id)}/companion`);

export const removeExtract = (programmeId: string, id: string): Promise<void> =>
  request<void>("DELETE", one(programmeId, id));

/** Keeps a reading plan as answered so far; answers what is still open under it. */
export const putPlan = (
  programmeId: string,
  id: string,
  body: { plan: ReadingPlan; version: number },
): Promise<ExtractShown & { findings: Finding[] }> => request("PUT", `${one(programmeId, id)}/plan`, body);

/** Puts an extract as the server answered it in the place of what was known of it. */
export const useKeepExtract = (programmeId: string) => {
  const client = useQueryClient();
  return ({ extract, preview }: ExtractShown): void => {
    // An answer that is still on its way would be older.
    void client.cancelQueries({ queryKey: extractOptions(programmeId, extract.id).queryKey });
    client.setQueryData(extractOptions(programmeId, extract.id).queryKey, { extract, preview });
    void client.invalidateQueries({ queryKey: extractsOptions(programmeId).queryKey });
  };
};

export const useCommitExtract = (programmeId: string, id: string) =>
  useProgrammeChange(programmeId, (version: number) =>
    request<{ extract: Extract; job: Job }>("POST", `${one(programmeId, id)}/commit`, { version }),
  );
export const useWithdrawExtract = (programmeId: string, id: string) =>
  useProgrammeChange(programmeId, () => request<{ job: Job }>("POST", `${one(programmeId, id)}/withdraw`));
