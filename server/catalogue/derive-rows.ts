import type { RecipeSettings } from "#shared/science/recipes.ts";
import { encodeRow, encodeValue, type Value } from "../database/bulk.ts";
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

/** Whole rows as encoded lines, in the order of `STAR_VALUES`, from adopted values. */
export const deriveLines = (adopted: readonly Value[][], recipe: RecipeSettings): string[] => {
  const given = givenColumns(adopted, recipe);
  const derived = deriveColumns(given, adopted.length, recipe);
  const columns = STELLAR.map((key) => arrayOf(derived, key));
  return adopted.map((row, i) => {
    let line = encodeRow(row);
    for (const column of columns) line += `\t${encodeValue(column[i] ?? null)}`;
    return line;
  });
};
