import type { Column } from "../catalogue/columns.ts";

/**
 * Numbers as people read them. One rule for the whole product: where there is an error it sets the digits, where there
 * is none at most four significant digits are shown. Files carry every digit instead; see `plainNumber`.
 */

const MINUS = "\u2212";
const THIN_SPACE = "\u2009";
const MOST_DIGITS_WITHOUT_ERROR = 4;
/** Beyond these powers of ten a number is written with an exponent. */
const SMALLEST_PLAIN = 1e-3;
const LARGEST_PLAIN = 1e6;

/** Power of ten of the first digit. */
const magnitude = (value: number): number => Math.floor(Math.log10(Math.abs(value)));

/**
 * Decimals that the 355 rule gives for an error: its three leading digits from 100 to 354 show two digits, from 355 to
 * 949 one, from 950 it is rounded up to the next power of ten and shows two. Negative: digits before the point are cut.
 *
 * @param error above zero, finite
 */
export const decimalsForError = (error: number): number => {
  const power = magnitude(error);
  const leading = Math.round(error / 10 ** (power - 2));
  if (leading >= 950) return -power;
  return leading <= 354 ? 1 - power : -power;
};

/** Groups the whole part in threes with a thin space. */
export const groupThousands = (digits: string): string => {
  const [whole = "", fraction] = digits.split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, THIN_SPACE);
  return fraction === undefined ? grouped : `${grouped}.${fraction}`;
};

/** A number with that many decimals, as it stands on screen: true minus, thousands set apart. */
export const fixed = (value: number, decimals: number): string => {
  const cut = decimals < 0 ? Math.round(value / 10 ** -decimals) * 10 ** -decimals : value;
  const digits = groupThousands(Math.abs(cut).toFixed(Math.max(0, Math.min(20, decimals))));
  return cut < 0 && /[1-9]/.test(digits) ? `${MINUS}${digits}` : digits;
};

/** A whole number with its thousands set apart. */
export const count = (value: number): string => fixed(value, 0);

/** Scientific notation for what is too small or too large to read: 1.27 × 10⁻⁵. */
const scientific = (value: number, digits: number): string => {
  // Rounded before it is split, so that 9.999 × 10⁻⁴ becomes 1.00 × 10⁻³ and never 10.00 × 10⁻⁴.
  const [mantissa = "", power = ""] = value.toExponential(digits - 1).split("e");
  const superscript = [...power.replace("+", "")].map((c) => "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(c)] ?? "⁻").join("");
  return `${fixed(Number(mantissa), digits - 1)} × 10${superscript}`;
};

/** A number of which no error is known: at most four significant digits and never more decimals than asked. */
export const withoutError = (value: number, mostDecimals: number): string => {
  const rounded = Number(value.toPrecision(MOST_DIGITS_WITHOUT_ERROR));
  if (rounded === 0) return fixed(0, 0);
  const size = Math.abs(rounded);
  if (size < SMALLEST_PLAIN || size >= LARGEST_PLAIN) return scientific(value, 3);
  const byDigits = MOST_DIGITS_WITHOUT_ERROR - 1 - magnitude(rounded);
  return fixed(rounded, Math.max(0, Math.min(mostDecimals, byDigits)));
};

export interface ShownNumber {
  value: string;
  /** Without its sign; null where no error is given. */
  error: string | null;
}

/**
 * A value and its error cut at the same place: 0.3344 ± 0.0097 → 0.334 ± 0.010.
 *
 * @param mostDecimals decimals where no error sets them
 */
export const withError = (value: number, error: number | undefined, mostDecimals: number): ShownNumber => {
  if (error === undefined || !(error > 0) || !Number.isFinite(error))
    return { value: withoutError(value, mostDecimals), error: null };
  const decimals = decimalsForError(error);
  return { value: fixed(value, decimals), error: fixed(error, decimals) };
};

/** Parts per million: whole from 100 on, one decimal below. */
const ppm = (value: number): string => fixed(value, Math.abs(value) >= 99.95 ? 0 : 1);

/** A percentage with two to three significant digits. */
const percent = (value: number): string =>
  value === 0 ? "0" : fixed(value, Math.max(0, Math.min(4, 2 - magnitude(value))));

/** Columns whose digits belong to the column, so that they line up, and not to each star's error. */
const fixesDigits = (column: Column): boolean => column.key === "ra" || column.key === "dec";

/**
 * The text of a cell in the unit of the column's head, with its error.
 *
 * @param value in the canonical unit of the registry
 */
export const formatCell = (column: Column, value: number, error?: number): ShownNumber => {
  const factor = column.shownFactor ?? 1;
  const shown = value * factor;
  const shownError = error === undefined ? undefined : error * factor;
  if (column.kind === "integer") return { value: count(shown), error: null };
  // A year is not set apart in threes.
  if (column.key === "epoch") return { value: shown.toFixed(column.decimals), error: null };
  if (fixesDigits(column)) return { value: fixed(shown, column.decimals), error: null };
  if (shownError !== undefined && shownError > 0) return withError(shown, shownError, column.decimals);
  if (column.unitLabel === "ppm") return { value: ppm(shown), error: null };
  if (column.unitLabel === "%") return { value: percent(shown), error: null };
  return { value: withoutError(shown, column.decimals), error: null };
};

/** The same as one line of text: `0.334 ± 0.010`. */
export const cellText = (column: Column, value: number, error?: number): string => {
  const shown = formatCell(column, value, error);
  return shown.error === null ? shown.value : `${shown.value} ± ${shown.error}`;
};

/** A number for files and the clipboard: the shortest text that reads back to the same bits, with a plain minus. */
export const plainNumber = (value: number): string => (Object.is(value, -0) ? "0" : String(value));
