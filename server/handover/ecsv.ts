import { plainNumber } from "#shared/format/numbers.ts";
import type { FileColumn } from "./list-columns.ts";

/** What the header says of a column; where its values come from is not its business. */
export type EcsvColumn = Omit<FileColumn, "value">;

export type MetaValue = string | number | readonly string[];

/** ECSV 1.0 (Astropy Proposal for Enhancement 6): comma-delimited, every header line behind "# ". */

/** Signs that JSON leaves as they are and YAML does not take: control signs and its further line breaks. */
const NOT_IN_YAML = /[\u007f-\u009f\u2028\u2029\ufeff]/g;

const escaped = (sign: string): string => `\\u${sign.charCodeAt(0).toString(16).padStart(4, "0")}`;

/** A YAML scalar in double quotes: but for those signs, JSON's strings are YAML's too. */
export const scalar = (text: string): string => JSON.stringify(text).replace(NOT_IN_YAML, escaped);

const metaLines = (key: string, value: MetaValue): string[] => {
  if (typeof value === "number") return [`# - ${key}: ${value}`];
  if (typeof value === "string") return [`# - ${key}: ${scalar(value)}`];
  if (value.length === 0) return [`# - ${key}: []`];
  return [`# - ${key}:`, ...value.map((item) => `#   - ${scalar(item)}`)];
};

const columnLine = (c: EcsvColumn): string => {
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
  columns: readonly EcsvColumn[],
  meta: Readonly<Record<string, MetaValue>>,
): string =>
  [
    "# %ECSV 1.0",
    "# ---",
    "# delimiter: ','",
    "# datatype:",
    ...columns.map(columnLine),
    "# meta: !!omap",
    ...Object.entries(meta).flatMap(([key, value]) => metaLines(key, value)),
    "# schema: astropy-2.0",
    columns.map((c) => c.name).join(","),
    "",
  ].join("\n");

/** One cell; a blank is empty, and quotes are doubled. The format ends a row at every line break, so texts have none. */
const cell = (value: string | number | null): string => {
  if (value === null) return "";
  if (typeof value === "number") return plainNumber(value);
  const line = value.replace(/[\r\n\u0085\u2028\u2029]+/g, " ");
  return /[",\s]/.test(line) || line === "" ? `"${line.replaceAll('"', '""')}"` : line;
};

export const ecsvLine = (values: readonly (string | number | null)[]): string =>
  `${values.map(cell).join(",")}\n`;
