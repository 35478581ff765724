import type { ReadingPlan } from "#shared/api/extracts.ts";
import { type OpenChoice, openTable, type RecognisedTable } from "../formats/open-table.ts";

/** How a curator says that text is to be read; what is left out is judged by the bytes. */
export type DialectChoice = Partial<Pick<ReadingPlan, "format" | "encoding" | "delimiter" | "decimalMark">>;

/** A file that belongs to the table: its name, and the description beside it where there is one. */
export type Beside = Pick<OpenChoice, "name" | "companion">;

/** Only text has a dialect; the blank that parts columns is found by the reader of columns. */
const dialectOf = ({ format, encoding, delimiter, decimalMark }: DialectChoice): OpenChoice => {
  if (format === undefined || format === "delimited")
    return { encoding, decimalMark, delimiter: delimiter === " " ? undefined : delimiter };
  return format === "fixed-width" ? { encoding, decimalMark } : {};
};

/** Opens the table of an extract by what its bytes say. */
export const openExtract = (
  source: AsyncIterable<Uint8Array>,
  choice: DialectChoice,
  beside: Beside = {},
): Promise<RecognisedTable> => openTable(source, { ...dialectOf(choice), ...beside });
