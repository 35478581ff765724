import { badHeader, counted, quoted } from "./errors.ts";
import { BLOCK_LENGTH, type FitsHeader } from "./header.ts";

export type HduKind = "binary table" | "ASCII table" | "image" | "other data";

/** A header with its data: what it is and how large. */
export interface Hdu {
  readonly header: FitsHeader;
  readonly kind: HduKind;
  readonly name: string;
  /** Rows and bytes of a row; 0 for what is no table. */
  readonly rows: number;
  readonly rowBytes: number;
  /** Bytes of the data, without what fills the last block. */
  readonly dataBytes: number;
}

/** The standard's own bound, since keywords have eight characters. */
const MOST_AXES = 999;

const kindOf = (header: FitsHeader): HduKind => {
  const extension = header.text("XTENSION");
  if (extension === null || extension === "IMAGE") return "image";
  if (extension === "TABLE") return "ASCII table";
  if (extension !== "BINTABLE" && extension !== "A3DTABLE") return "other data";
  // A compressed image is kept in the rows of a binary table.
  return header.isTrue("ZIMAGE") ? "image" : "binary table";
};

const sizeOf = (header: FitsHeader): number => {
  const axes = header.count("NAXIS");
  if (axes > MOST_AXES)
    throw badHeader(`A header counts ${counted(axes)} axes; the format allows ${MOST_AXES}.`);
  if (axes === 0) return 0;
  const bits = Math.abs(header.number("BITPIX"));
  if (![8, 16, 32, 64].includes(bits))
    throw badHeader(
      `A header's BITPIX is ${quoted(header.text("BITPIX") ?? "")}, which the format does not know.`,
    );
  // In random groups the first axis counts nothing.
  const isGroups = header.isTrue("GROUPS") && header.count("NAXIS1") === 0;
  let elements = 1;
  for (let axis = isGroups ? 2 : 1; axis <= axes; axis++) elements *= header.count(`NAXIS${axis}`);
  const bytes = (bits / 8) * header.count("GCOUNT", 1) * (header.count("PCOUNT", 0) + elements);
  if (!Number.isSafeInteger(bytes)) throw badHeader("A header's counts make data larger than any file.");
  return bytes;
};

const checkTable = (header: FitsHeader, name: string): void => {
  const rules = { BITPIX: 8, NAXIS: 2, GCOUNT: 1 };
  for (const [keyword, value] of Object.entries(rules))
    if (header.number(keyword) !== value && !(keyword === "GCOUNT" && header.text(keyword) === null))
      throw badHeader(
        `The table ${quoted(name)} has ${keyword} = ${header.text(keyword) ?? "(missing)"} where the format wants ${value}, so its rows cannot be found.`,
      );
};

/**
 * @param place - Number of headers before this one, which names it where it has no name.
 */
export const describeHdu = (header: FitsHeader, place: number): Hdu => {
  const kind = kindOf(header);
  const isTable = kind === "binary table" || kind === "ASCII table";
  const name = header.text("EXTNAME") ?? `extension ${place}`;
  if (isTable) checkTable(header, name);
  return {
    header,
    kind,
    name,
    rows: isTable ? header.count("NAXIS2") : 0,
    rowBytes: isTable ? header.count("NAXIS1") : 0,
    dataBytes: sizeOf(header),
  };
};

/** Bytes that fill the last block of the data. */
export const paddingOf = (hdu: Hdu): number => (BLOCK_LENGTH - (hdu.dataBytes % BLOCK_LENGTH)) % BLOCK_LENGTH;
