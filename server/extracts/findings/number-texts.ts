import type { Finding } from "#shared/api/extracts.ts";
import { parseNumber } from "../../formats/numbers.ts";
import { isMarkedNumber } from "../cells.ts";
import { ask, examplesAt, type FindingCode, isAccepted, note, stop } from "./finding.ts";
import { groupBy, type Look, textAt, type UsedColumn } from "./look.ts";

const MINUS = /^\s*[\u2212\u2013\u2014]\s*[\d.]/;
/** `1,234.5`, `1 234`, `1'234'567`: parted by three digits, where a decimal mark would leave two readings or none. */
const THOUSANDS =
  /^[+-]?\d{1,3}(?:[\u0020\u00a0\u202f']\d{3})+(?:[.,]\d+)?$|^[+-]?\d{1,3}(?:,\d{3})+\.\d+$|^[+-]?\d{1,3}(?:\.\d{3})+,\d+$|^[+-]?\d{1,3}(?:[.,]\d{3}){2,}$/;

interface Kind {
  readonly code: FindingCode;
  is(text: string): boolean;
  readonly what: string;
  readonly hint: string;
}

/** In this order: a text is counted as the first that it is. */
const KINDS: readonly Kind[] = [
  {
    code: "thousands-marks",
    is: (text) => THOUSANDS.test(text),
    what: "part their digits by thousands, which is never guessed at. Rows with such a text will be refused.",
    hint: "Write the numbers without marks between the digits, or choose the other decimal mark.",
  },
  {
    code: "marked-numbers",
    is: isMarkedNumber,
    what: "are numbers with a limit, an error or a footnote. Such a cell stays blank and the original keeps its text; a position or an epoch like that refuses its row.",
    hint: "Put limits, errors and footnotes into columns of their own if they matter.",
  },
  {
    code: "unread-numbers",
    is: () => true,
    what: "are not numbers. Rows with such a text will be refused.",
    hint: "Name the text as a mark for “no value” if it is one, or mend the file.",
  },
];

const unreadKinds = (look: Look, used: UsedColumn): Finding[] => {
  const byKind = groupBy(used.unread, (row) => KINDS.findIndex((kind) => kind.is(textAt(used, row))));
  return [...byKind].map(([which, rows]) => {
    const { code, what, hint } = KINDS[which] as Kind;
    return note(
      code,
      `${rows.length} of ${used.given.length} texts looked at in “${used.card.header}” ${what}`,
      hint,
      { column: used.card.header, count: rows.length, examples: examplesAt(used.shown, look.lines, rows) },
    );
  });
};

const noNumbers = (look: Look, used: UsedColumn): Finding[] => [
  stop(
    "no-numbers",
    `Nothing in “${used.card.header}” reads as a number, so it cannot give ${used.meaning.label}.`,
    "Choose another column or another decimal mark.",
    {
      column: used.card.header,
      count: used.unread.length,
      examples: examplesAt(used.shown, look.lines, used.unread),
    },
  ),
];

const dashes = (look: Look, used: UsedColumn): Finding[] => {
  const rows = used.given.filter((row) => MINUS.test(textAt(used, row)));
  if (rows.length === 0) return [];
  return [
    note(
      "unicode-minus",
      `${rows.length} numbers looked at in “${used.card.header}” have a long dash or a printed minus for a sign. They are read as negative.`,
      "Nothing needs to be done.",
      { column: used.card.header, count: rows.length, examples: examplesAt(used.shown, look.lines, rows) },
    ),
  ];
};

/** Texts where numbers should be, sorted by what they are, and signs that are not the plain ones. */
export const numberTextFindings = (look: Look): Finding[] =>
  look.used
    .filter((u) => u.meaning.kind === "number")
    .flatMap((u) => {
      const isAllUnread = u.given.length > 0 && u.unread.length === u.given.length;
      return [...(isAllUnread ? noNumbers(look, u) : unreadKinds(look, u)), ...dashes(look, u)];
    });

const EITHER = /^[+-]?[1-9]\d{0,2},\d{3}$/;
const DECIMAL = /\d[.,]\d/;

/** Where every comma could be a decimal mark as well as a mark of thousands. */
export const decimalMarkFindings = (look: Look): Finding[] => {
  const { plan, sample } = look;
  if (sample.format !== "delimited" || sample.delimiter === "," || isAccepted(plan, "decimal-mark"))
    return [];
  const columns = look.used.filter((u) => u.meaning.kind === "number");
  const texts = columns.flatMap((u) => u.given.map((row) => textAt(u, row)));
  const marked = texts.filter((text) => DECIMAL.test(text));
  if (marked.length < 3 || !marked.every((text) => EITHER.test(text))) return [];
  const [first = ""] = marked;
  return [
    ask(
      "decimal-mark",
      `Numbers such as ${first} can be read in two ways: as ${parseNumber(first, ",")}, or as ${first.replace(",", "")} with a mark between the thousands.`,
      "Say what the comma is. Marks of thousands are not read: with the point as the decimal mark such texts are no numbers.",
      {
        count: marked.length,
        examples: marked.slice(0, 3).map((text) => ({ line: 0, text })),
        answers: [
          { value: "decimal:,", label: `A decimal mark: ${parseNumber(first, ",")}` },
          { value: "decimal:.", label: "A mark of thousands" },
        ],
      },
    ),
  ];
};
