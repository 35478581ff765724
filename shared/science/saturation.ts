import { erf } from "./special-functions.ts";

/** Full width at half maximum of a Gaussian over its standard deviation: 2 √(2 ln 2). */
const FWHM_PER_SIGMA = 2 * Math.sqrt(2 * Math.LN2);

/** Share of a centred Gaussian image that falls on its central pixel: `erf(0.5 / (√2 s))²`, s = FWHM / 2.354820. */
export const centralPixelShare = (fwhmPx: number): number =>
  fwhmPx > 0 ? erf((0.5 * FWHM_PER_SIGMA) / (Math.SQRT2 * fwhmPx)) ** 2 : Number.NaN;

/**
 * Electrons at which a pixel saturates: the full well, or what the converter can still write (counts × gain), whichever is
 * less.
 */
export const pixelCapacity = (fullWell: number, mostCounts = Number.POSITIVE_INFINITY, gain = 1): number =>
  Math.min(fullWell, mostCounts * gain);

/**
 * Magnitude at which the central pixel fills within one exposure: the root of `N(m) f_c + background = capacity`.
 *
 * @param zeroElectrons electrons of one exposure from a star of magnitude 0
 * @param centralShare f_c, see {@link centralPixelShare}
 * @param background electrons of sky and dark current in the pixel
 * @returns NaN where the background alone fills the pixel
 */
export const fillingMagnitude = (
  zeroElectrons: number,
  centralShare: number,
  background: number,
  capacity: number,
): number =>
  capacity > background
    ? 2.5 * Math.log10((zeroElectrons * centralShare) / (capacity - background))
    : Number.NaN;
