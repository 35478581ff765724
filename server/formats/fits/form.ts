/** Forms of columns, as TFORM spells them. */

export type BinaryCode = "L" | "X" | "B" | "I" | "J" | "K" | "A" | "E" | "D" | "C" | "M" | "P" | "Q";

export interface BinaryForm {
  readonly code: BinaryCode;
  /** Elements in one cell. */
  readonly repeat: number;
  /** Bytes of one cell in its row. */
  readonly bytes: number;
  /** What follows the code, e.g. the element type of a variable-length array. */
  readonly more: string;
}

const ELEMENT_BYTES: Record<Exclude<BinaryCode, "X">, number> = {
  L: 1,
  B: 1,
  I: 2,
  J: 4,
  K: 8,
  A: 1,
  E: 4,
  D: 8,
  C: 8,
  M: 16,
  P: 8,
  Q: 16,
};

/** rTa of a binary table; null where it cannot be read. */
export const readBinaryForm = (text: string): BinaryForm | null => {
  const parts = /^(\d{0,12})\s*([LXBIJKAEDCMPQ])(.*)$/.exec(text.trim().toUpperCase());
  if (!parts) return null;
  const repeat = parts[1] ? Number(parts[1]) : 1;
  const code = parts[2] as BinaryCode;
  const bytes = code === "X" ? Math.ceil(repeat / 8) : repeat * ELEMENT_BYTES[code];
  return { code, repeat, bytes, more: parts[3]?.trim() ?? "" };
};

export interface AsciiForm {
  readonly code: "A" | "I" | "F" | "E" | "D";
  /** Characters of the field. */
  readonly width: number;
  /** Digits behind a decimal point that the field leaves out. */
  readonly decimals: number;
}

/** Aw, Iw, Fw.d, Ew.d or Dw.d of an ASCII table; null where it cannot be read. */
export const readAsciiForm = (text: string): AsciiForm | null => {
  const parts = /^([AIFED])(\d{1,9})(?:\.(\d{1,3}))?(?:E\d+)?$/.exec(text.trim().toUpperCase());
  if (!parts || Number(parts[2]) === 0) return null;
  const code = parts[1] as AsciiForm["code"];
  const hasDecimals = code !== "A" && code !== "I";
  return { code, width: Number(parts[2]), decimals: hasDecimals ? Number(parts[3] ?? 0) : 0 };
};
