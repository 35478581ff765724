import { plainNumber } from "#shared/format/numbers.ts";
import type { FileColumn } from "./list-columns.ts";

/** ECSV 1.0 (Astropy Proposal for Enhancement 6): comma-delimited, every header line behind "# ". */

/** A YAML scalar in double quotes: JSON's strings are YAML's too. */
const scalar = (text: string): string => JSON.stringify(text);

const columnLine = (c: FileColumn): string => {
  const parts = [
    `name: ${c.name}`,
    ...(c.unit === "" ? [] : [`unit: ${scalar(unitText(c.unit))}`]),
    `datatype: ${c.datatype}`,
    `description: ${scalar(c.description)}`,
    ...(c.ucd === "" ? [] : [`meta: {ucd: ${scalar(c.ucd)}}`]),
  ];
  return `# - {${parts.join(", ")}}`;
};

/** Units as readers of this format spell them: the registry's VOUnit, but for the logarithmic ones. */
const unitText = (unit: string): string =>
  unit === "dex" || unit.startsWith("dex(")
    ? unit.replace("dex(cm.s-2)", "dex(cm s-2)")
    : unit.replaceAll(".", " ");

/** The header: format line, columns, and what the file is. */
export const ecsvHeader = (
  columns: readonly FileColumn[],
  meta: Readonly<Record<string, string | number | readonly string[]>>,
): string => {
  const metaLines = Object.entries(meta).flatMap(([key, value]) =>
    Array.isArray(value)
      ? [`# - ${key}:`, ...value.map((item: string) => `#   - ${scalar(item)}`)]
      : [`# - ${key}: ${typeof value === "number" ? value : scalar(value as string)}`],
  );
  return [
    "# %ECSV 1.0",
    "# ---",
    "# delimiter: ','",
    "# datatype:",
    ...columns.map(columnLine),
    "# meta: !!omap",
    ...metaLines,
    "# schema: astropy-2.0",
    columns.map((c) => c.name).join(","),
    "",
  ].join("\n");
};

/** One cell; a blank is empty, and quotes are doubled. */
const cell = (value: string | number | null): string => {
  if (value === null) return "";
  if (typeof value === "number") return plainNumber(value);
  return /[",\s]/.test(value) || value === "" ? `"${value.replaceAll('"', '""')}"` : value;
};

export const ecsvLine = (values: readonly (string | number | null)[]): string =>
  `${values.map(cell).join(",")}\n`;
