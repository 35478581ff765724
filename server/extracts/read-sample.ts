import { AppError } from "../errors.ts";
import type { RecognisedTable } from "../formats/open-table.ts";
import type { FileStorage } from "../storage/storage.ts";
import { type Beside, type DialectChoice, openExtract } from "./open-extract.ts";
import { type Sample, sampleOf } from "./sample.ts";
import { sampleDelimited } from "./sample-delimited.ts";
import { refusal, sampleTable } from "./sample-table.ts";

/** Files that are read to their end, so that rows of all their parts are looked at. */
const WHOLE_BYTES = 8_000_000;
const TAIL_BYTES = 8_192;

const VARIANTS = new Set(["commas", "semicolons", "tabs", "bars"]);

/** Plain text between delimiters: its names on the first line, and nothing said around them. */
const isPlain = ({ reader, isPacked }: RecognisedTable): boolean =>
  !isPacked &&
  reader.header.format === "delimited" &&
  VARIANTS.has(reader.header.variant) &&
  reader.header.encoding !== "utf-16be" &&
  reader.header.declaredRows === null &&
  reader.header.columns.every(({ unit, ucd, description }) => unit + ucd + description === "");

/** A service says behind the rows that it cut its answer. */
const isCutAnswer = async (files: FileStorage, key: string, bytes: number): Promise<boolean> => {
  const pieces: Buffer[] = [];
  for await (const piece of await files.read(key, { start: Math.max(0, bytes - TAIL_BYTES) }))
    pieces.push(piece as Buffer);
  const infos =
    Buffer.concat(pieces)
      .toString("latin1")
      .match(/<(?:\w+:)?INFO\b[^>]*>/g) ?? [];
  return infos.some((info) => /QUERY_STATUS/.test(info) && /OVERFLOW/.test(info));
};

const withCutAnswer = (sample: Sample): Sample => ({
  ...sample,
  found: [
    ...sample.found,
    {
      key: "votable-overflow",
      level: "ask",
      message: "The service that made this file says that its answer was cut at a limit of rows.",
      hint: "Ask the service for all rows, or take the part that is here.",
      count: 1,
      examples: [],
    },
  ],
});

const sampleOpened = async (
  table: RecognisedTable,
  files: FileStorage,
  key: string,
  bytes: number,
): Promise<Sample> => {
  const isWhole = bytes <= WHOLE_BYTES;
  const sample = await sampleTable(table, isWhole);
  const isLong = !isWhole && sample.format === "votable" && !table.isPacked;
  return isLong && (await isCutAnswer(files, key, bytes)) ? withCutAnswer(sample) : sample;
};

/**
 * Looks into a file of any format, without reading all of a large one.
 *
 * @param choice how the text is to be read, where that was said
 * @param beside its name, and the description that came with it
 */
export const readSample = async (
  files: FileStorage,
  key: string,
  bytes: number,
  choice: DialectChoice = {},
  beside: Beside = {},
): Promise<Sample> => {
  if (bytes === 0) return sampleDelimited(files, key, bytes);
  const source = await files.read(key);
  try {
    const table = await openExtract(source, choice, beside);
    if (!isPlain(table)) return await sampleOpened(table, files, key, bytes);
    // Plain text can be looked into at places of one's choice.
    const found = table.reader.findings();
    const sample = await sampleDelimited(files, key, bytes, choice);
    return {
      ...sample,
      found: found.filter((f) => f.key !== "headers-renamed" && f.key !== "encoding-guessed"),
    };
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    return sampleOf([], [], { found: [refusal(error)] });
  } finally {
    source.destroy();
  }
};
