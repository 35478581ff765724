import type { ColumnCard, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";
import { parseNumber } from "../formats/numbers.ts";
import { numberReader, unitOf } from "./cells.ts";
import type { Sample } from "./sample.ts";
import { textsOf } from "./suggest.ts";

const EXAMPLES = 3;
const EXAMPLE_CHARACTERS = 200;

type More = Partial<Pick<Finding, "column" | "count" | "examples" | "answers">>;

const finding =
  (level: Finding["level"]) =>
  (code: string, message: string, hint: string, more: More = {}): Finding => ({
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

const stop = finding("stop");
const ask = finding("ask");
const note = finding("note");

/** Numbers that files put where there is none. */
const SUSPECTS = [
  -999, -9999, -99, -99.9, -99.99, -999.9, -999.99, -999999, 99, 99.9, 99.99, 99.999, 999, 999.9, 999.99,
  9999, 9999.99, 99999, 999999, 9999999, 100000, -2147483648, -32768, 1e20, 1e30,
];

/** What the file itself is, whatever the plan. */
export const fileFindings = (sample: Sample): Finding[] => {
  if (sample.isEmpty)
    return [stop("empty-file", "The file is empty.", "Get it again, and bring it as a new extract.")];
  if (sample.isBigEndian)
    return [
      stop(
        "unread-encoding",
        "The file is text in big-endian UTF-16, which is not read here.",
        "Save it as UTF-8 and bring it as a new extract.",
      ),
    ];
  if (sample.instead !== null)
    return [
      stop(
        "not-a-table",
        `This is ${sample.instead}, not a table as text, whatever its name says.`,
        "Export the table as CSV and bring that as a new extract.",
      ),
    ];
  const found: Finding[] = [];
  if (sample.cutLine)
    found.push(
      stop(
        "file-cut-off",
        `The file ends in the middle of a line: its last line has ${sample.cutLine.cells.length} of ${sample.header.length} values. It was probably cut off on its way.`,
        "Get the file again and bring it as a new extract.",
        { examples: [example(sample.cutLine)] },
      ),
    );
  if (sample.header.length > 0 && sample.header.every((name) => !Number.isNaN(parseNumber(name, "."))))
    found.push(
      stop(
        "no-header",
        "The first line holds numbers, so the columns have no names.",
        "Put a line with the names of the columns first and bring the file as a new extract.",
      ),
    );
  if (sample.rows.length === 0 && !sample.cutLine)
    found.push(
      stop(
        "header-only",
        sample.uneven.length > 0
          ? "No row has as many values as the first line has names."
          : "The file has a line of names and no rows.",
        sample.uneven.length > 0
          ? "Choose another delimiter, or look at the first lines of the file."
          : "Get the table with its rows and bring it as a new extract.",
        { examples: sample.uneven.slice(0, EXAMPLES).map(example) },
      ),
    );
  else if (sample.uneven.length > 0)
    found.push(
      note(
        "uneven-rows",
        `Some rows have more or fewer values than the ${sample.header.length} of the first line. They will be refused: nothing is guessed about where a value belongs.`,
        "Look at the rows below; mend the file if they matter.",
        { count: sample.uneven.length, examples: sample.uneven.slice(0, EXAMPLES).map(example) },
      ),
    );
  if (sample.renamed.length > 0)
    found.push(
      note(
        "headers-renamed",
        `${sample.renamed.length} columns share a name or have none; here they are called ${sample.renamed
          .slice(0, 5)
          .map((r) => `“${r.to}”`)
          .join(", ")}.`,
        "Nothing needs to be done; the original keeps its names.",
        { count: sample.renamed.length },
      ),
    );
  if (sample.isEncodingGuessed)
    found.push(
      note(
        "encoding-guessed",
        "Some bytes are not UTF-8, so the text is read as Latin-1 (Windows-1252).",
        "Look at names with accents; choose another encoding if they are wrong.",
      ),
    );
  return found;
};

const example = (r: { line: number; text: string }): Finding["examples"][number] => ({
  line: r.line,
  text: r.text.slice(0, EXAMPLE_CHARACTERS),
});

const quoted = (names: string[]): string => names.map((n) => `“${n}”`).join(" and ");

const mappingFindings = (used: ColumnCard[]): Finding[] => {
  const found: Finding[] = [];
  const means = new Set(used.map((c) => c.means));
  for (const key of means) {
    const cards = used.filter((c) => c.means === key);
    if (cards.length > 1)
      found.push(
        stop(
          "meaning-twice",
          `${quoted(cards.map((c) => c.header))} are both said to give ${findMeaning(key)?.label}.`,
          "Let one of them give it and keep the others unused.",
          { column: cards[1]?.header ?? null, count: cards.length },
        ),
      );
  }
  if (means.has("ra") !== means.has("dec"))
    found.push(
      stop(
        "half-a-position",
        "A position needs both RA and Dec, and only one of them is named.",
        "Say which column gives the other, or use neither.",
      ),
    );
  const isPlaced = means.has("ra") && means.has("dec");
  const isNamed = means.has("source_id") || means.has("designation");
  const hasMore = used.some((c) => !["source_id", "designation", "release"].includes(c.means));
  if (!isPlaced && !(isNamed && hasMore))
    found.push(
      stop(
        "nothing-usable",
        "No columns were found that place or name a star: RA and Dec, or an identifier and at least one quantity.",
        "Say below which columns give them, or bring another file.",
      ),
    );
  return found;
};

const SPREADSHEET = /^[+-]?\d[.,]?\d*e\+\d+$/i;
const ROUNDED = /^\d{12,15}0{4,}$/;

const identifierFindings = (sample: Sample, card: ColumnCard): Finding[] => {
  const texts = textsOf(sample, card.index);
  const damaged = texts.filter((t) => SPREADSHEET.test(t) || ROUNDED.test(t));
  const isDamaged = texts.some((t) => SPREADSHEET.test(t)) || damaged.length > texts.length / 2;
  if (texts.length === 0 || !isDamaged) return [];
  return [
    stop(
      "damaged-identifiers",
      "These identifiers have been through a spreadsheet, which keeps 15 digits at most. They cannot be repaired.",
      "Bring the file from before the spreadsheet.",
      {
        column: card.header,
        count: damaged.length,
        examples: damaged.slice(0, EXAMPLES).map((text) => ({ line: 0, text })),
      },
    ),
  ];
};

const markFindings = (card: ColumnCard, values: { text: string; value: number }[]): Finding[] => {
  const answered = new Set([...card.blankMarks, ...(card.keptNumbers ?? [])]);
  const rest = values.filter((v) => !SUSPECTS.includes(v.value)).map((v) => v.value);
  if (rest.length === 0) return [];
  const least = rest.reduce((a, b) => Math.min(a, b));
  const most = rest.reduce((a, b) => Math.max(a, b));
  const span = Math.max(most - least, Math.abs(most) * 0.1);
  const counts = new Map<string, number>();
  for (const { text, value } of values) {
    if (!SUSPECTS.includes(value) || answered.has(text)) continue;
    counts.set(text, (counts.get(text) ?? 0) + 1);
  }
  return [...counts].flatMap(([text, count]) => {
    const value = Number(text.replace(",", "."));
    const isApart = value > most + span || value < least - span;
    const isSpike = count >= 3 && (value > most || value < least);
    if (!isApart && !isSpike) return [];
    return [
      ask(
        "blank-mark",
        `${text} stands ${count} times in “${card.header}” of the rows looked at, and everything else lies from ${least} to ${most}. Is it a mark for “no value”?`,
        "Say whether it is a mark or a number.",
        {
          column: card.header,
          count,
          answers: [
            { value: `blank:${text}`, label: "A mark for no value" },
            { value: `number:${text}`, label: "A number" },
          ],
        },
      ),
    ];
  });
};

const numberFindings = (sample: Sample, card: ColumnCard, plan: ReadingPlan): Finding[] => {
  const meaning = findMeaning(card.means);
  if (!meaning) return [];
  const unit = unitOf(card, plan);
  // An empty unit of RA is the question of hours or degrees, which is asked by itself.
  if (conversionTo(meaning.unit, unit) === undefined && !(card.means === "ra" && unit === ""))
    return [
      ask(
        "unit-unknown",
        unit === ""
          ? `“${card.header}” has no unit.`
          : `The unit “${unit}” of “${card.header}” is not one that ${meaning.label} is known to come in.`,
        `Choose its unit; the catalogue keeps ${meaning.label} in ${meaning.unit || "pure numbers"}.`,
        { column: card.header },
      ),
    ];
  const read = numberReader(card, plan);
  const texts = textsOf(sample, card.index);
  const unread = texts.filter((t) => read(t) === null);
  const found: Finding[] = [];
  if (texts.length > 0 && unread.length === texts.length)
    found.push(
      stop(
        "no-numbers",
        `Nothing in “${card.header}” reads as a number, so it cannot give ${meaning.label}.`,
        "Choose another column or another decimal mark.",
        {
          column: card.header,
          count: unread.length,
          examples: unread.slice(0, EXAMPLES).map((text) => ({ line: 0, text })),
        },
      ),
    );
  else if (unread.length > 0)
    found.push(
      note(
        "unread-numbers",
        `${unread.length} of ${texts.length} texts looked at in “${card.header}” are not numbers. Rows with such a text will be refused.`,
        "Name the text as a mark for “no value” if it is one, or mend the file.",
        {
          column: card.header,
          count: unread.length,
          examples: unread.slice(0, EXAMPLES).map((text) => ({ line: 0, text })),
        },
      ),
    );
  const values = texts.flatMap((text) => {
    const value = parseNumber(text, plan.decimalMark);
    return Number.isNaN(value) ? [] : [{ text, value }];
  });
  return [...found, ...markFindings(card, values)];
};

const LEAST_ROWS_FOR_DOUBT = 50;
const WIDE_DEGREES = 60;

const raFindings = (sample: Sample, used: ColumnCard[], plan: ReadingPlan): Finding[] => {
  const ra = used.find((c) => c.means === "ra");
  const dec = used.find((c) => c.means === "dec");
  if (!ra || !dec || plan.raUnit !== null) return [];
  const values = (card: ColumnCard): number[] =>
    textsOf(sample, card.index)
      .map((t) => parseNumber(t, plan.decimalMark))
      .filter((v) => !Number.isNaN(v));
  const ras = values(ra);
  if (ra.unit === "" && ras.some((v) => v >= 24))
    return [ask("unit-unknown", `“${ra.header}” has no unit.`, "Choose its unit.", { column: ra.header })];
  if (ras.length === 0 || ras.some((v) => v < 0 || v >= 24)) return [];
  const decs = values(dec);
  const span = decs.length > 0 ? Math.max(...decs) - Math.min(...decs) : 0;
  const isDegrees = conversionTo("deg", ra.unit)?.factor === 1;
  const isDoubtful = isDegrees && ras.length >= LEAST_ROWS_FOR_DOUBT && span > WIDE_DEGREES;
  if (ra.unit !== "" && !isDoubtful) return [];
  const said = ra.unit === "" ? "has no unit" : `is said to be in ${ra.unit}`;
  return [
    ask(
      "ra-unit",
      `RA ${said}. All values looked at lie between 0 and 24 while Dec spans ${Math.round(span)}°. As degrees every star would stand in one strip of the sky.`,
      "Say whether they are hours or degrees.",
      {
        column: ra.header,
        count: ras.length,
        answers: [
          { value: "hour", label: "Hours" },
          { value: "deg", label: "Degrees" },
        ],
      },
    ),
  ];
};

const epochFindings = (used: ColumnCard[], plan: ReadingPlan): Finding[] => {
  const means = new Set(used.map((c) => c.means));
  if (!means.has("ra") || !means.has("dec") || means.has("epoch") || plan.epoch !== null) return [];
  return [
    ask(
      "epoch-missing",
      "This table does not say at which date its positions are true. A fast star would be misplaced by many arcseconds.",
      "Enter the epoch as a year, for example 2016.0.",
    ),
  ];
};

/** All that is to be said about the file under that plan. While a Stop or an Ask is open there is no import. */
export const planFindings = (sample: Sample, plan: ReadingPlan): Finding[] => {
  const file = fileFindings(sample);
  if (file.some((f) => f.level === "stop")) return file;
  const used = plan.columns.filter((c) => c.means !== KEPT);
  const unknown = used.filter((c) => !findMeaning(c.means) || c.index >= sample.header.length);
  if (unknown.length > 0)
    return [
      ...file,
      stop(
        "unknown-meaning",
        `${quoted(unknown.map((c) => c.header))}: the catalogue has no such quantity, or the file no such column.`,
        "Choose a quantity from the list.",
        { column: unknown[0]?.header ?? null },
      ),
    ];
  const byColumn = used.flatMap((card) => {
    if (card.means === "source_id") return identifierFindings(sample, card);
    return findMeaning(card.means)?.kind === "number" ? numberFindings(sample, card, plan) : [];
  });
  return [
    ...file,
    ...mappingFindings(used),
    ...raFindings(sample, used, plan),
    ...epochFindings(used, plan),
    ...byColumn,
  ];
};

export const isOpen = (f: Finding): boolean => f.level !== "note";
