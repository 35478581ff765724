import { type ErrorVector, errorVector } from "./relative-error.ts";

/** What one star's derivation carries from step to step; made once and used for every star of a block. NaN is blank. */
export interface Scratch {
  /** Row of the block. */
  row: number;
  distance: number;
  /** Relative error of the parallax, and so of the distance. */
  distanceError: number;
  absKs: number;
  /** Error of the apparent magnitude alone; the parallax's share is added where it is needed. */
  ksError: number;
  absG: number;
  gError: number;
  bpRp: number;
  bpRpError: number;
  /** Whether BP and RP are faint enough for the temperature relation of stars like the Sun. */
  isColourSafe: boolean;
  logg: number;
  loggError: number;
  feh: number;
  fehError: number;
  hasFeh: boolean;
  hasLogg: boolean;
  /** Whether gravity or the place beside the main sequence says that the star is a dwarf, or that it is none. */
  isDwarf: boolean;
  isNotDwarf: boolean;
  isAssumed: boolean;
  teff: number;
  radius: number;
  luminosity: number;
  mass: number;
  teffErrors: ErrorVector;
  radiusErrors: ErrorVector;
  luminosityErrors: ErrorVector;
  massErrors: ErrorVector;
  /** For the quantity at hand. */
  work: ErrorVector;
  axisErrors: ErrorVector;
  periodErrors: ErrorVector;
}

export const newScratch = (): Scratch => ({
  row: 0,
  distance: Number.NaN,
  distanceError: Number.NaN,
  absKs: Number.NaN,
  ksError: Number.NaN,
  absG: Number.NaN,
  gError: Number.NaN,
  bpRp: Number.NaN,
  bpRpError: Number.NaN,
  isColourSafe: false,
  logg: Number.NaN,
  loggError: Number.NaN,
  feh: Number.NaN,
  fehError: Number.NaN,
  hasFeh: false,
  hasLogg: false,
  isDwarf: false,
  isNotDwarf: false,
  isAssumed: false,
  teff: Number.NaN,
  radius: Number.NaN,
  luminosity: Number.NaN,
  mass: Number.NaN,
  teffErrors: errorVector(),
  radiusErrors: errorVector(),
  luminosityErrors: errorVector(),
  massErrors: errorVector(),
  work: errorVector(),
  axisErrors: errorVector(),
  periodErrors: errorVector(),
});
