import { z } from "zod";
import { LIMITS } from "../limits.ts";
import { id, timestamp } from "./common.ts";
import { recipeRef } from "./recipes.ts";

/**
 * Every star query carries a view as search parameters (see catalogue/view.ts): edition, card, campaign, merit,
 * cut (repeated), sort. `card`, `campaign`, `merit` are ids of VERSIONS.
 */
const part = z.string().optional();
export const viewQuery = z.object({
  edition: part,
  card: part,
  campaign: part,
  merit: part,
  cut: z.union([z.string(), z.array(z.string())]).optional(),
  sort: part,
});
export const windowQuery = z.object({
  offset: z.coerce.number().int().min(0).default(0),
  limit: z.coerce.number().int().min(1).max(LIMITS.windowRows).default(100),
});

/** GET /api/programmes/:p/stars/summary?view → { summary } */
export const ladderStep = z.object({
  label: z.string(),
  expression: z.string(),
  blanks: z.enum(["keep", "drop"]),
  /** Stars left after this cut and those before it. */
  left: z.int(),
  fell: z.int(),
  /** Stars this cut alone would drop from the whole catalogue. */
  alone: z.int(),
  /** Stars of the whole catalogue for which a value this cut needs is blank. */
  blank: z.int(),
  /** Set where the expression cannot be used: what and why; the cut is then left out. */
  error: z
    .object({ message: z.string(), hint: z.string().optional(), position: z.int().optional() })
    .nullable(),
});
export type LadderStep = z.infer<typeof ladderStep>;
export const viewSummary = z.object({
  edition: z.int().nullable(),
  total: z.int(),
  count: z.int(),
  /** Eight characters, `7f3a-91c2`, of the set of stars; the same on any machine. */
  fingerprint: z.string(),
  ladder: z.array(ladderStep),
  card: z.object({ versionId: id, name: z.string(), number: z.int() }).nullable(),
  campaign: z.object({ versionId: id, name: z.string(), number: z.int() }).nullable(),
  merit: z.object({ versionId: id, name: z.string(), number: z.int() }).nullable(),
  recipe: recipeRef,
  /** Parts of the view that do not exist or may not be seen, by name; the rest is shown. */
  ignored: z.array(z.string()),
});
export type ViewSummary = z.infer<typeof viewSummary>;

/**
 * One star as the table shows it. `values` holds numbers by column key and `<key>_err`; a blank cell is absent from
 * `values` and has its reason code in `blanks`.
 */
export const starRow = z.object({
  id,
  /** Place in the view, from 1. */
  place: z.int(),
  designation: z.string(),
  sourceId: z.string().nullable(),
  release: z.string().nullable(),
  values: z.record(z.string(), z.number()),
  blanks: z.record(z.string(), z.int()),
  flagBits: z.int(),
  /** 0 to 100; null where the figure of merit holds the star or none is chosen. */
  merit: z.number().nullable(),
  /** Share of each term, in its order; they add up to the merit. */
  shares: z.array(z.number()),
});
export type StarRow = z.infer<typeof starRow>;
/** GET …/stars/window?view&offset&limit → { window } */
export const starWindow = z.object({ offset: z.int(), count: z.int(), rows: z.array(starRow) });
export type StarWindow = z.infer<typeof starWindow>;

/** GET …/stars/histograms?view&columns=teff,radius → { histograms }: the whole catalogue with the selection lit. */
export const histogram = z.object({
  key: z.string(),
  low: z.number(),
  high: z.number(),
  isLog: z.boolean(),
  all: z.array(z.int()),
  selected: z.array(z.int()),
  blanks: z.int(),
});
export type Histogram = z.infer<typeof histogram>;

/** One extract's word on a star. */
export const starEntry = z.object({
  extractId: id,
  extractNumber: z.int(),
  extractName: z.string(),
  rowNumber: z.int(),
  designation: z.string(),
  sourceId: z.string().nullable(),
  release: z.string().nullable(),
  values: z.record(z.string(), z.number()),
});
/** GET …/stars/:starId?view → { star }; …/stars/find?view&q=text → { matches } with place where the star is in the view. */
export const starSheet = starRow.omit({ place: true }).extend({
  place: z.int().nullable(),
  count: z.int(),
  methods: z.record(z.string(), z.string()),
  entries: z.array(starEntry),
  /** Cuts that drop the star, by their position in the view; empty where it passes. */
  droppedBy: z.array(z.int()),
  reach: z.array(z.object({ periodDays: z.number(), rMin: z.number().nullable() })),
  changedAt: timestamp.nullable(),
});
export type StarSheet = z.infer<typeof starSheet>;
export const findQuery = z.object({ q: z.string().trim().min(1).max(100) });
export const starMatch = z.object({
  id,
  designation: z.string(),
  sourceId: z.string().nullable(),
  place: z.int().nullable(),
});
export type StarMatch = z.infer<typeof starMatch>;

/** GET …/catalogue → { catalogue } */
export const catalogueEdition = z.object({
  number: z.int(),
  reason: z.string(),
  stars: z.int(),
  recipe: recipeRef,
  fingerprint: z.string(),
  madeAt: timestamp,
  madeBy: z.string(),
});
export const catalogue = z.object({ edition: z.int().nullable(), editions: z.array(catalogueEdition) });
export type Catalogue = z.infer<typeof catalogue>;
