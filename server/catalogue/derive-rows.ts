import type { RecipeSettings } from "#shared/science/recipes.ts";
import type { Value } from "../database/bulk.ts";
import type { LineBuffer } from "../database/line-buffer.ts";
import { stellarColumns } from "../database/star-table.ts";
import { deriveColumns } from "../derive/derive.ts";
import type { StellarColumns } from "../derive/star-columns.ts";
import { GIVEN } from "./adopt.ts";
import { givenColumns } from "./given-columns.ts";

const STELLAR: readonly string[] = Object.keys(stellarColumns());

/** Columns of a star's row after its keys. */
export const STAR_VALUES: readonly string[] = [...GIVEN, ...STELLAR];

const arrayOf = (derived: StellarColumns, key: string): ArrayLike<number> => {
  if (key === "flags_bits") return derived.flagBits;
  if (key === "flags") return derived.flags;
  const found = derived.values[key] ?? derived.blanks[key] ?? derived.methods[key];
  if (!found) throw new Error(`Nothing derives the column ${key}.`);
  return found;
};

/** Writes the cells of a star's row after its keys, in the order of `STAR_VALUES`. */
type WriteStar = (index: number, lines: LineBuffer) => void;

const writeValue = (value: Value, lines: LineBuffer): void => {
  if (value === null) lines.blank();
  else if (typeof value === "string") lines.text(value);
  else lines.number(value);
};

/** Derives whole rows from adopted values; each is written when it is asked for. */
export const deriveRows = (adopted: readonly Value[][], recipe: RecipeSettings): WriteStar => {
  const given = givenColumns(adopted, recipe);
  const derived = deriveColumns(given, adopted.length, recipe);
  const columns = STELLAR.map((key) => arrayOf(derived, key));
  return (index, lines) => {
    for (const value of adopted[index] ?? []) writeValue(value, lines);
    for (const column of columns) lines.number(column[index] ?? Number.NaN);
  };
};
