import { z } from "zod";
import { LIMITS } from "../limits.ts";
import { id, name, note, personRef, timestamp, version } from "./common.ts";
import { job } from "./jobs.ts";

/** receiving: the file is on its way · planning: the reading plan is open · importing · committed · withdrawn */
export const EXTRACT_STATES = ["receiving", "planning", "importing", "committed", "withdrawn"] as const;

/** One column card of the reading plan: how one column of the file is understood. */
export const columnCard = z.object({
  /** Position in the file, from 0. */
  index: z.int().min(0),
  /** Header as the file spells it. */
  header: z.string(),
  /** Registry key, its error partner (`ks_mag_err`), "kept" (kept as text, not used) — never anything else. */
  means: z.string(),
  /** Unit as confirmed (a spelling of shared/units); empty for pure numbers and text. */
  unit: z.string(),
  /** Texts that stand for "no value" in this column, besides the empty cell. */
  blankMarks: z.array(z.string()),
  /** Suspected marks of which the curator says that they are numbers. */
  keptNumbers: z.array(z.string()).optional(),
  /** Zero point of a magnitude; null until answered where the file leaves doubt. Absent: Vega, or no magnitude. */
  magnitudeSystem: z.enum(["vega", "ab"]).nullable().optional(),
  /** Whether a motion in RA is multiplied by the cosine of the declination; null until answered. Absent: it is. */
  hasCosDec: z.boolean().nullable().optional(),
});
export type ColumnCard = z.infer<typeof columnCard>;

export const readingPlan = z.object({
  format: z.enum(["delimited", "fixed-width", "described", "votable", "fits", "ecsv"]).default("delimited"),
  /** Of delimited text; any value elsewhere. */
  delimiter: z.enum([",", ";", "\t", "|", " "]),
  encoding: z.enum(["utf-8", "utf-16le", "utf-16be", "latin1"]),
  decimalMark: z.enum([".", ","]),
  columns: z.array(columnCard).max(LIMITS.fileColumns),
  /** Julian year of the positions where no column gives it; null until answered. */
  epoch: z.number().min(1800).max(2200).nullable(),
  /** Catalogue release the identifiers belong to, as the curator names it. */
  release: z.string().trim().max(80),
  /** RA in degrees or hours; null until answered when the file leaves doubt. */
  raUnit: z.enum(["deg", "hour"]).nullable(),
  /** Frame of the positions, and its equinox where it has one; positions are kept in ICRS. */
  frame: z.enum(["ICRS", "FK5", "galactic"]).nullable().default("ICRS"),
  equinox: z.number().min(1800).max(2200).nullable().default(null),
  /** Asks after which the file is taken as it is: the code, or `code:header` where the finding names a column. */
  accepted: z.array(z.string().max(600)).max(LIMITS.fileColumns).optional(),
});
export type ReadingPlan = z.infer<typeof readingPlan>;

/** How a plan answers an Ask: `answered` of shared/catalogue/answers.ts, for every answer that a finding offers. */

/** What the server suggests for a column, and why. */
export const columnSuggestion = columnCard.extend({
  /** First non-blank texts of the column with the value read from each (null: text or unreadable). */
  samples: z.array(z.object({ text: z.string(), value: z.union([z.number(), z.string()]).nullable() })),
  because: z.string(),
  /** Whether it needs a person's answer before the import can begin. */
  asks: z.boolean(),
});
export type ColumnSuggestion = z.infer<typeof columnSuggestion>;

/** Stop: cannot go on · Ask: an answer is needed · Note: for your information. */
export const finding = z.object({
  level: z.enum(["stop", "ask", "note"]),
  code: z.string(),
  column: z.string().nullable(),
  message: z.string(),
  hint: z.string(),
  count: z.int(),
  examples: z.array(z.object({ line: z.int(), text: z.string() })),
  /** For Ask: the answers to choose from; empty where a value is typed. */
  answers: z.array(z.object({ value: z.string(), label: z.string() })),
});
export type Finding = z.infer<typeof finding>;

export const extractPreview = z.object({
  delimiter: readingPlan.shape.delimiter,
  encoding: readingPlan.shape.encoding,
  decimalMark: readingPlan.shape.decimalMark,
  columns: z.array(columnSuggestion),
  findings: z.array(finding),
  sampledRows: z.int(),
  format: readingPlan.shape.format,
  /** The kind within the format, as the reader names it. */
  variant: z.string().default(""),
  title: z.string().nullable().default(null),
  description: z.string().nullable().default(null),
  sources: z.array(z.string()).default([]),
  declaredRows: z.int().nullable().default(null),
  /** Up to 50 rows: for each column of the file the text it has and the value that is read from it. */
  rows: z
    .array(
      z.object({
        line: z.int(),
        cells: z.array(z.object({ text: z.string(), value: z.union([z.number(), z.string()]).nullable() })),
      }),
    )
    .default([]),
  /** Sampled positions, degrees, for a first map. */
  sky: z.array(z.tuple([z.number(), z.number()])).default([]),
  /** What the file itself says of how it is to be read, with every question open. */
  plan: readingPlan.optional(),
  /** A named plan made for a file with these columns or most of them, fitted to this one, with what differs. */
  knownPlan: z
    .object({
      versionId: id,
      name: z.string(),
      number: z.int(),
      plan: readingPlan,
      differences: z.array(z.string()),
    })
    .nullable()
    .default(null),
});
export type ExtractPreview = z.infer<typeof extractPreview>;

/** read = accepted + refused + skipped, always. */
export const rowCounts = z.object({ read: z.int(), accepted: z.int(), refused: z.int(), skipped: z.int() });

export const extract = z.object({
  id,
  /** Number within the programme, from 1. */
  number: z.int(),
  name: z.string(),
  origin: z.string(),
  state: z.enum(EXTRACT_STATES),
  isInvented: z.boolean(),
  fileName: z.string(),
  bytes: z.number(),
  receivedBytes: z.number(),
  sha256: z.string().nullable(),
  /** The file that describes the table, brought beside it. */
  companion: z.object({ fileName: z.string(), bytes: z.int(), sha256: z.string() }).nullable(),
  uploadedBy: personRef,
  createdAt: timestamp,
  committedAt: timestamp.nullable(),
  /** Catalogue edition its commit made. */
  edition: z.int().nullable(),
  rows: rowCounts.nullable(),
  newStars: z.int().nullable(),
  plan: readingPlan.nullable(),
  job: job.nullable(),
  /** Why the last import did not happen. */
  failure: z.object({ message: z.string(), hint: z.string().optional() }).nullable(),
  version,
});
export type Extract = z.infer<typeof extract>;

/** GET /api/programmes/:p/extracts → { extracts }; POST → 201 { extract }. The same bytes again: 409 code "extract-already-here" with details { extractId, number }, at the end of the upload. */
export const extractCreateBody = z.strictObject({
  name,
  fileName: z.string().trim().min(1).max(255),
  bytes: z
    .int()
    .min(0)
    .max(
      LIMITS.fileBytes,
      "A file may have at most 2 GiB. Split it, or compress less of the sky into one extract.",
    ),
  origin: note,
});
/** PUT …/extracts/:id/original (raw body, application/octet-stream) → { extract, preview }. GET → the untouched file. */
/** GET …/extracts/:id → { extract, preview } (preview null unless planning). */
/** PUT …/extracts/:id/plan → { extract, findings }: what is still open under that plan. */
export const planBody = z.strictObject({ plan: readingPlan, version });
/** POST …/extracts/:id/commit → 202 { extract, job }. */
export const commitBody = z.strictObject({ version });
/** GET …/extracts/:id/refused → text/csv: line, reason, the row as it was. */
/** DELETE …/extracts/:id → 204 before it is committed. POST …/extracts/:id/withdraw → 202 { job } after. */

/**
 * Upload in pieces: PUT …/extracts/:id/original?offset=N (raw body, at most LIMITS.pieceBytes) → { extract, preview }; the
 * preview is null until the last piece. A piece counts once it is whole. A wrong offset: 409 `upload-offset` with details
 * { receivedBytes }: go on from there. A piece that came before is compared: the same bytes answer as at first, others 409
 * `other-file`.
 */
export const uploadQuery = z.object({ offset: z.coerce.number().int().min(0).optional() });

/** PUT …/extracts/:id/companion?name=ReadMe (raw body), DELETE → { extract, preview }. GET → the untouched file. */
export const companionQuery = z.object({ name: z.string().trim().min(1).max(255) });

/** GET …/reading-plans → { plans }; POST → 201 { plan }; PUT …/reading-plans/:id → { plan } (a further version). */
export const namedPlanBody = z.strictObject({ name, plan: readingPlan });
export const namedPlan = z.object({
  id,
  versionId: id,
  number: z.int(),
  name: z.string(),
  plan: readingPlan,
  savedBy: personRef,
  savedAt: timestamp,
});
export type NamedPlan = z.infer<typeof namedPlan>;

/** GET …/extracts/:id/health → { columns }: what the committed rows hold, column by column. */
export const columnHealth = z.object({
  header: z.string(),
  means: z.string(),
  unit: z.string(),
  rows: z.int(),
  values: z.int(),
  /** Blanks by what stood in the file: the empty cell is "". */
  blanks: z.array(z.object({ mark: z.string(), count: z.int() })),
  low: z.number().nullable(),
  median: z.number().nullable(),
  high: z.number().nullable(),
  histogram: z.array(z.int()),
});
export type ColumnHealth = z.infer<typeof columnHealth>;
