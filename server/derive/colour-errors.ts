import type { ExtinctionBand } from "#shared/science/extinction.ts";
import { dimmingSlope } from "./brightness.ts";
import { type ErrorVector, SOURCE } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";

/** A band whose magnitude can be half of a colour. */
export type Band = ExtinctionBand | "v";

/** The bluer band first. */
export type Colour = readonly [Band, Band];

export const BP_RP_BANDS: Colour = ["bp", "rp"];

/** Made once: names put together in the loop would cost more than the rest of it. */
const ERROR_KEYS = {
  g: "gError",
  bp: "bpError",
  rp: "rpError",
  v: "vError",
  j: "jError",
  h: "hError",
  ks: "ksError",
} as const satisfies Record<Band, keyof Scratch>;

const add = (target: ErrorVector, source: number, share: number): void => {
  target[source] = (target[source] as number) + share;
};

/**
 * Adds to `target` what a quantity owes to a colour without reddening, by each of its two magnitudes and the excess.
 *
 * @param slope relative change of the quantity per magnitude of the colour
 */
export const addColour = (
  target: ErrorVector,
  slope: number,
  star: Scratch,
  [first, second]: Colour,
): void => {
  add(target, SOURCE[first], slope * star[ERROR_KEYS[first]]);
  add(target, SOURCE[second], -slope * star[ERROR_KEYS[second]]);
  const perExcess = dimmingSlope(star, first) - dimmingSlope(star, second);
  add(target, SOURCE.extinction, -slope * perExcess * star.ebvError);
  add(target, SOURCE.parallax, slope * perExcess * star.ebvDistanceError);
};
