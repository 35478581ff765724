import { METHOD_KEYS } from "#server/database/star-table.ts";
import { blankKey, type Column, columnsOf, errorKey } from "#shared/catalogue/columns.ts";

/** The numeric keys of one row of given values; temperature and distance stand apart as `…_given`. NaN is "not given". */
export const GIVEN_KEYS: readonly string[] = [
  ...columnsOf("given").flatMap((c: Column) =>
    c.kind === "text" ? [] : c.hasError ? [c.key, errorKey(c.key)] : [c.key],
  ),
  "teff_given",
  "teff_given_err",
  "distance_given",
  "distance_given_err",
];

/**
 * The stellar quantities that have a value, an error and a blank reason: the registry's but for the count of flags, by
 * name, as each is computed by name.
 */
export const STELLAR_KEYS = [
  "teff",
  "distance",
  "abs_ks",
  "radius",
  "mass",
  "luminosity",
  "density",
  "hz_inner",
  "hz_outer",
  "hz_inner_period",
  "hz_outer_period",
  "earth_distance",
  "earth_period",
  "transit_probability",
  "transit_duration",
  "earth_depth",
] as const;

/** Relative error of R★ T^(−1/4), kept for the error of the smallest planet: it scales by that. */
export const REACH_ERROR_KEY = "reach_err";

export type StellarKey = (typeof STELLAR_KEYS)[number];

/** Columns of one length by key. */
export type Columns = Record<string, Float64Array>;

export interface StellarColumns {
  readonly length: number;
  /** Values and errors, by `key` and `key_err`. */
  readonly values: Columns;
  /** Blank-reason codes by `key_blank`; 0 where the value is there. */
  readonly blanks: Record<string, Uint8Array>;
  /** Codes of shared/catalogue/methods by `key_method`. */
  readonly methods: Record<string, Uint8Array>;
  readonly flagBits: Uint16Array;
  readonly flags: Uint8Array;
}

export const allocateGiven = (length: number): Columns =>
  Object.fromEntries(GIVEN_KEYS.map((key) => [key, new Float64Array(length).fill(Number.NaN)]));

export const allocateStellar = (length: number): StellarColumns => ({
  length,
  values: Object.fromEntries(
    [...STELLAR_KEYS.flatMap((key) => [key, errorKey(key)]), REACH_ERROR_KEY].map((key) => [
      key,
      new Float64Array(length).fill(Number.NaN),
    ]),
  ),
  blanks: Object.fromEntries(STELLAR_KEYS.map((key) => [blankKey(key), new Uint8Array(length)])),
  methods: Object.fromEntries(METHOD_KEYS.map((key) => [`${key}_method`, new Uint8Array(length)])),
  flagBits: new Uint16Array(length),
  flags: new Uint8Array(length),
});
