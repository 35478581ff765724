import { AppError, unprocessable } from "../../errors.ts";
import type { DescribedTable } from "./description.ts";

/** The last part of a path, without the suffix of its compression. */
const plainName = (path: string): string =>
  (path.split(/[\\/]/).at(-1) ?? "").replace(/\.(?:gz|Z)$/i, "").toLowerCase();

/** More marks than a list of files has; each of them multiplies the ways to match. */
const MOST_STARS = 3;

/** Whether a name is one of those that `table*.dat` or `table[12].dat` stands for. */
export const matchesFile = (pattern: string, name: string): boolean => {
  const [wanted, own] = [plainName(pattern), plainName(name)];
  if (wanted === own || wanted.split("*").length > MOST_STARS + 1) return wanted === own;
  const literal = wanted
    .replace(/[.+^${}()|\\]/g, "\\$&")
    .replaceAll("*", ".*")
    .replaceAll("?", ".");
  try {
    return new RegExp(`^${literal}$`).test(own);
  } catch {
    return false;
  }
};

/** A different question than damage: the caller should say which table it is, or bring the other file. */
export const whichTable = (names: readonly string[], name: string | undefined): AppError =>
  new AppError(
    422,
    "which-table",
    `The description speaks of ${names.length} tables, ${names.join(", ")}, and ${name === undefined ? "the file has no name" : `“${plainName(name)}” is none of them`}.`,
    { hint: "Say which of them the file is.", details: names },
  );

/**
 * The table that a file is: the only one described, or the one whose file name is its own.
 *
 * @param name of the file, or of the table as a person chose it
 */
export const chooseTable = (tables: readonly DescribedTable[], name: string | undefined): DescribedTable => {
  const usable = tables.filter(({ fields }) => fields.length > 0);
  const [only, ...others] = usable;
  if (!only)
    throw unprocessable(
      "described-no-columns",
      "The byte-by-byte description names no columns that can be read.",
      {
        hint: "Check that it is whole: each column stands on a line with its bytes, format, unit, label and explanation.",
      },
    );
  if (others.length === 0 && only.files.length <= 1) return only;
  const named = usable.find(
    ({ files }) => name !== undefined && files.some((file) => matchesFile(file, name)),
  );
  if (named) return named;
  if (others.length === 0) return only;
  throw whichTable(
    usable.flatMap(({ files }) => files),
    name,
  );
};
