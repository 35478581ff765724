/** Numbers as the fields of an ASCII table spell them. */

const NUMBER = /^([+-]?)(\d*)(?:(\.)(\d*))?(?:[EeDd]([+-]?\d{1,6})|([+-]\d{1,6}))?$/;

/** Whether a field writes digits without a point, so that the point's place is that of its form. */
export const isPointLeftOut = (text: string, decimals: number): boolean =>
  decimals > 0 && text !== "" && !text.includes(".");

/**
 * Value of a field without its blanks; NaN for what is not a plain number. Exponents may be written with D or with
 * their sign alone, and a point that is left out stands before the last `decimals` digits.
 *
 * @see Definition of the FITS, version 4.0, section 7.2.5 (from memory).
 */
export const readAsciiNumber = (text: string, decimals: number): number => {
  // Plain numbers take the short way; a point keeps out what only JavaScript takes for a number.
  if (text.includes(".")) {
    const plain = Number(text);
    if (Number.isFinite(plain)) return plain;
  }
  const parts = NUMBER.exec(text);
  if (!parts) return Number.NaN;
  const [, sign = "", whole = "", point, fraction = "", marked, bare] = parts;
  if (whole === "" && fraction === "") return Number.NaN;
  const exponent = Number(marked ?? bare ?? 0) - (point ? 0 : decimals);
  return Number(`${sign}${whole || "0"}.${fraction}e${exponent}`);
};

/** All digits of a whole number; null for what is none, or has more digits than any count of things. */
export const readAsciiWhole = (text: string): bigint | null =>
  /^[+-]?\d{1,40}$/.test(text) ? BigInt(text.replace("+", "")) : null;
