import { type ErrorVector, errorVector } from "./relative-error.ts";

/** What one star's derivation carries from step to step; made once and used for every star of a block. */
export interface Scratch {
  distance: number;
  /** Relative error of the distance. */
  distanceError: number;
  absKs: number;
  absKsError: number;
  absG: number;
  absGError: number;
  bpRp: number;
  bpRpError: number;
  logg: number;
  loggError: number;
  feh: number;
  fehError: number;
  hasFeh: boolean;
  hasLogg: boolean;
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
  distance: Number.NaN,
  distanceError: Number.NaN,
  absKs: Number.NaN,
  absKsError: Number.NaN,
  absG: Number.NaN,
  absGError: Number.NaN,
  bpRp: Number.NaN,
  bpRpError: Number.NaN,
  logg: Number.NaN,
  loggError: Number.NaN,
  feh: Number.NaN,
  fehError: Number.NaN,
  hasFeh: false,
  hasLogg: false,
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
