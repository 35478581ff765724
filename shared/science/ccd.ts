/**
 * Signal-to-noise ratio of an aperture on a detector.
 *
 * Howell 2006, Handbook of CCD Astronomy, 2nd ed., 4.4; Merline & Howell 1995, Exp. Astron. 6, 163.
 */

/** Error of rounding to whole counts, counts rms: 1/√12 = 0.2887, customarily 0.289. */
export const ROUNDING_COUNTS = 0.289;

/** Variance that the aperture's n pixels add per electron² of one pixel: `n (1 + n/n_B)`; n for a sky known perfectly. */
export const pixelWeight = (pixels: number, skyPixels: number): number => pixels * (1 + pixels / skyPixels);

/**
 * Signal-to-noise ratio: `√c N★ / √(N★ + n (1 + n/n_B)(N_S + N_D + N_R² + G² s_f²))`.
 *
 * @param star N★, electrons from the star in one frame
 * @param pixels n, pixels of the aperture
 * @param skyPixels n_B, pixels in which the sky is measured; infinity for a sky known perfectly
 * @param sky N_S, electrons per pixel and frame
 * @param dark N_D, electrons per pixel and frame
 * @param readNoise N_R, electrons rms per pixel and reading
 * @param digitisation G s_f, electrons rms: gain times {@link ROUNDING_COUNTS}
 * @param frames c, frames added up, each read once
 * @example ccdSignalToNoise(1e5, 50, 200, 100, 1, 10) // 298.060
 */
export const ccdSignalToNoise = (
  star: number,
  pixels: number,
  skyPixels: number,
  sky: number,
  dark: number,
  readNoise: number,
  digitisation = 0,
  frames = 1,
): number =>
  (star * Math.sqrt(frames)) /
  Math.sqrt(
    star +
      pixelWeight(pixels, skyPixels) * (sky + dark + readNoise * readNoise + digitisation * digitisation),
  );

/**
 * Photon noise of that many electrons, ppm, `10⁶ / √N`: the limit of {@link ccdSignalToNoise} for a star so bright that
 * nothing else counts.
 */
export const photonNoisePpm = (electrons: number): number => 1e6 / Math.sqrt(electrons);
