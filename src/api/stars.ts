import { keepPreviousData, queryOptions } from "@tanstack/react-query";
import type {
  Catalogue,
  Histogram,
  StarMatch,
  StarRow,
  StarSheet,
  StarWindow,
  ViewSummary,
} from "#shared/api/stars.ts";
import { EMPTY_VIEW, type ViewSpec, viewToParams } from "#shared/catalogue/view.ts";
import { get } from "./client.ts";
import { programmeKeys } from "./programmes.ts";

export const starsPath = (
  programmeId: string,
  part: string,
  view: ViewSpec,
  more: Record<string, string> = {},
): string => {
  const params = viewToParams(view);
  for (const [key, value] of Object.entries(more)) params.set(key, value);
  return `/programmes/${programmeId}/stars/${part}?${params}`;
};

/** Names a view in query keys: two views that ask the same are the same. */
export const viewKey = (view: ViewSpec): string => viewToParams(view).toString();

/** What does not depend on the order is not read again for another one. */
const unordered = (view: ViewSpec): ViewSpec => ({ ...view, sort: EMPTY_VIEW.sort });

export const catalogueOptions = (programmeId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "catalogue"),
    queryFn: async () =>
      (await get<{ catalogue: Catalogue }>(`/programmes/${programmeId}/catalogue`)).catalogue,
  });

export const summaryOptions = (programmeId: string, view: ViewSpec) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "stars", "summary", viewKey(unordered(view))),
    queryFn: async ({ signal }) =>
      (await get<{ summary: ViewSummary }>(starsPath(programmeId, "summary", view), signal)).summary,
    placeholderData: keepPreviousData,
  });

export const windowKey = (programmeId: string, view: ViewSpec) =>
  programmeKeys.part(programmeId, "stars", "window", viewKey(view));

export const readWindow = async (
  programmeId: string,
  view: ViewSpec,
  offset: number,
  limit: number,
  signal: AbortSignal,
): Promise<StarRow[]> =>
  (
    await get<{ window: StarWindow }>(
      starsPath(programmeId, "window", view, { offset: String(offset), limit: String(limit) }),
      signal,
    )
  ).window.rows;

export const histogramsOptions = (programmeId: string, view: ViewSpec, columns: readonly string[]) =>
  queryOptions({
    queryKey: programmeKeys.part(
      programmeId,
      "stars",
      "histograms",
      viewKey(unordered(view)),
      columns.join(),
    ),
    queryFn: async ({ signal }) =>
      (
        await get<{ histograms: Histogram[] }>(
          starsPath(programmeId, "histograms", view, { columns: columns.join() }),
          signal,
        )
      ).histograms,
    placeholderData: keepPreviousData,
    enabled: columns.length > 0,
  });

export const sheetOptions = (programmeId: string, view: ViewSpec, starId: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "stars", "sheet", starId, viewKey(view)),
    queryFn: async ({ signal }): Promise<StarSheet> =>
      (await get<{ star: StarSheet }>(starsPath(programmeId, starId, view), signal)).star,
    // The same star under another question stays until its new answer; another star is never shown in its place.
    placeholderData: (before) => (before?.id === starId ? before : undefined),
  });

export const findOptions = (programmeId: string, view: ViewSpec, text: string) =>
  queryOptions({
    queryKey: programmeKeys.part(programmeId, "stars", "find", text, viewKey(view)),
    queryFn: async ({ signal }) =>
      (await get<{ matches: StarMatch[] }>(starsPath(programmeId, "find", view, { q: text }), signal))
        .matches,
    enabled: text !== "",
  });
