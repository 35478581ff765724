import type { ColumnCard, ColumnSuggestion, ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import type { Knowledge } from "./findings/look.ts";
import { planFindings } from "./findings.ts";
import { shownRows } from "./preview-rows.ts";
import type { Sample } from "./sample.ts";
import { suggestColumns } from "./suggest.ts";
import { suggestFrame } from "./suggest-frame.ts";

const cardOf = ({
  samples: _samples,
  because: _because,
  asks: _asks,
  ...card
}: ColumnSuggestion): ColumnCard => card;

/** The plan that follows from the suggestions alone, with every question open. */
const suggestedPlan = (sample: Sample, columns: readonly ColumnSuggestion[]): ReadingPlan => ({
  format: sample.format,
  delimiter: sample.delimiter,
  encoding: sample.encoding,
  decimalMark: sample.decimalMark,
  columns: columns.map(cardOf),
  release: "",
  raUnit: null,
  ...suggestFrame(sample, columns),
});

/**
 * What the mapping screen shows first.
 *
 * @param chosen the plan as answered so far; the suggested one where nothing has been answered
 */
export const previewOf = async (
  sample: Sample,
  chosen?: ReadingPlan,
  knowledge?: Knowledge,
): Promise<ExtractPreview> => {
  const columns = await suggestColumns(sample);
  const suggested = suggestedPlan(sample, columns);
  const plan = chosen ?? suggested;
  const findings = planFindings(sample, plan, knowledge);
  const asking = new Set(findings.filter((f) => f.level === "ask").map((f) => f.column));
  return {
    format: sample.format,
    variant: sample.variant,
    title: sample.meta.title,
    description: sample.meta.description,
    sources: [...sample.meta.sources],
    declaredRows: sample.declaredRows,
    ...shownRows(sample, plan),
    plan: suggested,
    knownPlan: null,
    delimiter: sample.delimiter,
    encoding: sample.encoding,
    decimalMark: sample.decimalMark,
    columns: columns.map((c) => (asking.has(c.header) ? { ...c, asks: true } : c)),
    findings,
    sampledRows: sample.rows.length,
  };
};
