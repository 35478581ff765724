import type { Knowledge } from "#server/extracts/findings/look.ts";
import { planFindings } from "#server/extracts/findings.ts";
import { previewOf } from "#server/extracts/preview.ts";
import { namedColumn, type Sample, sampleOf } from "#server/extracts/sample.ts";
import type { TableColumn } from "#server/formats/table.ts";
import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";

/** `name|unit|ucd|description`, parted by tabs. */
const columnOf = (spec: string): TableColumn => {
  const [name = "", unit = "", ucd = "", description = ""] = spec.split("|");
  return { ...namedColumn(name), unit, ucd, description };
};

/** A sample of a table whose columns and cells are parted by blanks. */
export const tableOf = (
  columns: string,
  lines: readonly string[],
  more: Parameters<typeof sampleOf>[2] = {},
): Sample =>
  sampleOf(
    columns.split("\t").map(columnOf),
    lines.map((text, i) => ({ cells: text.split("\t"), line: i + 2, text })),
    { delimiter: "\t", ...more },
  );

/** As many lines as asked for, each made of its number from 0. */
export const lines = (count: number, of: (i: number) => readonly (string | number)[]): string[] =>
  Array.from({ length: count }, (_, i) => of(i).join("\t"));

/** The plan that the file suggests, with every question open. */
export const suggestedFor = async (sample: Sample): Promise<ReadingPlan> => {
  const { plan } = await previewOf(sample);
  if (!plan) throw new Error("A preview without a plan");
  return plan;
};

export const findingsFor = async (
  sample: Sample,
  change: Partial<ReadingPlan> = {},
  knowledge?: Knowledge,
): Promise<Finding[]> => planFindings(sample, { ...(await suggestedFor(sample)), ...change }, knowledge);

/** What other extracts say, by key, row by row. */
export const sharedValues = (values: Readonly<Record<string, readonly number[]>>): Knowledge => ({
  earlier: null,
  shared: {
    count: Math.max(...Object.values(values).map((v) => v.length)),
    values: new Map(Object.entries(values).map(([key, list]) => [key, Float64Array.from(list)])),
  },
});
