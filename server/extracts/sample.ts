import type { ReadingPlan } from "#shared/api/extracts.ts";
import type { CsvRecord } from "../formats/csv-splitter.ts";
import { parseNumber } from "../formats/numbers.ts";
import type { TableColumn, TableFinding, TableFormat, TableMeta } from "../formats/table.ts";

/** One column of the file and what the sampled rows hold in it. */
export interface SampleColumn {
  /** Name, unit, UCD, description, null mark and frame as the file has them. */
  readonly column: TableColumn;
  /** One text per sampled row, as the file has it; of binary formats the value in its shortest form, "" for a blank. */
  readonly texts: readonly string[];
  /** What the texts are as plain numbers of the file's own unit; NaN for a blank and for what is no number. */
  readonly values: Float64Array;
}

/** What is known of a file without reading all of it, the same for every format. */
export interface Sample {
  format: TableFormat;
  /** The kind within the format, as its reader names it. */
  variant: string;
  meta: TableMeta;
  /** Rows that the file says it has; null where it does not say. */
  declaredRows: number | null;
  /** What the reader of the format found, a file that it refuses included (level "stop"). */
  found: readonly TableFinding[];
  /** In the order of the file, as long as `header`. */
  columns: readonly SampleColumn[];
  encoding: ReadingPlan["encoding"];
  isEncodingGuessed: boolean;
  /** Delimiter and decimal mark of delimited text; any value elsewhere. */
  delimiter: ReadingPlan["delimiter"];
  decimalMark: ReadingPlan["decimalMark"];
  /** Made unique: `ra (2)`. */
  header: string[];
  renamed: { from: string; to: string }[];
  /** Whole rows of the header's width, spread over the file where it can be; a line of 0 where it is not known. */
  rows: CsvRecord[];
  /** Rows of the beginning that have more or fewer values than the header. */
  uneven: CsvRecord[];
  /** What the file is instead of a table; null for a table. */
  instead: string | null;
  isBigEndian: boolean;
  isEmpty: boolean;
  /** The last line has fewer values than the header and no end. */
  cutLine: CsvRecord | null;
}

const NO_META: TableMeta = { title: null, description: null, sources: [], frame: null };

/** A column of which the file says no more than its name. */
export const namedColumn = (name: string): TableColumn => ({
  name,
  type: "text",
  unit: "",
  ucd: "",
  description: "",
  nullMark: null,
  frame: null,
});

const sampleColumn = (
  column: TableColumn,
  index: number,
  rows: readonly CsvRecord[],
  decimalMark: ReadingPlan["decimalMark"],
): SampleColumn => {
  const texts = rows.map((row) => row.cells[index] ?? "");
  return { column, texts, values: Float64Array.from(texts, (text) => parseNumber(text.trim(), decimalMark)) };
};

/** A sample of those columns and rows, with nothing wrong unless it is said. */
export const sampleOf = (
  columns: readonly TableColumn[],
  rows: CsvRecord[],
  more: Partial<Omit<Sample, "columns" | "header" | "rows">> = {},
): Sample => ({
  format: "delimited",
  variant: "",
  meta: NO_META,
  declaredRows: null,
  found: [],
  encoding: "utf-8",
  isEncodingGuessed: false,
  delimiter: ",",
  decimalMark: ".",
  renamed: [],
  uneven: [],
  instead: null,
  isBigEndian: false,
  isEmpty: false,
  cutLine: null,
  ...more,
  header: columns.map((c) => c.name),
  rows,
  columns: columns.map((column, index) => sampleColumn(column, index, rows, more.decimalMark ?? ".")),
});
