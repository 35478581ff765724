import { type OpenChoice, openTable } from "#server/formats/open-table.ts";
import type { TableFinding } from "#server/formats/table.ts";
import { inPieces, type ReadTable, readAll } from "./ecsv/support.ts";

export interface OpenedAny extends ReadTable {
  readonly takenFor: string;
  readonly isPacked: boolean;
  readonly findings: readonly TableFinding[];
}

export const bytesOf = (text: string | Uint8Array): Uint8Array =>
  typeof text === "string" ? Buffer.from(text) : text;

/** All of a file as the product opens it, in pieces that tear its lines apart. */
export const openAny = async (
  text: string | Uint8Array,
  { companion, ...choice }: Omit<OpenChoice, "companion"> & { companion?: string | Uint8Array } = {},
  piece = 37,
): Promise<OpenedAny> => {
  const beside = companion === undefined ? undefined : inPieces(bytesOf(companion), piece);
  const { reader, takenFor, isPacked } = await openTable(inPieces(bytesOf(text), piece), {
    ...choice,
    companion: beside,
  });
  return { ...(await readAll(reader)), takenFor, isPacked, findings: reader.findings() };
};

export const keysOf = ({ findings }: OpenedAny): string[] => findings.map(({ key }) => key);
