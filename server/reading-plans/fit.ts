import type { ColumnCard, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";
import type { Sample } from "../extracts/sample.ts";
import { headerOf } from "./header.ts";

/** Share of all names of both that files of one kind have in common. */
const LEAST_SHARE = 0.6;

/** How much of two headers is the same, from 0 to 1. */
export const likeness = (a: readonly string[], b: readonly string[]): number => {
  const all = new Set([...a, ...b]);
  const inB = new Set(b);
  const shared = new Set(a.filter((name) => inB.has(name)));
  return all.size === 0 ? 0 : shared.size / all.size;
};

export const isOfOneKind = (a: readonly string[], b: readonly string[]): boolean =>
  likeness(a, b) >= LEAST_SHARE;

/** The named plan for the file at hand: columns are known by their names, and new ones are read as the file suggests. */
export const fitted = (named: ReadingPlan, suggested: ReadingPlan): ReadingPlan => {
  const cards = new Map(named.columns.map((card) => [card.header, card]));
  return {
    ...named,
    format: suggested.format,
    // What the named plan has and the file has not is left out; what a new column means is for a person to say.
    columns: suggested.columns.map((card) => {
      const known = cards.get(card.header);
      return known ? { ...known, index: card.index } : { ...card, means: KEPT, unit: "" };
    }),
  };
};

const unitDifference = (sample: Sample, card: ColumnCard): string[] => {
  const index = sample.header.indexOf(card.header);
  const here = sample.columns[index]?.column.unit.trim() ?? "";
  const canonical = findMeaning(card.means)?.unit;
  if (here === "" || canonical === undefined) return [];
  const [file, plan] = [conversionTo(canonical, here), conversionTo(canonical, card.unit)];
  const isSame = file?.factor === plan?.factor && file?.offset === plan?.offset;
  return isSame ? [] : [`“${card.header}” is in ${here} here, and the plan reads ${card.unit || "no unit"}.`];
};

/** What a named plan and the file do not have in common, in sentences. */
export const differencesFrom = (named: ReadingPlan, sample: Sample): string[] => {
  const [here, there] = [new Set(sample.header), new Set(headerOf(named))];
  return [
    ...[...here].filter((name) => !there.has(name)).map((name) => `“${name}” is new in this file.`),
    ...[...there].filter((name) => !here.has(name)).map((name) => `“${name}” is not in this file.`),
    ...named.columns.flatMap((card) => unitDifference(sample, card)),
  ];
};
