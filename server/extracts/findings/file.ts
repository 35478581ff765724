import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { parseNumber } from "../../formats/numbers.ts";
import type { Sample } from "../sample.ts";
import { accept, ask, examplesOf, isAccepted, note, stop } from "./finding.ts";

const notReadable = (sample: Sample): Finding | null => {
  if (sample.isEmpty)
    return stop("empty-file", "The file is empty.", "Get it again, and bring it as a new extract.");
  if (sample.isBigEndian)
    return stop(
      "unread-encoding",
      "The file is text in big-endian UTF-16, which is not read here.",
      "Save it as UTF-8 and bring it as a new extract.",
    );
  if (sample.instead !== null)
    return stop(
      "not-a-table",
      `This is ${sample.instead}, not a table as text, whatever its name says.`,
      "Export the table as CSV and bring that as a new extract.",
    );
  return null;
};

const cutOff = ({ cutLine, header }: Sample): Finding[] =>
  cutLine
    ? [
        stop(
          "file-cut-off",
          `The file ends in the middle of a line: its last line has ${cutLine.cells.length} of ${header.length} values. It was probably cut off on its way.`,
          "Get the file again and bring it as a new extract.",
          { examples: examplesOf([cutLine]) },
        ),
      ]
    : [];

const headless = ({ header }: Sample): Finding[] =>
  header.length > 0 && header.every((name) => !Number.isNaN(parseNumber(name, ".")))
    ? [
        stop(
          "no-header",
          "The first line holds numbers, so the columns have no names.",
          "Put a line with the names of the columns first and bring the file as a new extract.",
        ),
      ]
    : [];

const rowless = ({ rows, uneven, cutLine, found }: Sample): Finding[] => {
  if (rows.length > 0 || cutLine || found.some((f) => f.level === "stop")) return [];
  const isUneven = uneven.length > 0;
  return [
    stop(
      "header-only",
      isUneven
        ? "No row has as many values as the first line has names."
        : "The file has a line of names and no rows.",
      isUneven
        ? "Choose another delimiter, or look at the first lines of the file."
        : "Get the table with its rows and bring it as a new extract.",
      { examples: examplesOf(uneven) },
    ),
  ];
};

const ragged = ({ rows, uneven, header }: Sample): Finding[] =>
  rows.length > 0 && uneven.length > 0
    ? [
        note(
          "uneven-rows",
          `Some rows have more or fewer values than the ${header.length} of the first line. They will be refused: nothing is guessed about where a value belongs.`,
          "Look at the rows below; mend the file if they matter.",
          { count: uneven.length, examples: examplesOf(uneven) },
        ),
      ]
    : [];

const BEYOND_ASCII = /[^\u0020-\u007e\t]/;

/** The same bytes as they would read in UTF-8. */
const inUtf8 = (text: string): string => Buffer.from(text, "latin1").toString("utf8");

const guessedEncoding = ({ isEncodingGuessed, rows }: Sample, plan: ReadingPlan | null): Finding[] => {
  if (!isEncodingGuessed || (plan && isAccepted(plan, "encoding-guessed"))) return [];
  const hit = rows.filter((row) => BEYOND_ASCII.test(row.text));
  return [
    ask(
      "encoding-guessed",
      "Some bytes are not UTF-8, so the text is read as Latin-1 (Windows-1252).",
      "Compare the lines below as they read in Latin-1 and in UTF-8, and choose.",
      {
        count: Math.max(hit.length, 1),
        examples: examplesOf(hit.map((row) => ({ ...row, text: `${row.text} → ${inUtf8(row.text)}` }))),
        answers: [
          accept("Read as Latin-1"),
          { value: "encoding:utf-8", label: "Read as UTF-8, stray bytes as \ufffd" },
        ],
      },
    ),
  ];
};

/** Signs that stand for bytes which mean nothing in the encoding that the file is read in. */
const strayBytes = ({ rows, header }: Sample, plan: ReadingPlan | null): Finding[] => {
  const hit = rows.filter((row) => row.cells.some((cell) => cell.includes("\ufffd")));
  const names = header.filter((name) => name.includes("\ufffd")).length;
  if (hit.length + names === 0 || (plan && isAccepted(plan, "stray-bytes"))) return [];
  return [
    ask(
      "stray-bytes",
      `${hit.length} of the rows looked at hold bytes that mean nothing in this encoding; each is shown as \ufffd.`,
      "Choose another encoding if letters are missing, or take them as they are.",
      {
        count: hit.length + names,
        examples: examplesOf(hit),
        answers: [accept("Take them as they are"), { value: "encoding:latin1", label: "Read as Latin-1" }],
      },
    ),
  ];
};

/** What the file itself is, whatever the plan. */
export const fileFindings = (sample: Sample, plan: ReadingPlan | null = null): Finding[] => {
  const refusal = notReadable(sample);
  if (refusal) return [refusal];
  return [
    ...cutOff(sample),
    ...headless(sample),
    ...rowless(sample),
    ...ragged(sample),
    ...guessedEncoding(sample, plan),
    ...strayBytes(sample, plan),
  ];
};
