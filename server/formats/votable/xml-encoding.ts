import { short, unreadable } from "./faults.ts";

/** Enough for any XML declaration. */
export const DECLARATION_BYTES = 1024;

const DECLARED = /^\s*<\?xml\s[^>]*?encoding\s*=\s*["']\s*([A-Za-z][\w.:-]*)\s*["']/;

const byMark = (start: Uint8Array): string | null => {
  const [a, b, c] = start;
  if (a === 0xff && b === 0xfe) return "utf-16le";
  if (a === 0xfe && b === 0xff) return "utf-16be";
  if (a === 0xef && b === 0xbb && c === 0xbf) return "utf-8";
  if (a === 0x3c && b === 0) return "utf-16le";
  if (a === 0 && b === 0x3c) return "utf-16be";
  return null;
};

/**
 * Encoding of an XML text by its mark, else by its declaration, else UTF-8 (XML 1.0, W3C 2008, appendix F), as
 * TextDecoder names it. Latin-1 is read as Windows-1252, which holds it.
 *
 * @throws AppError where the declaration names an encoding that nothing here decodes
 */
export const xmlEncoding = (start: Uint8Array): string => {
  const marked = byMark(start);
  if (marked) return marked;
  const head = Buffer.from(start.subarray(0, DECLARATION_BYTES)).toString("latin1");
  const label = DECLARED.exec(head)?.[1];
  // A declaration that could be read byte by byte is not UTF-16, whatever it says.
  if (label === undefined || /^utf-?16/i.test(label)) return "utf-8";
  try {
    return new TextDecoder(label).encoding;
  } catch {
    throw unreadable(
      "unknown-encoding",
      `The file says that its text is encoded as "${short(label)}", which cannot be decoded here.`,
      "Save the file as UTF-8 and bring it as a new extract.",
    );
  }
};
