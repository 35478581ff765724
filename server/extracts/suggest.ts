import { setImmediate as nextTurn } from "node:timers/promises";
import Fuse from "fuse.js";
import type { ColumnSuggestion } from "#shared/api/extracts.ts";
import {
  findMeaning,
  HEADER_SPELLINGS,
  KEPT,
  type Meaning,
  plainHeader,
} from "#shared/catalogue/header-spellings.ts";
import { conversionTo, systemInUnit } from "#shared/units/units.ts";
import { isBlankWord, isSexagesimal, parseNumber } from "../formats/numbers.ts";
import { unitInName } from "./doubtful-units.ts";
import { type ColumnMeaning, chooseColumns, meaningOfColumn } from "./meaning-of-column.ts";
import type { Sample } from "./sample.ts";
import { isMagnitude, magnitudeSystemOf } from "./suggest-magnitudes.ts";
import { hasCosDecOf } from "./suggest-motion.ts";

const SAMPLES = 5;
const SAMPLE_CHARACTERS = 60;
/** A search by likeness is for a person's eye: of wide files only the first columns get one. */
const MOST_LIKENESSES = 150;
const LEAST_LIKENESS_CHARACTERS = 5;

const likeness = new Fuse(HEADER_SPELLINGS, { keys: ["spelling"], threshold: 0.25, includeScore: true });

const looksLike = (header: string, taken: ReadonlySet<string>): string | undefined => {
  const plain = plainHeader(header);
  if (plain.length < LEAST_LIKENESS_CHARACTERS) return undefined;
  const [best] = likeness.search(plain, { limit: 1 });
  return best && !taken.has(best.item.key) ? best.item.key : undefined;
};

/** Texts of a column without its blanks. */
export const textsOf = (sample: Sample, index: number): string[] =>
  sample.rows.map((r) => (r.cells[index] ?? "").trim()).filter((text) => !isBlankWord(text));

/** Unit of right ascension by its values; empty where they leave doubt. */
const raUnit = (sample: Sample, index: number): string => {
  const texts = textsOf(sample, index);
  if (texts.length > 0 && texts.every(isSexagesimal)) return "hourangle";
  const values = texts.map((text) => parseNumber(text, sample.decimalMark));
  return values.some((v) => v >= 24) ? "deg" : "";
};

export const suggestUnit = (sample: Sample, index: number, key: string, spelled: string): string => {
  const canonical = findMeaning(key)?.unit ?? "";
  if (spelled !== "") return conversionTo(canonical, spelled) ? spelled : spelled.trim();
  return key === "ra" ? raUnit(sample, index) : canonical;
};

const samplesOf = (sample: Sample, index: number, isText: boolean): ColumnSuggestion["samples"] =>
  textsOf(sample, index)
    .slice(0, SAMPLES)
    .map((text) => {
      const value = isText ? Number.NaN : parseNumber(text, sample.decimalMark);
      return {
        text: text.slice(0, SAMPLE_CHARACTERS),
        value: isText ? text.slice(0, SAMPLE_CHARACTERS) : Number.isFinite(value) ? value : null,
      };
    });

const LONG_NUMBER = /^\d{15,19}$/;
const isLongNumbers = (texts: string[]): boolean =>
  texts.length > 0 && texts.every((t) => LONG_NUMBER.test(t));

const keptCard = (sample: Sample, index: number, because: string): ColumnSuggestion => ({
  index,
  header: sample.header[index] ?? "",
  means: KEPT,
  unit: "",
  blankMarks: [],
  samples: samplesOf(sample, index, false),
  because,
  asks: false,
});

/** Where the unit comes from, as the end of a sentence. */
const unitWords = (spelled: string, isInHeader: boolean, unit: string): string => {
  if (spelled !== "") return isInHeader ? ", which also names the unit" : `; the file says ${spelled}`;
  return unit === "" ? "" : `; ${unit} is the usual unit`;
};

const doubts = (
  { column }: Sample["columns"][number],
  means: string,
  spelled: string,
): Pick<ColumnSuggestion, "magnitudeSystem" | "hasCosDec"> => ({
  ...(isMagnitude(means) ? { magnitudeSystem: magnitudeSystemOf(column, spelled) } : {}),
  ...(means === "pmra" ? { hasCosDec: hasCosDecOf(column) } : {}),
});

const usedCard = (
  sample: Sample,
  index: number,
  meaning: Meaning,
  found: ColumnMeaning,
): ColumnSuggestion => {
  const shown = sample.columns[index] as Sample["columns"][number];
  const inHeader = found.unit || unitInName(shown.column.name);
  const spelled = shown.column.unit.trim() || inHeader;
  const isText = meaning.kind === "text";
  const unit = isText
    ? ""
    : suggestUnit(
        sample,
        index,
        meaning.key,
        // Which zero point it is stands beside the unit.
        meaning.unit === "mag" && systemInUnit(spelled) ? "mag" : spelled,
      );
  const isKnown = isText || conversionTo(meaning.unit, unit) !== undefined;
  return {
    ...keptCard(sample, index, ""),
    means: meaning.key,
    unit,
    samples: samplesOf(sample, index, isText),
    because: isKnown
      ? `${found.because}${isText ? "" : unitWords(spelled, shown.column.unit.trim() === "", unit)}.`
      : `${found.because}; its unit is not certain.`,
    asks: !isKnown,
    ...doubts(shown, meaning.key, spelled),
  };
};

/** What each column seems to mean, and why. Nothing is taken for what it merely resembles. */
export const suggestColumns = async (sample: Sample): Promise<ColumnSuggestion[]> => {
  const meanings = sample.columns.map((column) => meaningOfColumn(column, sample.decimalMark));
  const chosen = chooseColumns(meanings);
  const taken = new Set(chosen.keys());
  let likenesses = 0;

  const suggest = (index: number): ColumnSuggestion => {
    const found = meanings[index];
    const meaning = found?.key === undefined ? undefined : findMeaning(found.key);
    if (found && meaning) {
      const other = chosen.get(meaning.key) ?? index;
      if (other === index) return usedCard(sample, index, meaning, found);
      return keptCard(sample, index, `“${sample.header[other]}” gives ${meaning.label} already.`);
    }
    if (found?.because) return keptCard(sample, index, found.because);
    if (!taken.has("source_id") && isLongNumbers(textsOf(sample, index)))
      return keptCard(sample, index, "Whole numbers of 15 to 19 digits: they may be identifiers.");
    const like = likenesses++ < MOST_LIKENESSES ? looksLike(sample.header[index] ?? "", taken) : undefined;
    return keptCard(
      sample,
      index,
      like
        ? `The header resembles a spelling of ${findMeaning(like)?.label ?? like}; say so if it is one.`
        : "No quantity of the catalogue has a header like this.",
    );
  };

  const suggestions: ColumnSuggestion[] = [];
  for (const index of sample.header.keys()) {
    // A search by likeness takes its time: other people's requests get their turn in between.
    await nextTurn();
    suggestions.push(suggest(index));
  }
  return suggestions;
};
