/**
 * A view: the question a person asks of the catalogue. It stands whole in the URL, and two people with the same
 * view see the same stars in the same order.
 */

/** What a cut does with stars whose value is blank. */
export type BlankRule = "keep" | "drop";

export interface Cut {
  /** What the person calls it; may be empty, then its expression serves. */
  readonly label: string;
  /** Condition in the expression language, e.g. `2600 <= teff < 3900`. */
  readonly expression: string;
  readonly blanks: BlankRule;
}

export interface Sort {
  /** A column key of the registry, an error partner, or "merit". */
  readonly key: string;
  readonly direction: "asc" | "desc";
}

export interface ViewSpec {
  /** Catalogue edition number; null means the edition in force. */
  readonly edition: number | null;
  /** Ids of the instrument-card version, campaign version and figure-of-merit version; null: without. */
  readonly card: string | null;
  readonly campaign: string | null;
  readonly merit: string | null;
  readonly cuts: readonly Cut[];
  readonly sort: Sort;
}

export const EMPTY_VIEW: ViewSpec = {
  edition: null,
  card: null,
  campaign: null,
  merit: null,
  cuts: [],
  sort: { key: "designation", direction: "asc" },
};

const encodeCut = (cut: Cut): string => `${cut.blanks}~${cut.label.replaceAll("~", "-")}~${cut.expression}`;

const decodeCut = (text: string): Cut | null => {
  const [blanks, label, ...rest] = text.split("~");
  if ((blanks !== "keep" && blanks !== "drop") || label === undefined || rest.length === 0) return null;
  return { blanks, label, expression: rest.join("~") };
};

/** The view as search parameters, for the address bar and for the API alike. */
export const viewToParams = (view: ViewSpec): URLSearchParams => {
  const params = new URLSearchParams();
  if (view.edition !== null) params.set("edition", String(view.edition));
  for (const key of ["card", "campaign", "merit"] as const) {
    const value = view[key];
    if (value !== null) params.set(key, value);
  }
  for (const cut of view.cuts) params.append("cut", encodeCut(cut));
  params.set("sort", `${view.sort.direction === "desc" ? "-" : ""}${view.sort.key}`);
  return params;
};

/** The view that search parameters ask for; parts that cannot be read fall back and are named in `ignored`. */
export const viewFromParams = (params: URLSearchParams): { view: ViewSpec; ignored: string[] } => {
  const ignored: string[] = [];
  const number = (key: string): string | null => {
    const text = params.get(key);
    if (text === null) return null;
    if (/^[1-9][0-9]{0,18}$/.test(text)) return text;
    ignored.push(key);
    return null;
  };
  const edition = number("edition");
  const cuts = params.getAll("cut").flatMap((text) => {
    const cut = decodeCut(text);
    if (!cut) ignored.push(`cut ${text}`);
    return cut ? [cut] : [];
  });
  const sortText = params.get("sort") ?? EMPTY_VIEW.sort.key;
  const sort: Sort = sortText.startsWith("-")
    ? { key: sortText.slice(1), direction: "desc" }
    : { key: sortText, direction: "asc" };
  return {
    view: {
      edition: edition === null ? null : Number(edition),
      card: number("card"),
      campaign: number("campaign"),
      merit: number("merit"),
      cuts,
      sort,
    },
    ignored,
  };
};
