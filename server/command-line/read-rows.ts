import type { RowBatch, TableColumn, TableHeader } from "../formats/table.ts";
import { ecsvLine, scalar } from "../handover/ecsv.ts";

const DATATYPES: Readonly<Partial<Record<TableColumn["type"], string>>> = { text: "string", boolean: "bool" };

const columnLine = ({ name, type, unit, ucd, description }: TableColumn): string => {
  const parts = [
    `name: ${scalar(name)}`,
    `datatype: ${DATATYPES[type] ?? type}`,
    ...(unit === "" ? [] : [`unit: ${scalar(unit)}`]),
    ...(description === "" ? [] : [`description: ${scalar(description)}`]),
    ...(ucd === "" ? [] : [`meta: {ucd: ${scalar(ucd)}}`]),
  ];
  return `# - {${parts.join(", ")}}`;
};

/** Header of the values as ECSV 1.0: the file's own names, types, units and words. */
export const rowsHeader = ({ columns, meta }: TableHeader): string =>
  [
    "# %ECSV 1.0",
    "# ---",
    "# delimiter: ','",
    "# datatype:",
    ...columns.map(columnLine),
    ...(meta.title === null ? [] : ["# meta: !!omap", `# - title: ${scalar(meta.title)}`]),
    "# schema: astropy-2.0",
    ecsvLine(columns.map((c) => c.name)),
  ].join("\n");

const cellIn = (value: string | number | undefined): string | number | null =>
  value === undefined || value === "" || Number.isNaN(value) ? null : value;

/** The rows of a batch as lines. */
export const rowLines = ({ rows, columns }: RowBatch): string => {
  let text = "";
  for (let row = 0; row < rows; row++) text += ecsvLine(columns.map((values) => cellIn(values[row])));
  return text;
};
