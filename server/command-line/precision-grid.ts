import type { BlankKey } from "#shared/catalogue/blank-reasons.ts";
import type { DetectorCard } from "#shared/science/cards.ts";
import { photonNoisePpm } from "#shared/science/ccd.ts";
import { brightestUsable, noiseParts } from "#shared/science/noise.ts";
import { electronRate } from "#shared/science/passbands.ts";
import { BESSELL_1998, photonBandOf } from "#shared/science/photometric-systems.ts";

/** Noise in ppm; NaN where there is none, for the reason beside it. */
export interface Precision {
  readonly ppm: number;
  readonly blank: BlankKey | null;
}

/** Noise of a star with an aperture of that diameter (m) over that time (s). */
export type PrecisionOf = (diameterM: number, timeS: number) => Precision;

const HOUR_S = 3600;

/** An unobstructed telescope in V: half of the photons of a band 880 Å wide are counted. */
export const PHOTONS_ALONE = { widthAngstrom: 880, throughput: 0.5 } as const;

const V = photonBandOf("V", BESSELL_1998.V, PHOTONS_ALONE.widthAngstrom);

/** Photons alone, in V. */
export const photonPrecision =
  (magnitude: number): PrecisionOf =>
  (diameterM, timeS) => ({
    ppm: photonNoisePpm(electronRate(magnitude, V, diameterM, 0, PHOTONS_ALONE.throughput, 0) * timeS),
    blank: null,
  });

/** The card with another aperture; a time below that of its exposures is one shorter exposure in an hour. */
const cardFor = (card: DetectorCard, apertureM: number, timeS: number): DetectorCard => {
  if (timeS >= card.exposureS + card.overheadS) return { ...card, apertureM };
  const exposureS = Math.min(card.exposureS, timeS);
  return { ...card, apertureM, exposureS, overheadS: HOUR_S - exposureS };
};

/**
 * Everything that a detector card counts, with another aperture: white noise goes with the root of the time; the floor and
 * the red noise stay as they are below an hour, and above it the floor averages down as it does in a transit.
 *
 * @param isPhotonsOnly the star's photons alone, through the card's optics, filter and air
 * @returns blank for a magnitude outside the card's limits, or that fills a pixel in one exposure
 */
export const detectorPrecision =
  (card: DetectorCard, magnitude: number, isPhotonsOnly: boolean): PrecisionOf =>
  (diameterM, timeS) => {
    const changed = cardFor(card, diameterM, timeS);
    if (!(magnitude >= brightestUsable(changed))) return { ppm: Number.NaN, blank: "too-bright" };
    if (magnitude > card.faintLimit) return { ppm: Number.NaN, blank: "too-faint" };
    const { photon, red, floor, total } = noiseParts(changed, magnitude);
    const isOneExposure = changed.exposureS + changed.overheadS !== card.exposureS + card.overheadS;
    const hours = isOneExposure ? 1 : timeS / HOUR_S;
    if (isPhotonsOnly) return { ppm: photon / Math.sqrt(hours), blank: null };
    const white = total ** 2 - red ** 2 - floor ** 2;
    const steady = red ** 2 + floor ** 2 / Math.max(1, hours);
    return { ppm: Math.sqrt(white / hours + steady), blank: null };
  };
