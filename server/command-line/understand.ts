import type { ColumnCard, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { acceptedKey } from "#shared/catalogue/answers.ts";
import { findMeaning, KEPT, plainHeader } from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";
import { unprocessable } from "../errors.ts";
import { doubtfulUnit, unitInName } from "../extracts/doubtful-units.ts";
import { isOpen, planFindings } from "../extracts/findings.ts";
import { readHeader } from "../extracts/read-header.ts";
import type { Sample } from "../extracts/sample.ts";
import { suggestUnit, textsOf } from "../extracts/suggest.ts";
import { julianYear } from "../extracts/suggest-frame.ts";
import { contradicts } from "../extracts/ucd.ts";
import { parseNumber } from "../formats/numbers.ts";
import type { TableColumn } from "../formats/table.ts";
import type { Glance } from "./glance.ts";
import type { PlanColumn, PlanFile } from "./plan-file.ts";
import { columnAnswer, planOf, type Question } from "./question.ts";
import { asks } from "./trouble.ts";

const SHOWN_EXAMPLES = 3;

/** One column as it is understood so far. */
interface Reading {
  readonly index: number;
  readonly column: TableColumn;
  readonly answer: PlanColumn | undefined;
  means: string;
  unit: string;
  /** Whether the unit was written down somewhere, not merely the usual one. */
  isUnitSaid: boolean;
}

const valuesOf = (sample: Sample, index: number): number[] =>
  textsOf(sample, index)
    .map((text) => parseNumber(text, sample.decimalMark))
    .filter((value) => !Number.isNaN(value));

const isSaid = (unit: string): boolean => unit.trim() !== "";

/** In a derived table `teff_given` is what was given, and `teff` what a recipe made of it. */
const keyAsGiven = (name: string): string | undefined => {
  const parts = /^(\w+)_given(_err)?$/.exec(name);
  const key = parts ? `${parts[1]}${parts[2] ?? ""}` : "";
  return findMeaning(key) ? key : undefined;
};

/** What the file itself says of a column, or the plan where it speaks of it. */
const readColumn = (sample: Sample, plan: PlanFile, column: TableColumn, index: number): Reading => {
  const answer = plan.columns?.[column.name];
  const { key, unit: spelled } = readHeader(column.name);
  const means = answer?.key ?? keyAsGiven(column.name) ?? key ?? KEPT;
  const said = [answer?.unit ?? "", column.unit, spelled, unitInName(column.name)].find(isSaid) ?? "";
  const isText = findMeaning(means)?.kind === "text";
  const unit = isText || means === KEPT ? "" : suggestUnit(sample, index, means, said);
  return { index, column, answer, means, unit, isUnitSaid: isSaid(said) || answer?.unit !== undefined };
};

const readingOf = (readings: readonly Reading[], means: string): Reading | undefined =>
  readings.find((r) => r.means === means);

/** An error without a unit of its own is in that of its value. */
const passUnitsOn = (readings: readonly Reading[]): void => {
  for (const reading of readings) {
    if (reading.isUnitSaid || !reading.means.endsWith("_err")) continue;
    const value = readingOf(readings, reading.means.slice(0, -"_err".length));
    if (value?.isUnitSaid) Object.assign(reading, { unit: value.unit, isUnitSaid: true });
  }
};

const named = (names: readonly string[]): string => names.map((name) => `“${name}”`).join(" and ");

const isMain = (r: Reading): boolean => /(^|;)\s*meta\.main\s*(;|$)/i.test(r.column.ucd);

const isAsGiven = (r: Reading): boolean => keyAsGiven(r.column.name) !== undefined;

/** Of columns with one meaning the one that a plan or the file calls the main one; the others are left unused. */
const settleRivals = (readings: readonly Reading[]): Question[] => {
  const questions: Question[] = [];
  for (const means of new Set(readings.map((r) => r.means))) {
    const rivals = readings.filter((r) => r.means === means);
    if (means === KEPT || rivals.length < 2) continue;
    const sure = [(r: Reading) => r.answer !== undefined, isAsGiven, isMain]
      .map((isSure) => rivals.filter(isSure))
      .find((some) => some.length === 1);
    if (sure) {
      for (const rival of rivals) if (rival !== sure[0]) rival.means = KEPT;
      continue;
    }
    questions.push({
      message: `${named(rivals.map((r) => r.column.name))} can each give ${findMeaning(means)?.label}.`,
      hint: "Say which of them does.",
      answer: columnAnswer(rivals[0]?.column.name ?? "", { key: means }),
    });
  }
  return questions;
};

const askAboutUcds = (readings: readonly Reading[]): Question[] =>
  readings
    .filter((r) => r.answer === undefined && r.means !== KEPT && contradicts(r.column.ucd, r.means))
    .map(({ column, means }) => ({
      message: `“${column.name}” is spelled like ${findMeaning(means)?.label}, and its UCD, ${column.ucd}, says something else.`,
      hint: `Say whether it gives ${findMeaning(means)?.label} (key ${means}) or is to be left unused (key ${KEPT}).`,
      answer: columnAnswer(column.name, { key: means }),
    }));

/** In both a lower-case g and the texts of some surveys the letter stands for a band with AB magnitudes. */
const isSystemUnknown = ({ column, means, unit, answer }: Reading): boolean => {
  if (findMeaning(means)?.unit !== "mag" || answer !== undefined || means.endsWith("_err")) return false;
  if (/\bAB\b/.test(column.description)) return true;
  return (column.name === "g" || column.name === "gmag") && column.ucd === "" && !/vega/i.test(unit);
};

const askAboutSystems = (readings: readonly Reading[]): Question[] =>
  readings.filter(isSystemUnknown).map(({ column, means }) => ({
    message: `“${column.name}” may be a magnitude of the AB system, and the catalogue keeps ${findMeaning(means)?.label} in that of Vega.`,
    hint: `Say whether it is ${findMeaning(means)?.label} (Vega) or is to be left unused (key ${KEPT}).`,
    answer: columnAnswer(column.name, { key: means, unit: "mag" }),
  }));

const PARTNERS: Readonly<Record<string, string>> = { pmra: "pmdec", pmdec: "pmra" };

const askAboutUnits = (readings: readonly Reading[], sample: Sample): Question[] =>
  readings.flatMap((r) => {
    if (r.isUnitSaid) return [];
    const partner = readingOf(readings, PARTNERS[r.means] ?? "");
    const together = [r, ...(partner && !partner.isUnitSaid ? [partner] : [])];
    const doubt = doubtfulUnit(
      r.means,
      together.flatMap(({ index }) => valuesOf(sample, index)),
    );
    if (!doubt) return [];
    return [
      {
        message: `“${r.column.name}” has no unit, and its values fit more than one. ${doubt.why}.`,
        hint: `Say whether it is ${doubt.units.map((unit) => unit || "a fraction").join(" or ")}.`,
        answer: columnAnswer(r.column.name, { key: r.means, unit: doubt.units[0] }),
      },
    ];
  });

const refuseRoundedIdentifiers = (readings: readonly Reading[]): void => {
  const source = readingOf(readings, "source_id");
  if (!source?.column.type.startsWith("float")) return;
  throw unprocessable(
    "damaged-identifiers",
    `“${source.column.name}” holds identifiers as ${source.column.type}, which keeps 15 digits at most. They cannot be repaired.`,
    { hint: "Write the table again with the identifiers as text or int64." },
  );
};

/** Hours or degrees, where a plan says so: then the values are not doubted any more. */
const raUnitOf = (reading: Reading | undefined): ReadingPlan["raUnit"] => {
  const factor = reading?.answer?.unit === undefined ? undefined : conversionTo("deg", reading.answer.unit);
  if (factor?.factor === 15) return "hour";
  return factor?.factor === 1 ? "deg" : null;
};

const frameEpoch = ({ header }: Glance, ra: Reading | undefined): number | null =>
  julianYear(ra?.column.frame?.epoch) ?? julianYear(header.meta.frame?.epoch);

const cardOf = ({ index, column, answer, means, unit }: Reading): ColumnCard => ({
  index,
  header: column.name,
  means,
  unit,
  blankMarks: answer?.blankMarks ?? [],
  keptNumbers: answer?.keptNumbers ?? [],
});

/** Stops that another plan settles: they are questions here. */
const SETTLED_BY_A_PLAN = new Set([
  "meaning-twice",
  "half-a-position",
  "nothing-usable",
  "no-numbers",
  "unknown-meaning",
]);

/** What is asked here with more to say than that it is doubtful. */
const ASKED_ALREADY = new Set(["unit-doubt", "meaning-doubtful"]);

const ABOUT_EPOCH = new Set(["epoch-missing", "j2000-doubt"]);

const answerTo = (finding: Finding, cards: readonly ColumnCard[]): PlanFile => {
  const { code, column, examples, answers } = finding;
  // No year is likelier than another: whoever takes the plan over is asked again until it is filled in.
  if (ABOUT_EPOCH.has(code)) return { epoch: null };
  const card = cards.find((c) => c.header === column);
  const [first] = answers;
  if (answers.some(({ value }) => value === "accept" || /^(decimal|delimiter):/.test(value)))
    return { accept: [acceptedKey(finding)] };
  const mark = first?.value.startsWith("blank:") ? first.value.slice("blank:".length) : undefined;
  if (card && mark !== undefined)
    return columnAnswer(card.header, { key: card.means, unit: card.unit, blankMarks: [mark] });
  if (card && code === "ra-unit") return columnAnswer(card.header, { key: "ra", unit: "hourangle" });
  if (card && code === "no-numbers" && examples[0]) return columnAnswer(card.header, { key: KEPT });
  const unit = card ? (findMeaning(card.means)?.unit ?? "") : "deg";
  return columnAnswer(card?.header ?? "RA", { key: card?.means ?? "ra", unit });
};

const askWhatIsOpen = (findings: readonly Finding[], cards: readonly ColumnCard[]): Question[] => {
  const open = findings.filter(isOpen);
  const stop = open.find((f) => f.level === "stop" && !SETTLED_BY_A_PLAN.has(f.code));
  if (stop) throw unprocessable(stop.code, stop.message, { hint: stop.hint });
  return open.map((f) => ({ message: f.message, hint: f.hint, answer: answerTo(f, cards) }));
};

/** What the reader found: a stop is one, and an ask is open until the plan accepts it. */
const askAboutFile = (findings: Glance["findings"], plan: PlanFile): Question[] => {
  const stop = findings.find((f) => f.level === "stop");
  if (stop) throw unprocessable(stop.key, stop.message, { hint: stop.hint });
  return findings
    .filter((f) => f.level === "ask" && !plan.accept?.includes(f.key))
    .map(({ key, message, hint, examples }) => ({
      message,
      hint: examples.length > 0 ? `${hint} (${examples.slice(0, SHOWN_EXAMPLES).join("; ")})` : hint,
      answer: { accept: [key] },
    }));
};

const refuseStrangers = (plan: PlanFile, columns: readonly TableColumn[]): void => {
  const stranger = Object.keys(plan.columns ?? {}).find((name) => !columns.some((c) => c.name === name));
  if (stranger === undefined) return;
  const like = columns.find((c) => plainHeader(c.name) === plainHeader(stranger));
  throw unprocessable(
    "unknown-column",
    `The plan speaks of “${stranger}”, and the file has no such column.`,
    {
      hint: like
        ? `The file has “${like.name}”.`
        : `The file has ${columns
            .slice(0, 30)
            .map((c) => c.name)
            .join(", ")}.`,
    },
  );
};

const refuseOpen = (questions: readonly Question[]): void => {
  const [first] = questions;
  if (!first) return;
  const list = questions.map((q, i) => `${i + 1}. ${q.message} ${q.hint}`);
  const count = questions.length === 1 ? "A question is" : `${questions.length} questions are`;
  throw asks("open-questions", `${count} open about the file that only a person can answer.`, {
    hint: [
      ...list,
      "Write the answers to a file and name it with --plan. It may look so; choose each answer yourself:",
      JSON.stringify(planOf(questions), null, 2),
    ].join("\n"),
  });
};

/** Nothing that is worked out here needs a date but motions: without them an unknown epoch just stays blank. */
const moves = (columns: readonly ColumnCard[]): boolean =>
  columns.some(({ means }) => means === "pmra" || means === "pmdec");

/**
 * The reading plan of a table: what its names, units and UCDs leave no doubt about, and what the plan file answers. Ends
 * with the list of questions while one is open.
 */
export const understand = (glance: Glance, plan: PlanFile): ReadingPlan => {
  const { header, sample } = glance;
  refuseStrangers(plan, header.columns);
  const readings = header.columns.map((column, index) => readColumn(sample, plan, column, index));
  const rivals = settleRivals(readings);
  refuseRoundedIdentifiers(readings);
  passUnitsOn(readings);
  const ra = readingOf(readings, "ra");
  const columns = readings.map(cardOf);
  const understood: ReadingPlan = {
    format: header.format,
    delimiter: sample.delimiter,
    encoding: sample.encoding,
    decimalMark: sample.decimalMark,
    columns,
    epoch: plan.epoch ?? frameEpoch(glance, ra),
    release: plan.release ?? "",
    raUnit: raUnitOf(ra),
    frame: "ICRS",
    equinox: null,
    accepted: plan.accept,
  };
  const findings = planFindings(sample, understood).filter(
    // What two columns mean is asked once, with more to say than that they mean the same.
    (f) =>
      !ASKED_ALREADY.has(f.code) &&
      (f.code !== "meaning-twice" || rivals.length === 0) &&
      (!ABOUT_EPOCH.has(f.code) || moves(columns)),
  );
  refuseOpen([
    ...askAboutFile(glance.findings, plan),
    ...rivals,
    ...askAboutUcds(readings),
    ...askAboutSystems(readings),
    ...askAboutUnits(readings, sample),
    ...askWhatIsOpen(findings, columns),
  ]);
  return understood;
};
