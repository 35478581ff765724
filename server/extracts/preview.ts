import type { ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { planFindings } from "./findings.ts";
import type { Sample } from "./sample.ts";
import { suggestColumns } from "./suggest.ts";

/** The plan that follows from the suggestions alone, with every question open. */
const suggestedPlan = (sample: Sample, columns: ExtractPreview["columns"]): ReadingPlan => ({
  format: sample.format,
  delimiter: sample.delimiter,
  encoding: sample.encoding,
  decimalMark: sample.decimalMark,
  columns: columns.map(({ index, header, means, unit, blankMarks }) => ({
    index,
    header,
    means,
    unit,
    blankMarks,
  })),
  epoch: null,
  release: "",
  raUnit: null,
  frame: "ICRS",
  equinox: null,
});

/** What the mapping screen shows first. */
export const previewOf = async (sample: Sample): Promise<ExtractPreview> => {
  const columns = await suggestColumns(sample);
  const findings = planFindings(sample, suggestedPlan(sample, columns));
  const asking = new Set(findings.filter((f) => f.level === "ask").map((f) => f.column));
  return {
    format: sample.format,
    variant: sample.variant,
    title: sample.meta.title,
    description: sample.meta.description,
    sources: [...sample.meta.sources],
    declaredRows: sample.declaredRows,
    rows: [],
    sky: [],
    knownPlan: null,
    delimiter: sample.delimiter,
    encoding: sample.encoding,
    decimalMark: sample.decimalMark,
    columns: columns.map((c) => (asking.has(c.header) ? { ...c, asks: true } : c)),
    findings,
    sampledRows: sample.rows.length,
  };
};
