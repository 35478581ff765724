import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { acceptedKey } from "#shared/catalogue/answers.ts";
import type { SampleColumn } from "../sample.ts";

/** Everything that is found here; what the readers of the formats find keeps the key that they give it. */
export const FINDING_CODES = [
  "blank-mark",
  "cos-dec",
  "cos-dec-doubt",
  "damaged-identifiers",
  "dec-beyond-pole",
  "decimal-mark",
  "delimiter-doubt",
  "empty-file",
  "encoding-guessed",
  "epoch-missing",
  "error-negative",
  "error-zero",
  "file-cut-off",
  "formula-text",
  "frame-missing",
  "frame-unread",
  "half-a-position",
  "header-case",
  "header-long",
  "header-only",
  "headers-renamed",
  "j2000-doubt",
  "magnitude-system",
  "magnitude-system-mixed",
  "marked-numbers",
  "meaning-doubtful",
  "meaning-twice",
  "minus-zero",
  "mixed-marks",
  "motions-swapped",
  "no-header",
  "no-numbers",
  "not-a-table",
  "nothing-usable",
  "out-of-range",
  "parallax-blank",
  "parallax-not-positive",
  "ra-out-of-range",
  "ra-unit",
  "round-number",
  "seconds-carried",
  "stray-bytes",
  "thousands-marks",
  "uneven-rows",
  "unicode-minus",
  "unit-doubt",
  "unit-slip",
  "unit-unknown",
  "unit-unknown-unused",
  "unknown-meaning",
  "unread-encoding",
  "unread-numbers",
  "values-shifted",
] as const;

export type FindingCode = (typeof FINDING_CODES)[number];

export type Answers = Finding["answers"];
type More = Partial<Pick<Finding, "column" | "count" | "examples" | "answers">>;

const made =
  (level: Finding["level"]) =>
  (code: FindingCode, message: string, hint: string, more: More = {}): Finding => ({
    level,
    code,
    message,
    hint,
    column: null,
    count: 1,
    examples: [],
    answers: [],
    ...more,
  });

/** There is no going on. */
export const stop = made("stop");
/** A person must answer. */
export const ask = made("ask");
/** Worth knowing. */
export const note = made("note");

export const isOpen = (f: Finding): boolean => f.level !== "note";

export const accept = (label: string): Answers[number] => ({ value: "accept", label });

/** Whether the plan says that the file is taken as it is, in that respect. */
export const isAccepted = (plan: ReadingPlan, code: FindingCode, column: string | null = null): boolean =>
  (plan.accepted ?? []).includes(acceptedKey({ code, column }));

const EXAMPLES = 3;
const EXAMPLE_CHARACTERS = 200;

export const example = (r: { line: number; text: string }): Finding["examples"][number] => ({
  line: r.line,
  text: r.text.slice(0, EXAMPLE_CHARACTERS),
});

/** A few of those rows of a column, with their lines. */
export const examplesAt = (
  { texts }: Pick<SampleColumn, "texts">,
  lines: readonly number[],
  rows: readonly number[],
): Finding["examples"] =>
  rows.slice(0, EXAMPLES).map((row) => example({ line: lines[row] ?? 0, text: (texts[row] ?? "").trim() }));

/** A few of those records. */
export const examplesOf = (records: readonly { line: number; text: string }[]): Finding["examples"] =>
  records.slice(0, EXAMPLES).map(example);

export const quoted = (names: readonly string[]): string => names.map((n) => `“${n}”`).join(" and ");

/** A number as messages write it: a true minus, and no more digits than it needs. */
export const said = (value: number): string => String(Number(value.toPrecision(6))).replace("-", "−");

/** A number with two digits that count. */
export const roughly = (value: number): string => said(Number(value.toPrecision(2)));
