import type { EntitySchemaColumnOptions } from "typeorm";
import { blankKey, type Column, columnsOf, errorKey } from "#shared/catalogue/columns.ts";

/** The physical columns of the wide tables, made from the column registry. SQL names are the registry's keys. */
type Columns = Record<string, EntitySchemaColumnOptions>;

const number = (key: string): Columns => ({ [key]: { name: key, type: "double", nullable: true } });

const text = (key: string): Columns => ({
  [key]: { name: key, type: "varchar", length: 120, nullable: true },
});

const small = (key: string): Columns => ({
  [key]: { name: key, type: "tinyint", unsigned: true, default: 0 },
});

const withError = (c: Column): Columns => ({
  ...number(c.key),
  ...(c.hasError ? number(errorKey(c.key)) : {}),
});

/** Values as extracts give them. Temperature and distance stand apart as `…_given`: `teff` and
 * `distance` are what the recipe makes of them. */
export const givenColumns = (): Columns =>
  Object.assign(
    {},
    ...columnsOf("given").map((c) => (c.kind === "text" ? text(c.key) : withError(c))),
    number("teff_given"),
    number("teff_given_err"),
    number("distance_given"),
    number("distance_given_err"),
  );

/** Which quantities record the relation they came from. */
export const METHOD_KEYS = ["distance", "teff", "radius", "mass", "luminosity"] as const;

/** What follows from the given values: each with its error and, where it is blank, the reason's code. */
export const stellarColumns = (): Columns =>
  Object.assign(
    {},
    ...columnsOf("stellar")
      .filter((c) => c.key !== "flags")
      .map((c) => ({ ...withError(c), ...small(blankKey(c.key)) })),
    number("reach_err"),
    ...METHOD_KEYS.map((key) => small(`${key}_method`)),
    { flags_bits: { name: "flags_bits", type: "smallint", unsigned: true, default: 0 } },
    small("flags"),
  );
