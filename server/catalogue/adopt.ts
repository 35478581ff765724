import { type Column, columnsOf, errorKey } from "#shared/catalogue/columns.ts";
import type { Value } from "../database/bulk.ts";
import { givenColumns } from "../database/star-table.ts";

/** Columns of an entry and of the given part of a star, in the one order that all rows of values follow. */
export const GIVEN: readonly string[] = Object.keys(givenColumns());

interface Group {
  /** An entry speaks for the group when it has all of these. */
  needs: readonly number[];
  takes: readonly number[];
}

const at = (key: string): number => GIVEN.indexOf(key);
const group = (needs: readonly string[], more: readonly string[] = []): Group => ({
  needs: needs.map(at),
  takes: [...needs, ...more].map(at),
});

const TOGETHER: readonly Group[] = [
  group(["source_id"], ["release"]),
  group(["ra", "dec"], ["epoch"]),
  group(["pmra", "pmdec"], ["pmra_err", "pmdec_err"]),
  group(["teff_given"], ["teff_given_err"]),
  group(["distance_given"], ["distance_given_err"]),
];
const inTogether = new Set(TOGETHER.flatMap((g) => g.takes));

/** Values that only mean something together come from one entry; every other with its own error. */
const GROUPS: readonly Group[] = [
  ...TOGETHER,
  ...columnsOf("given")
    .filter((c) => !inTogether.has(at(c.key)))
    .map((c: Column) => group([c.key], c.hasError ? [errorKey(c.key)] : [])),
];

const isGiven = (value: Value | undefined): boolean =>
  value !== null && value !== undefined && !(typeof value === "number" && Number.isNaN(value));

/**
 * The values that count for a star. Pure.
 *
 * @param entries what each extract says of it, the preferred one first, each in the order of `GIVEN`
 */
export const adopt = (entries: readonly (readonly Value[])[]): Value[] => {
  const adopted: Value[] = new Array(GIVEN.length).fill(null);
  for (const { needs, takes } of GROUPS) {
    const winner = entries.find((entry) => needs.every((i) => isGiven(entry[i])));
    if (winner) for (const i of takes) adopted[i] = winner[i] ?? null;
  }
  return adopted;
};
