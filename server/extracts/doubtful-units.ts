import { plainHeader } from "#shared/catalogue/header-spellings.ts";

/** Units that a name itself ends with. */
const NAMED: Readonly<Record<string, string>> = {
  radeg: "deg",
  decdeg: "deg",
  dedeg: "deg",
  parallaxmas: "mas",
  teffk: "K",
  epochyr: "yr",
};

/** The unit that a header spells as part of its name; empty for none. */
export const unitInName = (header: string): string => NAMED[plainHeader(header)] ?? "";

interface Doubt {
  /** Beyond this only the usual unit fits. */
  readonly fitsBeyond: number;
  readonly units: readonly string[];
  readonly why: string;
}

/** Largest parallax of a star, 0.7687 arcsec; largest proper motion, 10.39 arcsec per year (both from memory). */
const LARGEST_PARALLAX_ARCSEC = 0.8;
const LARGEST_MOTION_ARCSEC = 10.5;
const COLDEST_K = 500;

/** Beyond it no single star of a survey stands (common practice, no source). */
const FARTHEST_KPC = 30;

const motion: Doubt = {
  fitsBeyond: LARGEST_MOTION_ARCSEC,
  units: ["mas.yr-1", "arcsec.yr-1"],
  why: "No star moves more than 10.5 arcsec a year, so larger values would have been mas a year; all of these are smaller",
};

const DOUBTS: Readonly<Record<string, Doubt>> = {
  parallax: {
    fitsBeyond: LARGEST_PARALLAX_ARCSEC,
    units: ["mas", "arcsec"],
    why: "No star has a parallax above 0.8 arcsec, so larger values would have been mas; all of these are smaller",
  },
  pmra: motion,
  pmdec: motion,
  distance: {
    fitsBeyond: FARTHEST_KPC,
    units: ["pc", "kpc"],
    why: "Stars are seen up to some 30 kpc away, so larger values would have been pc; all of these are smaller",
  },
  teff: {
    fitsBeyond: COLDEST_K,
    units: ["K", "kK"],
    why: "All values lie below 500, where no star has its temperature in K",
  },
};

/** Values that only make sense in the usual unit of the quantity up to this size. */
const MOST: Readonly<Record<string, { readonly most: number; readonly units: readonly string[] }>> = {
  light_share: { most: 1, units: ["", "%"] },
  epoch: { most: 2200, units: ["yr", "JD", "MJD"] },
};

export interface DoubtfulUnit {
  readonly units: readonly string[];
  readonly why: string;
}

/**
 * Why a unit that nobody wrote down cannot be told by the values; null where only the usual one fits.
 *
 * @param values of the column and, for proper motions, of its partner; blanks left out
 */
export const doubtfulUnit = (key: string, values: readonly number[]): DoubtfulUnit | null => {
  if (values.length === 0) return null;
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  const doubt = DOUBTS[key];
  if (doubt && largest <= doubt.fitsBeyond) return doubt;
  const bound = MOST[key];
  if (bound && largest > bound.most)
    return { units: bound.units, why: `Values up to ${largest} do not fit the usual unit` };
  return null;
};
