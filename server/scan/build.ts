import type { Deps } from "../deps.ts";
import type { ScanKey } from "./key.ts";

export type BuildProgress = (done: number, total: number) => Promise<void> | void;

/**
 * Mirrors an edition's numbers into the file of that key: complete or absent. The edition need not be in force yet.
 */
export const buildScanIndex = async (
  _deps: Deps,
  _key: ScanKey,
  _onProgress: BuildProgress = () => undefined,
): Promise<void> => {
  throw new Error("The scan index is not built yet.");
};
