import type { Extract, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { count, fixed } from "#shared/format/numbers.ts";

export const STATE_WORDS: Readonly<Record<Extract["state"], string>> = {
  receiving: "File not here yet",
  planning: "Reading plan open",
  importing: "Being committed",
  committed: "Committed",
  withdrawn: "Withdrawn",
};

const STEPS = ["bytes", "kB", "MB", "GB"] as const;

/** A size in decimal units, one digit after the point from kB on. */
export const sizeOf = (bytes: number): string => {
  const step = Math.min(STEPS.length - 1, Math.max(0, Math.floor(Math.log10(Math.max(1, bytes)) / 3)));
  return `${fixed(bytes / 1000 ** step, step === 0 ? 0 : 1)} ${STEPS[step]}`;
};

/** How much of the file has arrived, in whole percent: 100 % only when all has. */
export const shareOf = ({ receivedBytes, bytes }: Pick<Extract, "receivedBytes" | "bytes">): string =>
  `${bytes === 0 ? 0 : Math.floor((100 * receivedBytes) / bytes)} %`;

/** First and last digits of a hash, as people compare them. */
export const shortHash = (sha256: string): string => `${sha256.slice(0, 4)} … ${sha256.slice(-4)}`;

type Format = ReadingPlan["format"];

const FORMATS: Readonly<Record<Format, string>> = {
  delimited: "Delimited text",
  "fixed-width": "Fixed-width text",
  described: "Byte-by-byte table",
  votable: "VOTable",
  fits: "FITS table",
  ecsv: "ECSV",
};

/** What of the reading of the bytes is a person's to choose. */
export const hasDelimiter = (format: Format): boolean => format === "delimited";
export const hasEncoding = (format: Format): boolean =>
  format === "delimited" || format === "fixed-width" || format === "described";

export const DELIMITERS: Readonly<Record<ReadingPlan["delimiter"], string>> = {
  ",": "comma",
  ";": "semicolon",
  "\t": "tab",
  "|": "vertical bar",
  " ": "spaces",
};
export const ENCODINGS: Readonly<Record<ReadingPlan["encoding"], string>> = {
  "utf-8": "UTF-8",
  "utf-16le": "UTF-16",
  "utf-16be": "UTF-16 (big-endian)",
  latin1: "Latin-1 (Windows-1252)",
};
export const DECIMAL_MARKS: Readonly<Record<ReadingPlan["decimalMark"], string>> = {
  ".": "decimal point",
  ",": "decimal comma",
};

/** Of what the plan needs a person's answer for. */
export const openOf = (findings: readonly Finding[]): Finding[] => findings.filter((f) => f.level !== "note");

export const questionsLeft = (findings: readonly Finding[]): string => {
  const open = openOf(findings).length;
  if (open === 0) return "nothing is open";
  return open === 1 ? "1 question left" : `${count(open)} questions left`;
};

/** A Julian year as it is usually written: 2016.0. */
export const epochText = (year: number): string => (Number.isInteger(year) ? year.toFixed(1) : String(year));

/** How the bytes of a file are read, in a few words. */
export const readingOf = (
  plan: Pick<ReadingPlan, "format" | "encoding" | "delimiter" | "decimalMark">,
): string =>
  [
    FORMATS[plan.format],
    ...(hasDelimiter(plan.format) ? [DELIMITERS[plan.delimiter], DECIMAL_MARKS[plan.decimalMark]] : []),
    ...(hasEncoding(plan.format) ? [ENCODINGS[plan.encoding]] : []),
  ].join(", ");

const YEARS = { least: 1800, most: 2200 };
export const NO_YEAR = `Enter a year from ${YEARS.least} to ${YEARS.most}, for example 2016.0.`;

/** The year that was typed, with a point or a comma; undefined when it is none that positions can have. */
export const yearOf = (text: string): number | undefined => {
  const year = text.trim() === "" ? Number.NaN : Number(text.replace(",", "."));
  return year >= YEARS.least && year <= YEARS.most ? year : undefined;
};

/** A value as it was read: numbers with a true minus, texts as they are, and words where there is none. */
export const readText = ({ text, value }: { text: string; value: number | string | null }): string => {
  if (value === null) return text.trim() === "" ? "blank" : "no value";
  return typeof value === "number" ? String(value).replaceAll("-", "\u2212") : value;
};

/** A figure for the ends of a scale: at most six digits, powers of ten only far from one. */
export const figureText = (value: number): string => {
  const size = Math.abs(value);
  const isFar = size !== 0 && (size < 1e-3 || size >= 1e6);
  const text = isFar ? value.toExponential(2) : String(Number(value.toPrecision(6)));
  return text.replaceAll("-", "\u2212");
};
