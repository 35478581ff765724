import type { CsvRecord } from "../csv-splitter.ts";
import type { ColumnValues, RefusedRow, RowBatch } from "../table.ts";
import { numberCell, textCell } from "./cells.ts";
import type { EcsvColumn, EcsvHeader } from "./header.ts";

const SHOWN_CHARACTERS = 40;

/** A place where values of one column gather; `null`: the text is none of its type. */
interface Gathering {
  readonly index: number;
  readonly mask: number | null;
  readonly name: string;
  readonly datatype: string;
  read(text: string): number | string | null;
  readonly blank: number | string;
  values: (number | string)[];
}

const gatheringOf = ({ column, name, datatype, mask }: EcsvColumn, index: number): Gathering[] => {
  if (column === null) return [];
  const number = numberCell(datatype);
  const read = number ?? textCell(datatype);
  const blank = number ? Number.NaN : "";
  return [{ index, mask, name, datatype, read: (text) => read(text.trim()), blank, values: [] }];
};

const isMasked = (cells: readonly string[], mask: number | null): boolean =>
  mask !== null && /^(true|1)$/i.test((cells[mask] ?? "").trim());

const unquoted = (token: string): string =>
  token.startsWith('"') ? token.replace(/^"|"$/g, "").replaceAll('""', '"') : token.trim();

/** With blanks between the columns, several count as one and those at the ends for nothing, outside quotes. */
const betweenBlanks = (text: string): string[] => text.match(/"(?:[^"]|"")*"?|[^\s"]\S*/g) ?? [];

/** With commas between the columns, blanks around a quoted cell count for nothing. */
const betweenCommas = (text: string): string[] =>
  Array.from(text.matchAll(/(?:^|,)\s*("(?:[^"]|"")*"?|[^,]*)/g), (match) => match[1] ?? "");

const isLoose = (text: string, delimiter: string): boolean =>
  delimiter === " "
    ? text.startsWith(" ") || text.endsWith(" ") || text.includes("  ")
    : text.startsWith(" ") || text.includes(', "');

/** The cells of a record; one that is written with more blanks than need be is parted again, by looser rules. */
export const cellsOf = ({ cells, text }: CsvRecord, delimiter: string): readonly string[] => {
  if (!isLoose(text, delimiter)) return cells;
  return (delimiter === " " ? betweenBlanks(text) : betweenCommas(text)).map(unquoted);
};

/** Turns the records of the body into batches of typed columns. */
export class EcsvRows {
  private readonly gatherings: readonly Gathering[];
  private readonly read: (number | string)[] = [];
  private row = 0;

  /** @param linesBefore lines of the file before the first record */
  constructor(
    private readonly header: EcsvHeader,
    private readonly linesBefore: number,
  ) {
    this.gatherings = header.columns.flatMap(gatheringOf);
  }

  batch(records: readonly CsvRecord[], bytes: number): RowBatch {
    const refused: RefusedRow[] = [];
    let rows = 0;
    for (const record of records) {
      if (isOutsideTable(record)) continue;
      this.row++;
      const why = this.take(cellsOf(record, this.header.delimiter));
      if (why === null) rows++;
      else refused.push({ row: this.row, line: this.linesBefore + record.line, text: record.text, why });
    }
    return { rows, columns: this.gatherings.map(emptied), refused, bytes };
  }

  /** Adds one row to every column, or to none; why it was refused. */
  private take(cells: readonly string[]): string | null {
    const { gatherings, read } = this;
    const width = this.header.columns.length;
    if (cells.length !== width) return `This row has ${cells.length} values; the table has ${width} columns.`;
    for (const [i, { index, mask, name, datatype, blank, ...column }] of gatherings.entries()) {
      const text = cells[index] ?? "";
      const value = isMasked(cells, mask) ? blank : column.read(text);
      if (value === null)
        return `“${text.slice(0, SHOWN_CHARACTERS)}” in ${name} is no value of the type ${datatype}.`;
      read[i] = value;
    }
    for (const [i, { values, blank }] of gatherings.entries()) values.push(read[i] ?? blank);
    return null;
  }
}

/** Blank lines, and comments between the rows. */
const isOutsideTable = ({ text }: CsvRecord): boolean => text.trim() === "" || text.trimStart()[0] === "#";

/** What has gathered, handed over. */
const emptied = (gathering: Gathering): ColumnValues => {
  const { values, blank } = gathering;
  gathering.values = [];
  return typeof blank === "number" ? Float64Array.from(values, Number) : values.map(String);
};
