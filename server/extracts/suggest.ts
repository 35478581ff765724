import { setImmediate as nextTurn } from "node:timers/promises";
import Fuse from "fuse.js";
import type { ColumnSuggestion } from "#shared/api/extracts.ts";
import {
  findMeaning,
  HEADER_SPELLINGS,
  KEPT,
  meaningOfHeader,
  plainHeader,
} from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";
import { isBlankWord, isSexagesimal, parseNumber } from "../formats/numbers.ts";
import type { Sample } from "./sample.ts";

const SAMPLES = 5;
const SAMPLE_CHARACTERS = 60;
/** A search by likeness is for a person's eye: of wide files only the first columns get one. */
const MOST_LIKENESSES = 150;
const LEAST_LIKENESS_CHARACTERS = 5;

export interface HeaderReading {
  key: string | undefined;
  rank: number;
  /** As the header spells it, if it does. */
  unit: string;
}

/** `plx [mas]` and `parallax (mas)`: a name and its unit. `[Fe/H]` and `log(g)` are names. */
export const readHeader = (header: string): HeaderReading => {
  const whole = meaningOfHeader(header);
  if (whole) return { key: whole.key, rank: whole.rank, unit: "" };
  const parts = /^(.+?)\s*[[(]([^[\]]*)[\])]$/.exec(header.trim());
  const found = parts && meaningOfHeader(parts[1] ?? "");
  return found
    ? { key: found.key, rank: found.rank, unit: parts[2] ?? "" }
    : { key: undefined, rank: Number.MAX_SAFE_INTEGER, unit: "" };
};

const likeness = new Fuse(HEADER_SPELLINGS, { keys: ["spelling"], threshold: 0.25, includeScore: true });

const looksLike = (header: string, taken: ReadonlySet<string>): string | undefined => {
  const plain = plainHeader(header);
  if (plain.length < LEAST_LIKENESS_CHARACTERS) return undefined;
  const [best] = likeness.search(plain, { limit: 1 });
  return best && !taken.has(best.item.key) ? best.item.key : undefined;
};

/** The surest column of each meaning. */
const choose = (readings: HeaderReading[]): Map<string, number> => {
  const chosen = new Map<string, number>();
  readings.forEach((reading, index) => {
    if (!reading.key) return;
    const before = chosen.get(reading.key);
    if (before === undefined || reading.rank < (readings[before]?.rank ?? 0)) chosen.set(reading.key, index);
  });
  return chosen;
};

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

/** What each column seems to mean, and why. Nothing is taken for what it merely resembles. */
export const suggestColumns = async (sample: Sample): Promise<ColumnSuggestion[]> => {
  const readings = sample.header.map(readHeader);
  const chosen = choose(readings);
  const taken = new Set(chosen.keys());
  let likenesses = 0;

  const kept = (index: number, because: string): ColumnSuggestion => ({
    index,
    header: sample.header[index] ?? "",
    means: KEPT,
    unit: "",
    blankMarks: [],
    samples: samplesOf(sample, index, false),
    because,
    asks: false,
  });

  const suggest = (header: string, index: number): ColumnSuggestion => {
    const { key, unit: spelled } = readings[index] ?? { key: undefined, unit: "" };
    const meaning = key === undefined ? undefined : findMeaning(key);
    if (key !== undefined && meaning) {
      const other = chosen.get(key) ?? index;
      if (other !== index) return kept(index, `“${sample.header[other]}” gives ${meaning.label} already.`);
      const unit = suggestUnit(sample, index, key, spelled);
      const isKnown = meaning.kind === "text" || conversionTo(meaning.unit, unit) !== undefined;
      const source =
        spelled !== "" ? ", which also names the unit" : unit !== "" ? `; ${unit} is the usual unit` : "";
      return {
        index,
        header,
        means: key,
        unit: meaning.kind === "text" ? "" : unit,
        blankMarks: [],
        samples: samplesOf(sample, index, meaning.kind === "text"),
        because: isKnown
          ? `The header is a usual spelling of ${meaning.label}${source}.`
          : `The header is a usual spelling of ${meaning.label}; its unit is not certain.`,
        asks: !isKnown,
      };
    }
    if (!taken.has("source_id") && isLongNumbers(textsOf(sample, index)))
      return kept(index, "Whole numbers of 15 to 19 digits: they may be identifiers.");
    const like = likenesses < MOST_LIKENESSES ? looksLike(header, taken) : undefined;
    likenesses++;
    return kept(
      index,
      like
        ? `The header resembles a spelling of ${findMeaning(like)?.label ?? like}; say so if it is one.`
        : "No quantity of the catalogue has a header like this.",
    );
  };

  const suggestions: ColumnSuggestion[] = [];
  for (const [index, header] of sample.header.entries()) {
    // A search by likeness takes its time: other people's requests get their turn in between.
    await nextTurn();
    suggestions.push(suggest(header, index));
  }
  return suggestions;
};
