import type { Extract } from "../database/entities/extract.entity.ts";
import type { FileStorage } from "../storage/storage.ts";
import type { Beside } from "./open-extract.ts";

/** What helps to read an original: its name, and the description that was brought beside it. */
export const besideOf = async (
  files: FileStorage,
  { fileName, companion }: Pick<Extract, "fileName" | "companion">,
): Promise<Beside> => ({
  name: fileName,
  companion: companion ? await files.read(companion.key) : undefined,
});
