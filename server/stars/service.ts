import type { OpenView } from "#server/scan/view.ts";
import type { StarMatch, StarRow, StarSheet, StarWindow, ViewSummary } from "#shared/api/stars.ts";
import { methodWord } from "#shared/catalogue/methods.ts";
import { METHOD_KEYS } from "../database/star-table.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { refOf } from "../recipes/queries.ts";
import { presentEntry, rowPresenter } from "./present.ts";
import {
  editionMadeAt,
  findBySpelling,
  findEntries,
  findStars,
  type Scope,
  type StoredStar,
} from "./queries.ts";
import { reachOf } from "./reach.ts";

const MOST_MATCHES = 20;

const scopeOf = (view: OpenView): Scope => view.resolved;

export const summarise = async (view: OpenView): Promise<ViewSummary> => {
  const { edition, card, campaign, merit, recipe, ignored } = view.resolved;
  const named = (v: { versionId: string; name: string; number: number } | null) =>
    v && { versionId: v.versionId, name: v.name, number: v.number };
  return {
    edition: edition === 0 ? null : edition,
    total: await view.total(),
    count: await view.count(),
    fingerprint: await view.fingerprint(),
    ladder: await view.ladder(),
    card: named(card),
    campaign: named(campaign),
    merit: named(merit),
    recipe: refOf(recipe),
    ignored,
  };
};

/** Rows of those stars in the order of their ids, the first at that place (from 1). */
export const readRows = async (
  deps: Deps,
  view: OpenView,
  ids: readonly string[],
  firstPlace: number,
  tx = deps.db.manager,
): Promise<StarRow[]> => {
  const found = await findStars(tx, scopeOf(view), ids);
  const byId = new Map(found.map((row) => [String(row.star_id), row]));
  const present = rowPresenter(view.resolved);
  return ids.map((id, i) => {
    const row = byId.get(id);
    // Index and star table are of one edition, which never changes.
    if (!row) throw new Error(`The star ${id} of the scan index is not in the catalogue.`);
    return { place: firstPlace + i, ...present(row) };
  });
};

export const readWindow = async (
  deps: Deps,
  view: OpenView,
  { offset, limit }: { offset: number; limit: number },
): Promise<StarWindow> => {
  const ids = await view.ids(offset, limit);
  return { offset, count: await view.count(), rows: await readRows(deps, view, ids, offset + 1) };
};

/** Star ids are signed 64-bit numbers above zero. */
export const isStarId = (text: string): boolean =>
  /^[1-9][0-9]{0,18}$/.test(text) && BigInt(text) <= 2n ** 63n - 1n;

const findStar = async (deps: Deps, view: OpenView, starId: string): Promise<StoredStar> => {
  if (!isStarId(starId)) throw notFound("This star");
  const [row] = await findStars(deps.db.manager, scopeOf(view), [starId]);
  if (!row) throw notFound("This star");
  return row;
};

/** Everything on one star; the extracts' own words only for those who may read extracts. */
export const readSheet = async (
  deps: Deps,
  view: OpenView,
  starId: string,
  mayReadExtracts: boolean,
): Promise<StarSheet> => {
  const row = await findStar(deps, view, starId);
  const star = rowPresenter(view.resolved)(row);
  const { programmeId } = view.resolved;
  const [places, droppedBy, entries, changedAt] = await Promise.all([
    view.placesOf([starId]),
    view.droppedBy(starId),
    mayReadExtracts ? findEntries(deps.db.manager, programmeId, starId) : [],
    editionMadeAt(deps.db.manager, programmeId, row.from_edition),
  ]);
  return {
    ...star,
    place: places.get(starId) ?? null,
    count: await view.count(),
    methods: Object.fromEntries(
      METHOD_KEYS.flatMap((key): [string, string][] => {
        const word = methodWord(Number(row[`${key}_method`] ?? 0));
        return word ? [[key, word]] : [];
      }),
    ),
    entries: entries.map(presentEntry),
    droppedBy,
    reach: reachOf(view.resolved, star.values),
    changedAt: changedAt?.toISOString() ?? null,
  };
};

/**
 * Stars by designation or identifier, with their place where they have one; by an extract's own spelling too for who
 * may read extracts.
 */
export const findMatches = async (
  deps: Deps,
  view: OpenView,
  text: string,
  mayReadExtracts: boolean,
): Promise<StarMatch[]> => {
  const ids = await findBySpelling(deps.db.manager, scopeOf(view), text, MOST_MATCHES, mayReadExtracts);
  const rows = await findStars(deps.db.manager, scopeOf(view), ids);
  const byId = new Map(rows.map((row) => [String(row.star_id), row]));
  const places = await view.placesOf([...byId.keys()]);
  return ids.flatMap((id) => {
    const row = byId.get(id);
    return row
      ? [{ id, designation: row.designation, sourceId: row.source_id, place: places.get(id) ?? null }]
      : [];
  });
};
