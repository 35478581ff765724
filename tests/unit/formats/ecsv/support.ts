import { openEcsv } from "#server/formats/ecsv/open-ecsv.ts";
import type { RefusedRow, TableHeader, TableReader } from "#server/formats/table.ts";

export interface ReadTable {
  readonly header: TableHeader;
  /** Rows of texts and numbers; null is a blank. */
  readonly rows: readonly (readonly (string | number | null)[])[];
  readonly refused: readonly RefusedRow[];
  readonly bytes: number;
}

/** All of a table as rows. */
export const readAll = async ({ header, batches }: TableReader): Promise<ReadTable> => {
  const rows: (string | number | null)[][] = [];
  const refused: RefusedRow[] = [];
  let bytes = 0;
  for await (const batch of batches) {
    for (let i = 0; i < batch.rows; i++)
      rows.push(
        batch.columns.map((values) => {
          const value = values[i];
          return value === undefined || value === "" || Number.isNaN(value) ? null : value;
        }),
      );
    refused.push(...batch.refused);
    bytes = batch.bytes;
  }
  return { header, rows, refused, bytes };
};

/** Bytes in pieces of that length, so that lines and letters are torn apart. */
export async function* inPieces(bytes: Uint8Array, length: number): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < bytes.length; at += length) yield bytes.subarray(at, at + length);
}

export const readEcsv = async (text: string | Uint8Array, piece = 7): Promise<ReadTable> =>
  readAll(await openEcsv(inPieces(typeof text === "string" ? Buffer.from(text) : text, piece)));

/** A file with those column lines and that body. */
export const ecsv = (columns: readonly string[], body: string, more: readonly string[] = []): string =>
  [
    "# %ECSV 1.0",
    "# ---",
    ...more.map((line) => `# ${line}`),
    "# datatype:",
    ...columns.map((c) => `# - ${c}`),
    body,
  ].join("\n");
