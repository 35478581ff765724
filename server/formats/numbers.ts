/** Texts to numbers, as files of the trade spell them. Pure, and quick: these run for every cell. */

const MINUSES = /[\u2212\u2013\u2014]/g;
const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const FORTRAN = /^([+-]?(?:\d+\.?\d*|\.\d+))[dD]([+-]?\d+)$/;

/** Texts that say "no value" in any column, besides the empty cell. */
const BLANK_WORDS = new Set(["nan", "null", "none", "n/a", "na", "-", "--", "---", "indef", "\\n", "nil"]);

export const isBlankWord = (text: string): boolean =>
  text === "" || (text.length <= 5 && BLANK_WORDS.has(text.toLowerCase()));

/** No number is written longer; the time to refuse a longer text would grow with the square of its length. */
const LONGEST_NUMBER = 500;

/** NaN for what is not a plain number: nothing is cut off, and thousands marks are never guessed. */
export const parseNumber = (text: string, decimalMark: "." | ","): number => {
  if (text.length > LONGEST_NUMBER) return Number.NaN;
  let plain = text;
  if (decimalMark === ",") {
    if (plain.includes(".")) return Number.NaN;
    plain = plain.replace(",", ".");
  }
  if (NUMBER.test(plain)) return Number(plain);
  if (MINUSES.test(plain)) {
    MINUSES.lastIndex = 0;
    return parseNumber(plain.replace(MINUSES, "-"), ".");
  }
  const fortran = FORTRAN.exec(plain);
  return fortran ? Number(`${fortran[1]}e${fortran[2]}`) : Number.NaN;
};

const SEXAGESIMAL =
  /^([+-]?)(\d{1,3})(?:\s*:\s*|\s*[hd°]\s*|\s+)(\d{1,2})(?:\s*:\s*|\s*[m'′]\s*|\s+)(\d{1,2}(?:\.\d*)?)\s*[s"″]?$/;

export const isSexagesimal = (text: string): boolean => SEXAGESIMAL.test(text.replace(MINUSES, "-"));

/**
 * Whole and sixtieth parts as one number, in the unit of the first part. The sign counts for −00 too; sixty seconds
 * carry over.
 */
export const parseSexagesimal = (text: string): number => {
  const parts = SEXAGESIMAL.exec(text.replace(MINUSES, "-"));
  if (!parts) return Number.NaN;
  const minutes = Number(parts[3]);
  const seconds = Number(parts[4]);
  if (minutes > 60 || seconds > 60) return Number.NaN;
  const size = Number(parts[2]) + minutes / 60 + seconds / 3600;
  return parts[1] === "-" ? -size : size;
};
