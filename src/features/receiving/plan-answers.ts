import type { ColumnCard, ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { epochText } from "./extract-words.ts";

/** Cards as the file itself suggests them. */
export const suggestedColumns = (preview: ExtractPreview): ColumnCard[] =>
  preview.columns.map(({ samples: _samples, because: _because, asks: _asks, ...card }) => card);

/** The plan a person starts from: what was recognised, with every question open. */
export const suggestedPlan = (preview: ExtractPreview): ReadingPlan =>
  preview.plan ?? {
    format: preview.format,
    delimiter: preview.delimiter,
    encoding: preview.encoding,
    decimalMark: preview.decimalMark,
    columns: suggestedColumns(preview),
    epoch: null,
    release: "",
    raUnit: null,
    frame: "ICRS",
    equinox: null,
  };

export const withCard = (plan: ReadingPlan, index: number, change: Partial<ColumnCard>): ReadingPlan => ({
  ...plan,
  columns: plan.columns.map((card) => (card.index === index ? { ...card, ...change } : card)),
});

/**
 * A plan made for another file, for this one: columns are known again by their headers, and what the other file had not is
 * read as this one suggests.
 */
export const planFor = (preview: ExtractPreview, named: ReadingPlan): ReadingPlan => {
  const cards = new Map(named.columns.map((card) => [card.header, card]));
  return {
    ...named,
    format: preview.format,
    delimiter: preview.delimiter,
    encoding: preview.encoding,
    decimalMark: preview.decimalMark,
    columns: suggestedColumns(preview).map((card) => {
      const known = cards.get(card.header);
      return known ? { ...known, index: card.index } : card;
    }),
  };
};

/** What a named plan and this file do not have in common. */
export const differencesFrom = (preview: ExtractPreview, named: ReadingPlan): string[] => {
  const here = new Set(preview.columns.map((c) => c.header));
  const there = new Set(named.columns.map((c) => c.header));
  return [
    ...[...here].filter((header) => !there.has(header)).map((header) => `“${header}” is new in this file.`),
    ...[...there].filter((header) => !here.has(header)).map((header) => `“${header}” is not in this file.`),
  ];
};

/** An answer given earlier, and the plan that asks again. */
export interface Given {
  key: string;
  text: string;
  again: ReadingPlan;
}

const ofPositions = (plan: ReadingPlan): Given[] => {
  const given: Given[] = [];
  if (plan.raUnit !== null)
    given.push({
      key: "ra",
      text: `RA is in ${plan.raUnit === "hour" ? "hours" : "degrees"}.`,
      again: { ...plan, raUnit: null },
    });
  if (plan.epoch !== null)
    given.push({
      key: "epoch",
      text: `Positions are of ${epochText(plan.epoch)}.`,
      again: { ...plan, epoch: null },
    });
  return given;
};

const ofCard = (plan: ReadingPlan, card: ColumnCard): Given[] =>
  (card.keptNumbers ?? []).map((text) => ({
    key: `${card.index}-${text}`,
    text: `${text} in “${card.header}” is a number.`,
    again: withCard(plan, card.index, { keptNumbers: (card.keptNumbers ?? []).filter((t) => t !== text) }),
  }));

/** The name of a code as words: `round-number` is “round number”. */
const codeWords = (key: string): string => {
  const [code = "", ...column] = key.split(":");
  const words = code.replaceAll("-", " ");
  return column.length === 0 ? `“${words}”` : `“${words}” of “${column.join(":")}”`;
};

const ofAccepted = (plan: ReadingPlan): Given[] =>
  (plan.accepted ?? []).map((key) => ({
    key: `accepted-${key}`,
    text: `The file is taken as it is: ${codeWords(key)}.`,
    again: { ...plan, accepted: (plan.accepted ?? []).filter((k) => k !== key) },
  }));

export const givenAnswers = (plan: ReadingPlan): Given[] => [
  ...ofPositions(plan),
  ...plan.columns.flatMap((card) => ofCard(plan, card)),
  ...ofAccepted(plan),
];
