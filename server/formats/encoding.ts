export type Encoding = "utf-8" | "utf-16le" | "utf-16be" | "latin1";

export interface DetectedEncoding {
  encoding: Encoding;
  /** Neither a mark nor valid UTF-8 said so: single bytes are taken for Latin letters. */
  isGuess: boolean;
  /** Bytes of big-endian UTF-16, which is not read. */
  isUnreadable: boolean;
}

const isUtf8 = (bytes: Uint8Array): boolean => {
  try {
    new TextDecoder("utf-8", { fatal: true }).decode(bytes, { stream: true });
    return true;
  } catch {
    return false;
  }
};

/** By its mark; without one UTF-8 where the bytes allow it. */
export const detectEncoding = (start: Uint8Array): DetectedEncoding => {
  if (start[0] === 0xff && start[1] === 0xfe)
    return { encoding: "utf-16le", isGuess: false, isUnreadable: false };
  if (start[0] === 0xfe && start[1] === 0xff)
    return { encoding: "utf-16le", isGuess: false, isUnreadable: true };
  if (isUtf8(start)) return { encoding: "utf-8", isGuess: false, isUnreadable: false };
  return { encoding: "latin1", isGuess: true, isUnreadable: false };
};

/** Decodes piece by piece; the mark at the beginning never becomes part of the first name. */
export const textDecoder = (
  encoding: Encoding,
): { decode(piece?: Uint8Array, options?: { stream?: boolean }): string } =>
  new TextDecoder(encoding === "latin1" ? "windows-1252" : encoding);

const MAGIC: readonly { text: string; what: string }[] = [
  { text: "SIMPLE  =", what: "a FITS file" },
  { text: "\u001f\u008b", what: "a gzip archive" },
  { text: "PK\u0003\u0004", what: "a zip archive or a spreadsheet" },
  { text: "%PDF", what: "a PDF document" },
  { text: "<?xml", what: "an XML document, such as a VOTable" },
  { text: "<VOTABLE", what: "a VOTable" },
  { text: "<!DOCTYPE", what: "a web page" },
  { text: "<html", what: "a web page" },
  { text: "\u0089PNG", what: "a picture" },
];

const CONTROL_SHARE = 0.01;

/** What the file is instead of a table as text; null when it looks like text. */
export const notATable = (start: Uint8Array, encoding: Encoding): string | null => {
  const head = Buffer.from(start.subarray(0, 16)).toString("latin1");
  const magic = MAGIC.find((m) => head.toLowerCase().startsWith(m.text.toLowerCase()));
  if (magic) return magic.what;
  if (encoding === "utf-16le") return null;
  let control = 0;
  for (const byte of start) {
    if (byte === 0) return "a binary file";
    if (byte < 32 && byte !== 9 && byte !== 10 && byte !== 13 && byte !== 12) control++;
  }
  return control > start.length * CONTROL_SHARE ? "a binary file" : null;
};
