import type { ColumnType, TableColumn, TableMeta } from "../table.ts";
import { badHeader } from "./errors.ts";
import { entriesOf, readYaml, textIn } from "./yaml.ts";

/** One column of the file; one that is left out still takes its place in every row. */
export interface EcsvColumn {
  readonly name: string;
  readonly datatype: string;
  /** Null where the column is left out. */
  readonly column: TableColumn | null;
  /** Why it is left out; empty where it is read. */
  readonly why: string;
  /** Place of the column that says which of its values are none; null without one. */
  readonly mask: number | null;
}

export interface EcsvHeader {
  readonly version: string;
  readonly delimiter: " " | ",";
  readonly columns: readonly EcsvColumn[];
  readonly meta: TableMeta;
}

const TYPES: Readonly<Record<string, ColumnType>> = {
  bool: "boolean",
  int8: "int8",
  int16: "int16",
  int32: "int32",
  int64: "int64",
  uint8: "uint8",
  uint16: "uint16",
  uint32: "uint32",
  uint64: "uint64",
  float16: "float32",
  float32: "float32",
  float64: "float64",
  float128: "float64",
  string: "text",
};

/** `# %ECSV 1.0`: the versions 0.9 and 1.x hold the same things. */
const FORMAT_LINE = /^# ?%ECSV (0\.9|1\.\d+)\s*$/;

/** The YAML behind the marks of a comment; `##` marks a comment in the header itself. */
const yamlOf = (lines: readonly string[]): string =>
  lines
    .filter((line) => line.startsWith("#") && !line.startsWith("##"))
    .map((line) => line.replace(/^# ?/, ""))
    .join("\n");

const whyLeftOut = (datatype: string, subtype: string): string => {
  if (subtype !== "") return `its cells hold ${subtype}, more than one value`;
  return datatype in TYPES ? "" : `its data type is ${datatype || "not named"}`;
};

const columnOf = (node: unknown, index: number): Omit<EcsvColumn, "mask"> => {
  const fields = entriesOf(node);
  const name = fields.get("name");
  if (typeof name !== "string" || name === "") throw badHeader(`Column ${index + 1} has no name.`);
  const datatype = textIn(fields.get("datatype"));
  const why = whyLeftOut(datatype, textIn(fields.get("subtype")));
  if (why !== "") return { name, datatype, column: null, why };
  const column: TableColumn = {
    name,
    type: TYPES[datatype] ?? "text",
    unit: textIn(fields.get("unit")),
    ucd: textIn(entriesOf(fields.get("meta")).get("ucd")),
    description: textIn(fields.get("description")),
    nullMark: null,
    frame: null,
  };
  return { name, datatype, column, why };
};

/** Names of masks by the name of what they mask: masked columns may be written with their mask beside them. */
const masksOf = (meta: ReadonlyMap<string, unknown>): ReadonlyMap<string, string> => {
  const masks = new Map<string, string>();
  for (const node of entriesOf(meta.get("__serialized_columns__")).values()) {
    const parts = entriesOf(node);
    const data = textIn(entriesOf(parts.get("data")).get("name"));
    const mask = textIn(entriesOf(parts.get("mask")).get("name"));
    if (data !== "" && mask !== "") masks.set(data, mask);
  }
  return masks;
};

const textsIn = (node: unknown): string[] =>
  (Array.isArray(node) ? node : [node]).map(textIn).filter((text) => text !== "");

const metaOf = (meta: ReadonlyMap<string, unknown>): TableMeta => ({
  title: textIn(meta.get("title")) || textIn(meta.get("name")) || null,
  description: textIn(meta.get("description")) || null,
  sources: ["comments", "reference", "references", "source"].flatMap((key) => textsIn(meta.get(key))),
  frame: null,
});

const delimiterOf = (node: unknown): " " | "," => {
  if (node === undefined || node === " ") return " ";
  if (node === ",") return ",";
  throw badHeader(`The delimiter ${JSON.stringify(node)} is neither a blank nor a comma.`);
};

const refuseDoubles = (names: readonly string[]): void => {
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined) throw badHeader(`Two columns are called “${twice}”.`);
};

/** What the comment lines at the beginning of the file say. */
export const readEcsvHeader = (lines: readonly string[]): EcsvHeader => {
  const version = FORMAT_LINE.exec(lines[0] ?? "")?.[1];
  if (version === undefined)
    throw badHeader(`The first line is not that of ECSV 1.0 but “${(lines[0] ?? "").slice(0, 60)}”.`);
  const root = entriesOf(readYaml(yamlOf(lines.slice(1))));
  const list = root.get("datatype");
  if (!Array.isArray(list) || list.length === 0) throw badHeader("The header names no columns.");
  const columns = list.map(columnOf);
  const names = columns.map((c) => c.name);
  refuseDoubles(names);
  const meta = entriesOf(root.get("meta"));
  const masks = masksOf(meta);
  return {
    version,
    delimiter: delimiterOf(root.get("delimiter")),
    columns: columns.map((c) => {
      const mask = names.indexOf(masks.get(c.name) ?? "");
      return { ...c, mask: mask < 0 ? null : mask };
    }),
    meta: metaOf(meta),
  };
};
