import type { PositionFrame, TableMeta } from "../table.ts";
import type { Findings } from "./findings.ts";
import type { FitsHeader } from "./header.ts";
import { isBlockBegin, isBlockEnd } from "./serialized-columns.ts";

/** Keywords that name where a table comes from. All but the last two are of the standard. */
const SOURCE_KEYWORDS = ["REFERENC", "AUTHOR", "ORIGIN", "BIBCODE", "DOI"] as const;

/** Keywords for the epoch of positions. The format has none of its own: common practice, no source. */
const EPOCH_KEYWORDS = ["REFEPOCH", "REF_EPOCH", "REFEPOC", "POSEPOCH"] as const;

/** Bibliographic code: year, five characters of the journal, volume, qualifier, page, initial; nineteen together. */
const BIBCODE = /\b[12]\d{3}[A-Za-z][A-Za-z&.]{4}[\w.]{4}[\w.][\d.]{4}[A-Z]/;
const DOI = /\b10\.\d{4,9}\/\S+/;

/** Every FITS library may add these lines about the format itself, which cite nothing of the table's. */
const ABOUT_FORMAT =
  /FITS \(Flexible Image Transport System\)|Astronomy and Astrophysics', volume 376|2001A&A\.\.\.376\.\.359H/;

const MOST_CHARACTERS = 10_000;

/** Comments in words: without what a program keeps there for itself, and without words about the format. */
const plainComments = (header: FitsHeader): string[] => {
  const lines: string[] = [];
  let isInBlock = false;
  for (const line of header.comments) {
    if (isBlockBegin(line)) isInBlock = true;
    if (!isInBlock && !ABOUT_FORMAT.test(line) && line.trim() !== "") lines.push(line.trim());
    if (isBlockEnd(line)) isInBlock = false;
  }
  return lines;
};

const shortened = (text: string): string =>
  text.length > MOST_CHARACTERS ? `${text.slice(0, MOST_CHARACTERS)}…` : text;

const sourcesOf = (headers: readonly FitsHeader[]): string[] => {
  const named = headers.flatMap((header) => SOURCE_KEYWORDS.map((keyword) => header.text(keyword)));
  const cited = headers
    .flatMap((header) => [...plainComments(header), ...header.history.map((line) => line.trim())])
    .filter((line) => BIBCODE.test(line) || DOI.test(line));
  return [...new Set([...named.filter((text) => text !== null), ...cited])].slice(0, 100);
};

/** The first header that has the keyword: the table's own, then that of the file. */
const firstText = (headers: readonly FitsHeader[], keywords: readonly string[]): string | null => {
  for (const header of headers)
    for (const keyword of keywords) {
      const text = header.text(keyword);
      if (text !== null) return text;
    }
  return null;
};

const frameOf = (headers: readonly FitsHeader[], findings: Findings): PositionFrame | null => {
  const system = firstText(headers, ["RADESYS", "RADECSYS"]);
  const own = firstText(headers, ["EQUINOX"]);
  const old = own === null ? firstText(headers, ["EPOCH"]) : null;
  const epoch = firstText(headers, EPOCH_KEYWORDS);
  if (old !== null)
    findings.add(
      {
        key: "fits-epoch-is-equinox",
        level: "note",
        message: "The keyword EPOCH is FITS's older name for the equinox, and was read as that.",
        hint: "If it means the epoch of the positions, say so where the epoch is asked for.",
      },
      `EPOCH = ${old}`,
    );
  const equinox = own ?? old;
  return system === null && equinox === null && epoch === null ? null : { system, equinox, epoch };
};

/**
 * What the headers say of the table's origin and of its positions.
 *
 * @param headers - The table's own and that of the file.
 */
export const readMeta = (headers: readonly FitsHeader[], findings: Findings): TableMeta => {
  const comments = headers.flatMap(plainComments);
  const history = headers.flatMap((header) => header.history.map((line) => line.trim()));
  const words = [...comments, ...history.filter((line) => line !== "")].join("\n");
  return {
    title: firstText(headers, ["EXTNAME", "OBJECT"]),
    description: words === "" ? null : shortened(words),
    sources: sourcesOf(headers),
    frame: frameOf(headers, findings),
  };
};
