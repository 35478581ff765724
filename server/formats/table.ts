/**
 * What every reader makes of a file: a header, then batches of typed columns. A reader holds one batch at a time, so that
 * memory does not grow with the file.
 */

export type TableFormat = "delimited" | "fixed-width" | "described" | "votable" | "fits" | "ecsv";

/** Type of a column as the file declares or shows it; text where it says nothing. */
export type ColumnType =
  | "text"
  | "boolean"
  | "uint8"
  | "int8"
  | "int16"
  | "uint16"
  | "int32"
  | "uint32"
  | "int64"
  | "uint64"
  | "float32"
  | "float64";

/** Frame, equinox and epoch that a file ties to its positions, each as it spells them. */
export interface PositionFrame {
  readonly system: string | null;
  readonly equinox: string | null;
  readonly epoch: string | null;
}

export interface TableColumn {
  readonly name: string;
  readonly type: ColumnType;
  /** Unit, UCD and description as the file spells them; empty where it has none. */
  readonly unit: string;
  readonly ucd: string;
  readonly description: string;
  /** Declared mark of a blank; its cells are blank already when they come out of the reader. */
  readonly nullMark: string | null;
  readonly frame: PositionFrame | null;
}

/** What a file says of itself. */
export interface TableMeta {
  readonly title: string | null;
  readonly description: string | null;
  /** Citations, bibliographic codes and further words about the origin. */
  readonly sources: readonly string[];
  readonly frame: PositionFrame | null;
}

export interface TableHeader {
  readonly format: TableFormat;
  /** The kind within the format, e.g. "BINARY2", "binary table", "semicolons". */
  readonly variant: string;
  /** Encoding of its text; null where the format leaves no choice. */
  readonly encoding: string | null;
  readonly columns: readonly TableColumn[];
  /** Rows that the file says it has; null where it does not say. */
  readonly declaredRows: number | null;
  readonly meta: TableMeta;
}

/**
 * Values of one column in one batch. Numbers: NaN is blank. Texts: the empty text is blank. Columns of 64-bit integers and
 * of booleans are texts ("true", "false"), so that no digit is lost; all other numbers are doubles, single precision
 * widened exactly.
 */
export type ColumnValues = Float64Array | readonly string[];

/** A row that could not be read, as the file has it. */
export interface RefusedRow {
  /** Row of the table from 1, and line of the file where it has lines. */
  readonly row: number;
  readonly line: number | null;
  readonly text: string;
  readonly why: string;
}

export interface RowBatch {
  readonly rows: number;
  /** In the order of the header's columns, each of `rows` values. */
  readonly columns: readonly ColumnValues[];
  readonly refused: readonly RefusedRow[];
  /** Bytes of the source consumed up to here, for progress. */
  readonly bytes: number;
  /** Blank lines among the rows, which are none of them; absent where the format has no lines. */
  readonly blankLines?: number;
  /** A row as the file has it; absent where the format has no lines. To be asked before the next batch. */
  readonly lineOf?: (row: number) => { readonly line: number; readonly text: string };
}

/** Stop: the table cannot be trusted. Ask: a person must decide. Note: worth knowing. */
export type FindingLevel = "stop" | "ask" | "note";

/** Something that a reader found, once however many rows it touches. */
export interface TableFinding {
  readonly key: string;
  readonly level: FindingLevel;
  /** What and why. */
  readonly message: string;
  /** What to do. */
  readonly hint: string;
  readonly count: number;
  /** A few rows, columns or texts that show it. */
  readonly examples: readonly string[];
}

export interface TableReader {
  readonly header: TableHeader;
  /** To be read once, in order. Throws an AppError where the file ends or breaks in the middle. */
  readonly batches: AsyncIterable<RowBatch>;
  /** Complete once the batches have been read; before that, what the header showed. */
  findings(): readonly TableFinding[];
}

/** Opens a table from the bytes of a file. Throws an AppError where it is not a table of that format. */
export type OpenTable = (source: AsyncIterable<Uint8Array>) => Promise<TableReader>;
