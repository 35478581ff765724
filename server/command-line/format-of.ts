import { isEcsv } from "../formats/ecsv/header-lines.ts";
import { openEcsv } from "../formats/ecsv/open-ecsv.ts";
import { detectEncoding, textDecoder } from "../formats/encoding.ts";
import { openFits } from "../formats/fits/open-fits.ts";
import type { OpenTable } from "../formats/table.ts";
import { openVotable } from "../formats/votable/read-votable.ts";

const isFits = (head: Uint8Array): boolean =>
  Buffer.from(head.subarray(0, 9)).toString("latin1") === "SIMPLE  =";

const isXml = (head: Uint8Array): boolean => {
  const text = textDecoder(detectEncoding(head).encoding).decode(head, { stream: true });
  return /^\s*<(\?xml|VOTABLE|\w+:VOTABLE)/.test(text);
};

const FORMATS: readonly { is(head: Uint8Array): boolean; readonly open: OpenTable }[] = [
  { is: isEcsv, open: openEcsv },
  { is: isFits, open: openFits },
  { is: isXml, open: openVotable },
];

/** The reader of a file that says itself what it is, by its first bytes; undefined for plain text and all else. */
export const formatOf = (head: Uint8Array): OpenTable | undefined => FORMATS.find(({ is }) => is(head))?.open;
