import type { ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";
import { GIVEN } from "../catalogue/adopt.ts";
import { normaliseDesignation } from "../catalogue/designation.ts";
import type { Value } from "../database/bulk.ts";
import { numberReader, textReader } from "./cells.ts";

export interface Mapped {
  /** In the order of `GIVEN`; null: the row is refused. */
  values: Value[] | null;
  reason: string;
  /** Names the star within the file, so that it is taken once; empty where nothing names it. */
  identity: string;
}

interface Cell {
  index: number;
  target: number;
  header: string;
  isError: boolean;
  readNumber?: (text: string) => number | null;
  readText?: (text: string) => string | null;
}

const MOST_CHARACTERS = 120;
const SHOWN_CHARACTERS = 40;
const SPREADSHEET = /^[+-]?\d[.,]?\d*e\+\d+$/i;

const at = (key: string): number => GIVEN.indexOf(key);
const [RA, DEC, EPOCH, SOURCE, DESIGNATION, RELEASE] = [
  at("ra"),
  at("dec"),
  at("epoch"),
  at("source_id"),
  at("designation"),
  at("release"),
];

/** Temperature and distance as given are kept apart from what the recipe makes of them. */
const storedKey = (means: string): string => means.replace(/^(teff|distance)/, "$1_given");

const cellsOf = (plan: ReadingPlan): Cell[] =>
  plan.columns
    .filter((card) => card.means !== KEPT)
    .map((card) => {
      const { index, header, means } = card;
      const cell = { index, header, target: at(storedKey(means)), isError: means.endsWith("_err") };
      return findMeaning(means)?.kind === "text"
        ? { ...cell, readText: textReader(card) }
        : { ...cell, readNumber: numberReader(card, plan) };
    });

const refused = (reason: string): Mapped => ({ values: null, reason, identity: "" });
const shown = (text: string): string =>
  text.length > SHOWN_CHARACTERS ? `${text.slice(0, SHOWN_CHARACTERS)}…` : text;

const readCell = (cell: Cell, text: string, values: Value[]): string | null => {
  if (cell.readText) {
    const value = cell.readText(text);
    if (value !== null && value.length > MOST_CHARACTERS)
      return `“${shown(value)}” in ${cell.header} is longer than ${MOST_CHARACTERS} characters.`;
    if (value !== null && cell.target === SOURCE && SPREADSHEET.test(value))
      return `“${value}” in ${cell.header} is not an identifier any more: a spreadsheet has rounded it.`;
    values[cell.target] = value;
    return null;
  }
  const value = cell.readNumber?.(text) ?? null;
  if (value === null) return `“${shown(text.trim())}” in ${cell.header} is not a number.`;
  if (cell.isError && value < 0) return `The error ${shown(text.trim())} in ${cell.header} is below zero.`;
  // An error of exactly zero says that none was determined.
  values[cell.target] = Number.isNaN(value) || (cell.isError && value === 0) ? null : value;
  return null;
};

const positionTrouble = (values: Value[]): string | null => {
  const ra = values[RA];
  const dec = values[DEC];
  if (ra === null && dec === null) return null;
  if (ra === null || dec === null) return "Only one of RA and Dec is given.";
  if (Number(ra) < 0 || Number(ra) >= 360) return `RA ${ra}° lies outside 0 to 360°.`;
  if (Math.abs(Number(dec)) > 90) return `Dec ${dec}° lies beyond a pole.`;
  return null;
};

const identityOf = (values: Value[]): string => {
  const source = values[SOURCE];
  if (source !== null) return `i|${values[RELEASE] ?? ""}|${source}`;
  const name = values[DESIGNATION];
  return name === null ? "" : `n|${normaliseDesignation(String(name))}`;
};

/** A quick reader of rows under that plan: hand-written, as it runs for every row of a file. */
export const rowMapper = (plan: ReadingPlan): ((cells: readonly string[]) => Mapped) => {
  const cells = cellsOf(plan);
  const release = plan.release === "" ? null : plan.release;
  return (row) => {
    const values: Value[] = new Array(GIVEN.length).fill(null);
    for (const cell of cells) {
      const trouble = readCell(cell, row[cell.index] ?? "", values);
      if (trouble !== null) return refused(trouble);
    }
    const trouble = positionTrouble(values);
    if (trouble !== null) return refused(trouble);
    values[RELEASE] ??= release;
    if (values[RA] !== null) values[EPOCH] ??= plan.epoch;
    const identity = identityOf(values);
    if (identity === "" && values[RA] === null) return refused("Nothing in this row names or places a star.");
    return { values, reason: "", identity };
  };
};
