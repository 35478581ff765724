import type { ColumnValues, RefusedRow, RowBatch } from "../table.ts";
import type { ByteSource } from "./byte-source.ts";
import type { ColumnReader, RowBlock } from "./columns.ts";
import { counted, cutOff } from "./errors.ts";
import type { Hdu } from "./hdu.ts";

const MOST_ROWS = 16_384;
/** What the rows of a batch and its values may take together, roughly. */
const BATCH_BYTES = 8 * 2 ** 20;
/** Room of a value beside the bytes it comes from. */
const VALUE_BYTES = 16;

const rowsOfBatch = (table: Hdu, readers: readonly ColumnReader[]): number => {
  const bytes = readers.reduce((sum, reader) => sum + reader.bytes + VALUE_BYTES, table.rowBytes);
  return Math.min(MOST_ROWS, table.rows, Math.max(1, Math.floor(BATCH_BYTES / bytes)));
};

const without = (values: ColumnValues, isRefused: (row: number) => boolean): ColumnValues =>
  values instanceof Float64Array
    ? values.filter((_, row) => !isRefused(row))
    : values.filter((_, row) => !isRefused(row));

const refusedRow = (block: RowBlock, row: number, why: string): RefusedRow => ({
  row: block.firstRow + row,
  line: null,
  text: block.bytes.toString("latin1", row * block.rowBytes, (row + 1) * block.rowBytes).trimEnd(),
  why,
});

const readBlock = (block: RowBlock, readers: readonly ColumnReader[], bytes: number): RowBatch => {
  const columns = readers.map((reader) => reader.read(block));
  const { refused } = block;
  if (refused.size === 0) return { rows: block.rows, columns, refused: [], bytes };
  return {
    rows: block.rows - refused.size,
    columns: columns.map((values) => without(values, (row) => refused.has(row))),
    refused: [...refused].sort(([a], [b]) => a - b).map(([row, why]) => refusedRow(block, row, why)),
    bytes,
  };
};

/** The rows of a table in order. Throws where the file ends before the last of them. */
export async function* readRows(
  source: ByteSource,
  table: Hdu,
  readers: readonly ColumnReader[],
): AsyncGenerator<RowBatch> {
  const { rows, rowBytes } = table;
  const most = rowsOfBatch(table, readers);
  // One buffer serves all batches: values are copied out of it before the next rows come in.
  const bytes = Buffer.allocUnsafeSlow(most * rowBytes);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  for (let row = 0; row < rows; row += most) {
    const count = Math.min(most, rows - row);
    const filled = await source.fill(bytes.subarray(0, count * rowBytes));
    if (filled < count * rowBytes)
      throw cutOff(
        `${counted(row + Math.floor(filled / rowBytes))} of the ${counted(rows)} rows of the table are there`,
      );
    const block = { bytes, view, rows: count, rowBytes, firstRow: row + 1, refused: new Map() };
    yield readBlock(block, readers, source.position);
  }
}
