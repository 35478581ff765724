import { queryOptions } from "@tanstack/react-query";
import type { Workings } from "#shared/api/workings.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { get } from "./client.ts";
import { programmeKeys } from "./programmes.ts";
import { starsPath, viewKey } from "./stars.ts";

interface Asked {
  starId: string;
  /** A derived column of the registry, or a step. */
  key: string;
  /** How many draws and which; null for none. */
  drawn: { draws: number; seed: number } | null;
}

/** How one quantity of one star came about, down to what was given; on demand with its interval by draws. */
export const workingsOptions = (programmeId: string, view: ViewSpec, { starId, key, drawn }: Asked) =>
  queryOptions({
    queryKey: programmeKeys.part(
      programmeId,
      "stars",
      "workings",
      starId,
      key,
      drawn ? `${drawn.draws}~${drawn.seed}` : "",
      viewKey(view),
    ),
    queryFn: async ({ signal }) => {
      const more: Record<string, string> = drawn
        ? { key, draws: String(drawn.draws), seed: String(drawn.seed) }
        : { key };
      const path = starsPath(programmeId, `${starId}/workings`, view, more);
      return (await get<{ workings: Workings }>(path, signal)).workings;
    },
  });
