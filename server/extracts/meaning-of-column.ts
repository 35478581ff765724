import { findMeaning } from "#shared/catalogue/header-spellings.ts";
import { isBlankWord, isSexagesimal, parseNumber } from "../formats/numbers.ts";
import { isNameOfOthersToo, readHeader } from "./read-header.ts";
import type { SampleColumn } from "./sample.ts";
import { contradicts, meaningOfUcd } from "./ucd.ts";

/** What a column means by itself, whatever else the file holds. */
export interface ColumnMeaning {
  /** Undefined where it means nothing that is kept. */
  readonly key: string | undefined;
  /** The lower, the surer. */
  readonly rank: number;
  /** As the header spells it; empty where it spells none. */
  readonly unit: string;
  /** Why, without the full stop where there is a key; empty where there is nothing to say. */
  readonly because: string;
}

const RANK_OF_UCD = 60;
/** The file's own word for its main column goes before any spelling. */
const RANK_OF_MAIN = -1;
const LEAST_SHARE = 0.5;

/** Whether at least half of what the column holds reads as the quantity would. */
const readsAsNumbers = ({ texts }: SampleColumn, key: string, decimalMark: "." | ","): boolean => {
  const isAngle = key === "ra" || key === "dec";
  const given = texts.map((text) => text.trim()).filter((text) => !isBlankWord(text));
  const read = given.filter(
    (text) =>
      !Number.isNaN(parseNumber(text, decimalMark)) || /\d/.test(text) || (isAngle && isSexagesimal(text)),
  );
  return given.length === 0 || read.length >= given.length * LEAST_SHARE;
};

const none = (because = ""): ColumnMeaning => ({ key: undefined, rank: Infinity, unit: "", because });

const isMain = (ucd: string): boolean => /(^|;)\s*meta\.main\s*(;|$)/i.test(ucd);

/** Error columns of positions and the like: spelled as an error of what the catalogue keeps without one. */
const byName = (shown: SampleColumn): ColumnMeaning => {
  const { name, ucd } = shown.column;
  const { key, rank, unit } = readHeader(name);
  const label = findMeaning(key ?? "")?.label;
  if (key === undefined || label === undefined) return none();
  if (isNameOfOthersToo(name) && meaningOfUcd(ucd) !== key)
    return none(
      `“${name}” in small letters is a usual name of other bands and quantities too; say so if it is ${label}.`,
    );
  if (contradicts(ucd, key))
    return none(`The header is a usual spelling of ${label}, and its UCD, ${ucd}, says something else.`);
  return {
    key,
    rank: isMain(ucd) ? RANK_OF_MAIN : rank,
    unit,
    because: `The header is a usual spelling of ${label}`,
  };
};

const byUcd = ({ column: { ucd } }: SampleColumn): ColumnMeaning => {
  const key = meaningOfUcd(ucd);
  const label = findMeaning(key ?? "")?.label;
  if (key === undefined || label === undefined) return none();
  const rank = isMain(ucd) ? RANK_OF_MAIN : RANK_OF_UCD;
  return { key, rank, unit: "", because: `Its UCD, ${ucd}, is that of ${label}` };
};

/** By its name, its UCD and what it holds. A doubt leaves the column without a meaning, and says why. */
export const meaningOfColumn = (shown: SampleColumn, decimalMark: "." | ","): ColumnMeaning => {
  const named = byName(shown);
  const found = named.key === undefined && named.because === "" ? byUcd(shown) : named;
  const meaning = findMeaning(found.key ?? "");
  if (meaning?.kind === "number" && !readsAsNumbers(shown, meaning.key, decimalMark))
    return none(`${found.because}, but what it holds are no numbers.`);
  return found;
};

/** The surest column of each meaning, the first of equals. */
export const chooseColumns = (meanings: readonly ColumnMeaning[]): Map<string, number> => {
  const chosen = new Map<string, number>();
  meanings.forEach(({ key, rank }, index) => {
    if (key === undefined) return;
    const before = chosen.get(key);
    if (before === undefined || rank < (meanings[before]?.rank ?? Infinity)) chosen.set(key, index);
  });
  return chosen;
};
