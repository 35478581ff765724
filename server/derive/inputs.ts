import type { Columns } from "./star-columns.ts";

const KEYS = {
  parallax: "parallax",
  parallaxError: "parallax_err",
  distance: "distance_given",
  distanceError: "distance_given_err",
  g: "g_mag",
  gError: "g_mag_err",
  bp: "bp_mag",
  bpError: "bp_mag_err",
  rp: "rp_mag",
  rpError: "rp_mag_err",
  v: "v_mag",
  vError: "v_mag_err",
  j: "j_mag",
  jError: "j_mag_err",
  h: "h_mag",
  hError: "h_mag_err",
  ks: "ks_mag",
  ksError: "ks_mag_err",
  ebv: "ebv",
  ebvError: "ebv_err",
  logg: "logg",
  loggError: "logg_err",
  feh: "feh",
  fehError: "feh_err",
  teff: "teff_given",
  teffError: "teff_given_err",
  ruwe: "ruwe",
  /** Limit of the quality of the astrometric fit by the star's release; where blank, the recipe's general one. */
  ruweLimit: "ruwe_limit",
  lightShare: "light_share",
} as const;

/** The given columns that derivation reads, looked up once for a block of stars; NaN is "not given". */
export type Inputs = Readonly<Record<keyof typeof KEYS, Float64Array>>;

/** A column that the block lacks reads as not given throughout. */
export const bindInputs = (given: Columns, length: number): Inputs => {
  const notGiven = new Float64Array(length).fill(Number.NaN);
  const bound = Object.entries(KEYS).map(([name, key]) => [name, given[key] ?? notGiven]);
  return Object.fromEntries(bound) as Inputs;
};

/** Value of one row; an index outside the column reads as not given. */
export const at = (column: Float64Array, i: number): number => column[i] ?? Number.NaN;

/** Errors below zero are no errors: they read as not given. */
export const errorAt = (column: Float64Array, i: number): number => {
  const error = at(column, i);
  return error >= 0 ? error : Number.NaN;
};
