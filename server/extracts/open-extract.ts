import { createGunzip } from "node:zlib";
import type { ReadingPlan } from "#shared/api/extracts.ts";
import { openDelimited } from "../formats/delimited/open-delimited.ts";
import { peek } from "../formats/delimited/peek.ts";
import { isEcsv } from "../formats/ecsv/header-lines.ts";
import { openEcsv } from "../formats/ecsv/open-ecsv.ts";
import { textDecoder } from "../formats/encoding.ts";
import { openFits } from "../formats/fits/open-fits.ts";
import type { OpenTable, TableReader } from "../formats/table.ts";
import { openVotable } from "../formats/votable/read-votable.ts";

/** How a curator says that text is to be read; what is left out is judged by the bytes. */
export type DialectChoice = Partial<Pick<ReadingPlan, "encoding" | "delimiter" | "decimalMark">>;

const FIRST_BYTES = 1024;

const isFits = (head: Uint8Array): boolean =>
  Buffer.from(head.subarray(0, 9)).toString("latin1") === "SIMPLE  =";

const isVotable = (head: Uint8Array): boolean =>
  /^\s*<(\?xml|(\w+:)?VOTABLE)/.test(textDecoder("utf-8").decode(head, { stream: true })) ||
  // Pairs of bytes with the first sign of a document.
  /^(\xff\xfe)?<\0|^(\xfe\xff)?\0</.test(Buffer.from(head.subarray(0, 4)).toString("latin1"));

const READERS: readonly { is(head: Uint8Array): boolean; readonly open: OpenTable }[] = [
  { is: isEcsv, open: openEcsv },
  { is: isFits, open: openFits },
  { is: isVotable, open: openVotable },
];

const isGzip = (head: Uint8Array): boolean => head[0] === 0x1f && head[1] === 0x8b;

async function* unzipped(source: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  const gunzip = createGunzip();
  const { Readable, pipeline } = await import("node:stream");
  pipeline(Readable.from(source), gunzip, () => undefined);
  yield* gunzip;
}

/** The reader of a file that says itself what it is; undefined for plain text and all else. */
export const readerOf = (head: Uint8Array): OpenTable | undefined => READERS.find(({ is }) => is(head))?.open;

/** Opens the table of an extract by what its bytes say, through a gzip around it. */
export const openExtract = async (
  source: AsyncIterable<Uint8Array>,
  choice: DialectChoice,
): Promise<TableReader> => {
  const { head, whole } = await peek(source, FIRST_BYTES);
  if (isGzip(head)) return openExtract(unzipped(whole), choice);
  const open = readerOf(head);
  if (open) return open(whole);
  const { delimiter, ...rest } = choice;
  return openDelimited(whole, delimiter === " " || delimiter === undefined ? rest : { ...rest, delimiter });
};
