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

/** First and last digits of a hash, as people compare them. */
export const shortHash = (sha256: string): string => `${sha256.slice(0, 4)} … ${sha256.slice(-4)}`;

export const DELIMITERS: Readonly<Record<ReadingPlan["delimiter"], string>> = {
  ",": "comma",
  ";": "semicolon",
  "\t": "tab",
  "|": "vertical bar",
};
export const ENCODINGS: Readonly<Record<ReadingPlan["encoding"], string>> = {
  "utf-8": "UTF-8",
  "utf-16le": "UTF-16",
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
