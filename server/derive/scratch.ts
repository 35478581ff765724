import type { LuminosityMethod } from "#shared/science/recipes.ts";
import { errorVector } from "./relative-error.ts";

/**
 * What one star's derivation carries from step to step; made once and used for every star of a block. NaN is blank.
 * Errors are one sigma, in the unit of the value unless they are called relative.
 */
export const newScratch = () => ({
  /** Row of the block. */
  row: 0,

  parallax: Number.NaN,
  parallaxError: Number.NaN,
  distanceGiven: Number.NaN,
  distanceGivenError: Number.NaN,
  distance: Number.NaN,
  /** Relative. */
  distanceError: Number.NaN,

  /** Apparent magnitudes as given. */
  g: Number.NaN,
  bp: Number.NaN,
  rp: Number.NaN,
  v: Number.NaN,
  j: Number.NaN,
  h: Number.NaN,
  ks: Number.NaN,
  gError: Number.NaN,
  bpError: Number.NaN,
  rpError: Number.NaN,
  vError: Number.NaN,
  jError: Number.NaN,
  hError: Number.NaN,
  ksError: Number.NaN,

  /** Colour excess E(B − V), mag. */
  ebv: 0,
  ebvError: 0,
  /** What the colour excess owes to the error of the distance, mag; a nearer star is less reddened. */
  ebvDistanceError: 0,
  /** BP − RP with a first share of the reddening taken off: by it the extinction in G, BP and RP goes. */
  firstColour: Number.NaN,
  extinctionKs: 0,
  extinctionG: 0,

  absKs: Number.NaN,
  absG: Number.NaN,
  /** BP − RP without reddening. */
  bpRp: Number.NaN,
  /** Its reddening per E(B − V). */
  bpRpPerExcess: 0,
  /** The colour, without reddening, that gives the temperature. */
  colour: Number.NaN,
  /** Colour per mag of E(B − V). */
  colourPerExcess: 0,

  /** As given, else as the recipe assumes. */
  logg: Number.NaN,
  loggError: Number.NaN,
  feh: Number.NaN,
  fehError: Number.NaN,
  hasFeh: false,
  hasLogg: false,
  isAssumed: false,
  /** Whether gravity or the place beside the main sequence says that the star is a dwarf, or that it is none. */
  isDwarf: false,
  isNotDwarf: false,

  teffGiven: Number.NaN,
  teffGivenError: Number.NaN,
  teff: Number.NaN,
  correctionKs: Number.NaN,
  correctionG: Number.NaN,
  luminosity: Number.NaN,
  /** By which correction the luminosity came about that the radius rests on; null where it rests on none. */
  lightMethod: null as LuminosityMethod | null,
  radius: Number.NaN,
  mass: Number.NaN,
  density: Number.NaN,

  /** Insolation at the limits of the habitable zone, Earth's = 1. */
  insolationInner: Number.NaN,
  insolationOuter: Number.NaN,
  /** Semi-major axes, au, and periods, d. */
  innerAxis: Number.NaN,
  outerAxis: Number.NaN,
  innerPeriod: Number.NaN,
  outerPeriod: Number.NaN,
  earthAxis: Number.NaN,
  earthPeriod: Number.NaN,
  /** Semi-major axis over stellar radius at the orbit of Earth's insolation. */
  scaledAxis: Number.NaN,
  probability: Number.NaN,
  duration: Number.NaN,
  depth: Number.NaN,
  /** Relative error of R★ T^(−1/4), by which the smallest planet scales. */
  reachError: Number.NaN,

  teffErrors: errorVector(),
  radiusErrors: errorVector(),
  luminosityErrors: errorVector(),
  massErrors: errorVector(),
  /** For the quantity at hand. */
  work: errorVector(),
  axisErrors: errorVector(),
  periodErrors: errorVector(),

  /** Factors on probability and duration by the recipe's eccentricity; 1 for circular orbits. */
  probabilityFactor: 1,
  durationFactor: 1,

  /** Standard normal deviates by which a draw moves what is not given; all zero but in draws. */
  deviates: {
    temperature: 0,
    gravity: 0,
    iron: 0,
    radius: 0,
    mass: 0,
    light: 0,
  },
});

export type Scratch = ReturnType<typeof newScratch>;

/** Deviates of a block of draws. */
export type DeviateColumns = Readonly<Record<keyof Scratch["deviates"], Float64Array>>;

export const deviateColumns = (length: number): DeviateColumns => ({
  temperature: new Float64Array(length),
  gravity: new Float64Array(length),
  iron: new Float64Array(length),
  radius: new Float64Array(length),
  mass: new Float64Array(length),
  light: new Float64Array(length),
});

/** Sets the deviates of the row at which the scratch stands. */
export const takeDeviates = (star: Scratch, columns: DeviateColumns): void => {
  const { deviates, row } = star;
  deviates.temperature = columns.temperature[row] ?? 0;
  deviates.gravity = columns.gravity[row] ?? 0;
  deviates.iron = columns.iron[row] ?? 0;
  deviates.radius = columns.radius[row] ?? 0;
  deviates.mass = columns.mass[row] ?? 0;
  deviates.light = columns.light[row] ?? 0;
};
