import { useQuery } from "@tanstack/react-query";
import { useCallback, useMemo } from "react";
import { useSearchParams } from "react-router-dom";
import { COLUMNS } from "#shared/catalogue/columns.ts";
import { type ViewSpec, viewFromParams, viewToParams } from "#shared/catalogue/view.ts";
import { campaignsOptions, cardsOptions } from "#src/api/instruments.ts";
import { meritsOptions } from "#src/api/merits.ts";

/** Columns shown until someone chooses others. */
const USUAL_COLUMNS = [
  "ra",
  "dec",
  "g_mag",
  "teff",
  "radius",
  "hz_inner",
  "transit_probability",
  "noise_1h",
  "transits",
  "r_min",
];

/** Parts of the address that are not the view itself. */
export interface Screen {
  readonly columns: readonly string[];
  readonly star: string | null;
  /** The quantity of that star whose workings are open, then the steps followed down from it. */
  readonly workings: readonly string[];
  readonly find: string;
  readonly isSexagesimal: boolean;
}

export interface Workbench {
  readonly view: ViewSpec;
  readonly screen: Screen;
  /** Whether the defaults of a bare address are still being looked up. */
  readonly isPending: boolean;
  /** Parts of the address that could not be read. */
  readonly unread: readonly string[];
  /** Asks another question: a step that Back undoes. */
  readonly ask: (change: Partial<ViewSpec>) => void;
  /** Changes what is beside the question; it replaces the address unless it opens something. */
  readonly show: (change: Partial<Screen>, isStep?: boolean) => void;
}

/** A key of the registry or of a step, as the address may name it. */
const QUANTITY = /^[a-z0-9_]{1,40}$/;
/** Deeper than any chain of steps; an address that goes on is not followed. */
const DEEPEST = 30;

const trailOf = (text: string | null): string[] =>
  (text ?? "")
    .split(",")
    .filter((key) => QUANTITY.test(key))
    .slice(0, DEEPEST);

const known = new Set<string>(COLUMNS.map((c) => c.key));

const screenOf = (params: URLSearchParams): Screen => {
  const columns = (params.get("columns") ?? "").split(",").filter((key) => known.has(key));
  return {
    columns: columns.length > 0 ? columns : USUAL_COLUMNS,
    star: params.get("star"),
    workings: params.has("star") ? trailOf(params.get("workings")) : [],
    find: params.get("find") ?? "",
    isSexagesimal: params.get("positions") === "sexagesimal",
  };
};

const toParams = (view: ViewSpec, screen: Screen): URLSearchParams => {
  const params = viewToParams(view);
  if (screen.columns.join() !== USUAL_COLUMNS.join()) params.set("columns", screen.columns.join());
  if (screen.star) params.set("star", screen.star);
  if (screen.star && screen.workings.length > 0) params.set("workings", screen.workings.join());
  if (screen.find) params.set("find", screen.find);
  if (screen.isSexagesimal) params.set("positions", "sexagesimal");
  return params;
};

/** An address that says nothing of the view opens on the programme's own instrument and figure of merit. */
const useDefaults = (programmeId: string, isBare: boolean) => {
  const cards = useQuery({ ...cardsOptions(programmeId), enabled: isBare });
  const campaigns = useQuery({ ...campaignsOptions(programmeId), enabled: isBare });
  const merits = useQuery({ ...meritsOptions(programmeId), enabled: isBare });
  const merit = merits.data?.[0]?.versionId ?? null;
  const defaults: Partial<ViewSpec> = {
    card: cards.data?.[0]?.versionId ?? null,
    campaign: campaigns.data?.[0]?.versionId ?? null,
    merit,
    ...(merit ? { sort: { key: "merit", direction: "desc" } } : {}),
  };
  // A guest may not read figures of merit; then the view simply has none.
  return {
    defaults,
    isPending: isBare && [cards, campaigns, merits].some((q) => q.isPending && q.fetchStatus !== "idle"),
  };
};

/** The whole state of the workbench, which stands in the address. */
export const useWorkbench = (programmeId: string): Workbench => {
  const [params, setParams] = useSearchParams();
  const isBare = !params.has("sort");
  const { defaults, isPending } = useDefaults(programmeId, isBare);
  const asked = useMemo(() => viewFromParams(params), [params]);
  const view = isBare ? { ...asked.view, ...defaults, cuts: asked.view.cuts } : asked.view;
  const screen = screenOf(params);
  const text = toParams(view, screen).toString();
  const ask = useCallback(
    (change: Partial<ViewSpec>) => {
      const now = viewFromParams(new URLSearchParams(text)).view;
      setParams(toParams({ ...now, ...change }, { ...screenOf(new URLSearchParams(text)), find: "" }));
    },
    [text, setParams],
  );
  const show = useCallback(
    (change: Partial<Screen>, isStep = false) => {
      const now = new URLSearchParams(text);
      setParams(toParams(viewFromParams(now).view, { ...screenOf(now), ...change }), { replace: !isStep });
    },
    [text, setParams],
  );
  return { view, screen, isPending, unread: asked.ignored, ask, show };
};
