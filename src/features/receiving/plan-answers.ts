import type { ColumnCard, ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning } from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";
import { epochText } from "./extract-words.ts";

/** Cards as the file itself suggests them. */
export const suggestedColumns = (preview: ExtractPreview): ColumnCard[] =>
  preview.columns.map(({ index, header, means, unit, blankMarks }) => ({
    index,
    header,
    means,
    unit,
    blankMarks,
  }));

/** The plan a person starts from: what was recognised, with every question open. */
export const suggestedPlan = (preview: ExtractPreview): ReadingPlan => ({
  delimiter: preview.delimiter,
  encoding: preview.encoding,
  decimalMark: preview.decimalMark,
  columns: suggestedColumns(preview),
  epoch: null,
  release: "",
  raUnit: null,
});

export const withCard = (plan: ReadingPlan, index: number, change: Partial<ColumnCard>): ReadingPlan => ({
  ...plan,
  columns: plan.columns.map((card) => (card.index === index ? { ...card, ...change } : card)),
});

const cardOf = (plan: ReadingPlan, finding: Finding): ColumnCard | undefined =>
  plan.columns.find((card) => card.header === finding.column);

const withMark = (plan: ReadingPlan, card: ColumnCard, value: string): ReadingPlan => {
  const text = value.slice(value.indexOf(":") + 1);
  return value.startsWith("blank:")
    ? withCard(plan, card.index, { blankMarks: [...card.blankMarks, text] })
    : withCard(plan, card.index, { keptNumbers: [...(card.keptNumbers ?? []), text] });
};

/** The plan with that answer to the question; unchanged where the answer is none of it. */
export const answered = (plan: ReadingPlan, finding: Finding, value: string): ReadingPlan => {
  const card = cardOf(plan, finding);
  if (finding.code === "ra-unit") return { ...plan, raUnit: value === "hour" ? "hour" : "deg" };
  if (finding.code === "epoch-missing") return { ...plan, epoch: Number(value) };
  if (finding.code === "blank-mark" && card) return withMark(plan, card, value);
  if (finding.code === "unit-unknown" && card) return withCard(plan, card.index, { unit: value });
  return plan;
};

const isMarked = (card: ColumnCard | undefined, finding: Finding): boolean => {
  const text = finding.answers[0]?.value.slice("blank:".length);
  if (!card || text === undefined) return false;
  return card.blankMarks.includes(text) || (card.keptNumbers ?? []).includes(text);
};

/** Whether the plan answers the question. Only for what was asked of a plan that has changed since. */
const isAnswered = (plan: ReadingPlan, finding: Finding): boolean => {
  const card = cardOf(plan, finding);
  if (finding.code === "ra-unit") return plan.raUnit !== null;
  if (finding.code === "epoch-missing")
    return plan.epoch !== null || plan.columns.some((c) => c.means === "epoch");
  if (finding.code === "blank-mark") return isMarked(card, finding);
  if (finding.code === "unit-unknown" && card) {
    const meaning = findMeaning(card.means);
    return !meaning || conversionTo(meaning.unit, card.unit) !== undefined;
  }
  return false;
};

/** What of the questions to the bare file is still open under a plan kept earlier. */
export const stillOpen = (findings: readonly Finding[], plan: ReadingPlan): Finding[] =>
  findings.filter((finding) => !isAnswered(plan, finding));

/** An answer given earlier, and the plan that asks again. */
export interface Given {
  key: string;
  text: string;
  again: ReadingPlan;
}

export const givenAnswers = (plan: ReadingPlan): Given[] => {
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
  for (const card of plan.columns)
    for (const text of card.keptNumbers ?? [])
      given.push({
        key: `${card.index}-${text}`,
        text: `${text} in “${card.header}” is a number.`,
        again: withCard(plan, card.index, {
          keptNumbers: (card.keptNumbers ?? []).filter((t) => t !== text),
        }),
      });
  return given;
};
