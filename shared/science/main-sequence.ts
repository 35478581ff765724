import { SOLAR_MBOL } from "./constants.ts";
import { radiusFromLuminosity } from "./luminosity.ts";
import { MAIN_SEQUENCE_ROWS, type MainSequenceRow } from "./main-sequence-table.ts";

/**
 * What the mean main sequence says of a star, by its temperature, its absolute Ks, its BP − RP or its spectral type. The
 * sequence is a mean: single stars scatter about it by tenths of a magnitude.
 */

export interface MainSequenceStar {
  /** K. */
  readonly teff: number;
  readonly absG: number;
  readonly bpRp: number;
  readonly absKs: number;
  /** Bolometric correction to V, and to Ks: `BC_V + (V − Ks)`. */
  readonly bcV: number;
  readonly bcKs: number;
  readonly absV: number;
  readonly bV: number;
  readonly vKs: number;
  readonly gV: number;
  /** M☉; tentative. */
  readonly mass: number;
  /** `(4.74 − M_V − BC_V) / 2.5`, log of L☉. */
  readonly logLuminosity: number;
  /** `√L (5772 K / Teff)²`, R☉. */
  readonly radius: number;
}

export type MainSequenceQuantity = keyof MainSequenceStar;

/** Quantities that change in one sense along the sequence and so can tell where on it a star is. */
export type MainSequencePlace = "teff" | "absKs" | "bpRp";

const read = (row: MainSequenceRow): MainSequenceStar => {
  const [, teff, absG, bpRp, absKs, bcV, absV, bV, vKs, gV, mass] = row;
  const logLuminosity = (SOLAR_MBOL - absV - bcV) / 2.5;
  const radius = radiusFromLuminosity(10 ** logLuminosity, teff);
  return { teff, absG, bpRp, absKs, bcV, bcKs: bcV + vKs, absV, bV, vKs, gV, mass, logLuminosity, radius };
};

const STARS = MAIN_SEQUENCE_ROWS.map(read);

/** The table by column: it is searched once per star. */
const column = (quantity: MainSequenceQuantity): Float64Array =>
  Float64Array.from(STARS, (star) => star[quantity]);
const COLUMNS: Readonly<Record<MainSequenceQuantity, Float64Array>> = {
  teff: column("teff"),
  absG: column("absG"),
  bpRp: column("bpRp"),
  absKs: column("absKs"),
  bcV: column("bcV"),
  bcKs: column("bcKs"),
  absV: column("absV"),
  bV: column("bV"),
  vKs: column("vKs"),
  gV: column("gV"),
  mass: column("mass"),
  logLuminosity: column("logLuminosity"),
  radius: column("radius"),
};

/** BP − RP from which on it no longer tells the place: at M8.5V it turns. */
export const REDDEST_TELLING_BP_RP = 4.7;

/** Rows up to the first that is redder than what BP − RP tells. */
const TELLING_ROWS = STARS.findIndex((star) => star.bpRp > REDDEST_TELLING_BP_RP) + 1;

/** Number of the later one of the two rows that hold a value; `size` is the number of rows that may. */
const laterRow = (places: Float64Array, size: number, value: number): number => {
  const sense = (places[size - 1] as number) > (places[0] as number) ? 1 : -1;
  let [low, high] = [0, size - 1];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (sense * (places[middle] as number) < sense * value) low = middle;
    else high = middle;
  }
  return high;
};

/**
 * A quantity of the mean main sequence, linear between its rows.
 *
 * @param quantity what is asked for
 * @param place by what the star is placed: `teff` (7220 to 2330 K), `absKs` (1.836 to 10.5) or `bpRp` (0.377 to 4.7)
 * @param value its value
 * @returns NaN outside these, and where the table has none
 * @see Pecaut & Mamajek 2013, ApJS 208, 9, Table 5, version 2024.05.15
 * @example mainSequence("absKs", "teff", 3210) // 7.36
 */
export const mainSequence = (
  quantity: MainSequenceQuantity,
  place: MainSequencePlace,
  value: number,
): number => {
  if (place === "bpRp" && !(value < REDDEST_TELLING_BP_RP)) return Number.NaN;
  const places = COLUMNS[place];
  // BP − RP is searched among its rising rows alone: the others are redder than what is let through above.
  const after = laterRow(places, place === "bpRp" ? TELLING_ROWS : places.length, value);
  const [here, next] = [places[after - 1] as number, places[after] as number];
  const share = (value - here) / (next - here);
  if (!(share >= 0 && share <= 1)) return Number.NaN;
  const quantities = COLUMNS[quantity];
  const before = quantities[after - 1] as number;
  return before + share * ((quantities[after] as number) - before);
};

const BY_TYPE = new Map(MAIN_SEQUENCE_ROWS.map((row, i) => [row[0], STARS[i] as MainSequenceStar]));

/** Class, subclass and, where given, that of a dwarf with small letters for peculiarities. */
const DWARF_TYPE = /^([FGKM])\s*(\d(?:\.\d)?)\s*(?:V[a-z]*)?$/;

/**
 * The row of a spectral type as people write it: `M4V`, `M4`, `M 4.5 Ve`, `K7.0`. A type without a luminosity class counts as
 * a dwarf.
 *
 * @returns undefined for another luminosity class, a type between the rows (G2.5V) and one outside F0V to M9.5V
 * @example mainSequenceOfType("G2V")?.teff // 5770
 */
export const mainSequenceOfType = (type: string): MainSequenceStar | undefined => {
  const [, letter, subclass] = DWARF_TYPE.exec(type.trim()) ?? [];
  return letter ? BY_TYPE.get(`${letter}${Number(subclass)}V`) : undefined;
};

/**
 * Absolute G of a main-sequence star of that colour, mag, by linear interpolation.
 *
 * @returns NaN outside BP − RP 0.377 to 4.7
 */
export const mainSequenceAbsG = (bpRp: number): number => mainSequence("absG", "bpRp", bpRp);

/** A star this much brighter than the main sequence at its colour, mag, is no dwarf. */
export const DWARF_BRIGHTNESS_MARGIN = 1;
/** A star of lower gravity, dex of cm/s², is no dwarf. */
export const DWARF_LEAST_LOGG = 4.0;
