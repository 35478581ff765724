import type { PositionFrame, TableFinding } from "../table.ts";

/** What the reader of VOTables has to tell, as a person reads it. */

type FindingWords = Omit<TableFinding, "count" | "examples">;

export type Attributes = Readonly<Record<string, string>>;

export const OVERFLOW: FindingWords = {
  key: "votable-overflow",
  level: "ask",
  message: "The service cut the answer at its limit of rows (QUERY_STATUS is OVERFLOW), so rows are missing.",
  hint: "Narrow the query or raise its limit and get the table again, or go on with the rows that are here.",
};

export const SERVICE_ERROR: FindingWords = {
  key: "votable-service-error",
  level: "stop",
  message: "The service broke off with an error (QUERY_STATUS is ERROR), so the table is not whole.",
  hint: "Ask the service again, and bring the file that comes without an error.",
};

export const ARRAY_COLUMNS: FindingWords = {
  key: "votable-array-columns",
  level: "note",
  message: "Columns whose cells hold several values (arrays or complex numbers) are not read.",
  hint: "Where one is needed, let the service or archive split it into columns of single values.",
};

export const UNKNOWN_DATATYPES: FindingWords = {
  key: "votable-unknown-datatypes",
  level: "ask",
  message:
    "Columns have a datatype or arraysize that the VOTable standard does not know; they are read as text.",
  hint: "Say what they hold in the reading plan.",
};

export const OTHER_TABLES: FindingWords = {
  key: "votable-other-tables",
  level: "note",
  message: "The file holds more than one table; the first with data is read.",
  hint: "To bring another one, save it as a file of its own.",
};

export const NO_DATA: FindingWords = {
  key: "votable-no-data",
  level: "ask",
  message: "The table has columns but no data, not even an empty place for them.",
  hint: "Check that the answer was meant to hold no rows, and is not the description of a table alone.",
};

export const PARAMETERS: FindingWords = {
  key: "votable-parameters",
  level: "note",
  message: "The table states values that hold for all its rows; they are not read as columns.",
  hint: "Look whether one is an epoch or a zero point that the reading plan should know.",
};

export const TIME_SYSTEMS: FindingWords = {
  key: "votable-time-systems",
  level: "note",
  message: "The table ties columns of times to a time scale and an origin.",
  hint: "Give the same scale and origin to these columns in the reading plan.",
};

export const STRAY_BYTES: FindingWords = {
  key: "votable-stray-bytes",
  level: "ask",
  message: "Some bytes mean nothing in the encoding of the file; each stands as \ufffd.",
  hint: "Look at these texts, and save the file as UTF-8 if they matter.",
};

export const FEWER_ROWS: FindingWords = {
  key: "votable-fewer-rows",
  level: "stop",
  message: "The table says it has more rows than the file holds, so rows are missing.",
  hint: "Get the file again from its service or archive and bring it as a new extract.",
};

export const MORE_ROWS: FindingWords = {
  key: "votable-more-rows",
  level: "ask",
  message: "The file holds more rows than its table says it has.",
  hint: "Check that the file was not put together from several answers.",
};

export const AFTER_END: FindingWords = {
  key: "votable-after-end",
  level: "ask",
  message: "Something follows after the end of the VOTable, and is not read.",
  hint: "Check that the file was not put together from several; if it was, bring each as a file of its own.",
};

export const frameOf = (attributes: Attributes): PositionFrame => ({
  system: attributes.system ?? null,
  equinox: attributes.equinox ?? null,
  epoch: attributes.epoch ?? null,
});

export const timeSystemText = ({ timescale, timeorigin, refposition }: Attributes): string =>
  [
    `scale ${timescale ?? "unknown"}`,
    timeorigin === undefined ? "no origin" : `origin ${timeorigin}`,
    `at ${refposition ?? "an unknown place"}`,
  ].join(", ");

/** Names of INFO elements that say where a table comes from: those of the IVOA Note "Data Origin in the VO", from memory. */
const SOURCE_INFO = new Set([
  "acknowledgement",
  "article",
  "bibcode",
  "citation",
  "creator",
  "doi",
  "editor",
  "ivoid",
  "journal",
  "original_date",
  "publication_id",
  "publisher",
  "reference",
  "reference_url",
  "resource_version",
  "rights",
  "rights_uri",
  "source",
]);

export const isSourceInfo = (name: string): boolean => SOURCE_INFO.has(name.toLowerCase());

/** One line of a text that was laid out for the file. */
export const oneLine = (text: string): string => text.replace(/\s+/g, " ").trim();
