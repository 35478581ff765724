import { unprocessable } from "../errors.ts";
import { openDelimited } from "./delimited/open-delimited.ts";
import { type Peeked, peek } from "./delimited/peek.ts";
import { openDescribed } from "./described/open-described.ts";
import type { DecimalMark, Delimiter } from "./dialect.ts";
import { openEcsv } from "./ecsv/open-ecsv.ts";
import { openFits } from "./fits/open-fits.ts";
import { openColumns } from "./fixed-width/open-columns.ts";
import { Gunzip, type GzipLimits, isGzip } from "./gzip.ts";
import { RECOGNISED_BYTES, recognise } from "./recognise.ts";
import type { RowBatch, TableFormat, TableReader } from "./table.ts";
import type { TextEncoding } from "./text/encoding.ts";
import { openVotable } from "./votable/read-votable.ts";

/** What is known of a file besides its bytes. */
export interface OpenChoice {
  /** Its name, which decides where its content leaves several readings. */
  readonly name?: string;
  /** The byte-by-byte description that belongs to it, where that is a file of its own. */
  readonly companion?: AsyncIterable<Uint8Array>;
  /** Which of the described tables it is, as a person chose it. */
  readonly table?: string;
  readonly encoding?: TextEncoding;
  readonly delimiter?: Delimiter;
  readonly decimalMark?: DecimalMark;
  readonly gzipLimits?: GzipLimits;
}

export interface RecognisedTable {
  readonly reader: TableReader;
  /** What the file was taken for, in words. */
  readonly takenFor: string;
  readonly isPacked: boolean;
  /** Of numbers that its columns of text spell; a point where the format itself reads them. */
  readonly decimalMark: DecimalMark;
}

type Opened = Pick<RecognisedTable, "reader" | "decimalMark">;

const WORDS: Readonly<Record<TableFormat, string>> = {
  delimited: "text with delimiters",
  "fixed-width": "text in columns",
  described: "text with a byte-by-byte description",
  votable: "a VOTable",
  fits: "a FITS file",
  ecsv: "ECSV",
};

const plain = (reader: TableReader): Opened => ({ reader, decimalMark: "." });

const OPEN: Readonly<
  Record<TableFormat, (bytes: AsyncIterable<Uint8Array>, choice: OpenChoice) => Promise<Opened>>
> = {
  fits: async (bytes) => plain(await openFits(bytes)),
  votable: async (bytes) => plain(await openVotable(bytes)),
  ecsv: async (bytes) => plain(await openEcsv(bytes)),
  described: async (bytes, choice) => plain(await openDescribed(bytes, choice)),
  "fixed-width": async (bytes, choice) => {
    const reader = await openColumns(bytes, choice);
    return { reader, decimalMark: reader.dialect.decimalMark };
  },
  delimited: async (bytes, choice) => {
    const reader = await openDelimited(bytes, choice);
    return { reader, decimalMark: reader.dialect.decimalMark };
  },
};

/** Text of any layout is a described table once a description comes along; a chosen delimiter settles it too. */
const formatOf = (head: Uint8Array, choice: OpenChoice): TableFormat => {
  const found = recognise(head);
  if (found !== "delimited" && found !== "fixed-width") return found;
  if (choice.companion) return "described";
  return choice.delimiter === undefined ? found : "delimited";
};

/** The bytes of a file, unpacked where it is packed. */
const unpacked = async (
  source: AsyncIterable<Uint8Array>,
  limits: GzipLimits | undefined,
): Promise<Peeked & { gunzip: Gunzip | null }> => {
  const outer = await peek(source, RECOGNISED_BYTES);
  if (!isGzip(outer.head)) return { ...outer, gunzip: null };
  const gunzip = new Gunzip(outer.whole, limits);
  const inner = await peek(gunzip, RECOGNISED_BYTES);
  if (!isGzip(inner.head)) return { ...inner, gunzip };
  await close(inner.whole);
  throw unprocessable("gzip-twice", "The gzip file holds another gzip file.", {
    hint: "Unpack it once, and bring what comes out.",
  });
};

/** Lets a source go. One that was not begun yet cleans nothing up, so it is begun. */
const close = async (bytes: AsyncIterable<Uint8Array>): Promise<void> => {
  const pieces = bytes[Symbol.asyncIterator]();
  await pieces.next().catch(() => undefined);
  await pieces.return?.();
};

/** Progress is told in bytes of the file as it was brought. */
async function* withPackedBytes(batches: AsyncIterable<RowBatch>, gunzip: Gunzip): AsyncGenerator<RowBatch> {
  for await (const batch of batches) yield { ...batch, bytes: gunzip.packed };
}

/** A description of its own may be packed as well. */
const unpackedCompanion = async (choice: OpenChoice): Promise<OpenChoice> =>
  choice.companion === undefined
    ? choice
    : { ...choice, companion: (await unpacked(choice.companion, choice.gzipLimits)).whole };

/**
 * Opens a table by what its bytes say, whatever its name says, and unpacks it where it is packed with gzip. Looks ahead
 * RECOGNISED_BYTES.
 *
 * @throws AppError for what is no table, breaks the rules of its format or ends too early; `which-table` where several
 * tables are described and none is chosen
 */
export const openTable = async (
  source: AsyncIterable<Uint8Array>,
  choice: OpenChoice = {},
): Promise<RecognisedTable> => {
  const { head, whole, gunzip } = await unpacked(source, choice.gzipLimits);
  try {
    const format = formatOf(head, choice);
    const { reader, decimalMark } = await OPEN[format](whole, await unpackedCompanion(choice));
    const { header, batches } = reader;
    return {
      reader: gunzip
        ? { header, batches: withPackedBytes(batches, gunzip), findings: () => reader.findings() }
        : reader,
      takenFor: `${WORDS[header.format]} (${header.variant})`,
      isPacked: gunzip !== null,
      decimalMark,
    };
  } catch (error) {
    await close(whole);
    throw error;
  }
};
