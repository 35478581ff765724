import type { CardSettings, DetectorCard, FormulaCard } from "./cards.ts";
import { electronRate, PHOTON_BANDS } from "./passbands.ts";

/** Parts of the noise of one hour, ppm; `total` is their sum in quadrature. */
export interface NoiseParts {
  readonly photon: number;
  readonly background: number;
  readonly read: number;
  readonly dark: number;
  readonly scintillation: number;
  readonly floor: number;
  readonly total: number;
}

const HOUR_S = 3600;

/**
 * Scintillation of one exposure as a fraction: `0.09 D^(−2/3) X^1.75 exp(−h/8000 m) (2 t)^(−1/2)`, D in cm, t in s.
 *
 * @see Young 1967, AJ 72, 747; Dravins et al. 1998, PASP 110, 610. It overestimates below apertures of about 0.1 m.
 * @example 1e6 * scintillation(0.5, 1, 0, 60) // 605.35 ppm
 */
export const scintillation = (
  apertureM: number,
  airmass: number,
  altitudeM: number,
  exposureS: number,
): number =>
  (0.09 * (100 * apertureM) ** (-2 / 3) * airmass ** 1.75 * Math.exp(-altitudeM / 8000)) /
  Math.sqrt(2 * exposureS);

/**
 * Signal-to-noise ratio of one exposure: `N★ / √(N★ + n (1 + n/n_B)(N_S + N_D + N_R²))`.
 *
 * @param star electrons from the star; @param pixels n, pixels of the aperture; @param skyPixels n_B, pixels of the sky
 * @param sky N_S and @param dark N_D, electrons per pixel; @param readNoise N_R, electrons rms
 * @see Howell 2006, Handbook of CCD Astronomy, 2nd ed., 4.4; Merline & Howell 1995, Exp. Astron. 6, 163
 */
export const ccdSignalToNoise = (
  star: number,
  pixels: number,
  skyPixels: number,
  sky: number,
  dark: number,
  readNoise: number,
): number =>
  star / Math.sqrt(star + pixels * (1 + pixels / skyPixels) * (sky + dark + readNoise * readNoise));

/** Share of a centred Gaussian image that falls on its central pixel: `erf(0.5 / (√2 s))²`, s = FWHM / 2.354820. */
export const centralPixelShare = (fwhmPx: number): number =>
  erf((0.5 * 2.35482) / (Math.SQRT2 * fwhmPx)) ** 2;

/** Error function; Abramowitz & Stegun 1964, 7.1.26, absolute error below 1.5e-7. */
export const erf = (x: number): number => {
  const t = 1 / (1 + 0.3275911 * Math.abs(x));
  const tail =
    t *
    (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429)))) *
    Math.exp(-x * x);
  return x < 0 ? tail - 1 : 1 - tail;
};

const formulaNoise = (card: FormulaCard, magnitude: number): number => {
  const step = magnitude - card.referenceMagnitude;
  const photon = card.photonPpm * 10 ** (0.2 * step);
  const background = card.backgroundPpm * 10 ** (0.4 * step);
  return Math.sqrt(photon * photon + background * background + card.floorPpm * card.floorPpm);
};

/** Electrons of one exposure per pixel and from the star. */
const exposureElectrons = (card: DetectorCard, magnitude: number) => {
  const band = PHOTON_BANDS[card.photonBand];
  const { apertureM, obstruction, throughput, exposureS } = card;
  const star =
    electronRate(magnitude, band, apertureM, obstruction, throughput, card.extinction * card.airmass) *
    exposureS;
  // The sky is seen through the same air, but its brightness is measured from the ground: no extinction is taken off.
  const skyRate = electronRate(card.skyBrightness, band, apertureM, obstruction, throughput, 0);
  return { star, sky: skyRate * card.pixelScale ** 2 * exposureS, dark: card.darkRate * exposureS };
};

/** Exposures in an hour. */
const exposuresInHour = (card: DetectorCard): number => HOUR_S / (card.exposureS + card.overheadS);

const detectorParts = (card: DetectorCard, magnitude: number): NoiseParts => {
  const { star, sky, dark } = exposureElectrons(card, magnitude);
  const pixels = Math.PI * card.apertureRadiusPx ** 2;
  const weight = pixels * (1 + pixels / card.skyPixels);
  const perHour = 1e6 / (star * Math.sqrt(exposuresInHour(card)));
  const photon = Math.sqrt(star) * perHour;
  const background = Math.sqrt(weight * sky) * perHour;
  const darkPpm = Math.sqrt(weight * dark) * perHour;
  const read = Math.sqrt(weight) * card.readNoise * perHour;
  const twinkle =
    card.siteAltitudeM === null
      ? 0
      : (1e6 * scintillation(card.apertureM, card.airmass, card.siteAltitudeM, card.exposureS)) /
        Math.sqrt(exposuresInHour(card));
  const floor = card.floorPpm;
  const total = Math.sqrt(
    photon ** 2 + background ** 2 + read ** 2 + darkPpm ** 2 + twinkle ** 2 + floor ** 2,
  );
  return { photon, background, read, dark: darkPpm, scintillation: twinkle, floor, total };
};

const formulaParts = (card: FormulaCard, magnitude: number): NoiseParts => {
  const step = magnitude - card.referenceMagnitude;
  return {
    photon: card.photonPpm * 10 ** (0.2 * step),
    background: card.backgroundPpm * 10 ** (0.4 * step),
    read: 0,
    dark: 0,
    scintillation: 0,
    floor: card.floorPpm,
    total: formulaNoise(card, magnitude),
  };
};

/** Parts of the noise in one hour, ppm, at that magnitude; drawn also outside the limits of use. */
export const noiseParts = (card: CardSettings, magnitude: number): NoiseParts =>
  card.model === "formula" ? formulaParts(card, magnitude) : detectorParts(card, magnitude);

/**
 * Noise in one hour, ppm.
 *
 * @returns NaN for a magnitude brighter than {@link brightestUsable} or fainter than the card's faint limit: nothing is
 *   extrapolated
 */
export const noiseInOneHour = (card: CardSettings, magnitude: number): number => {
  if (!(magnitude >= brightestUsable(card) && magnitude <= card.faintLimit)) return Number.NaN;
  return card.model === "formula" ? formulaNoise(card, magnitude) : detectorParts(card, magnitude).total;
};

/**
 * Brightest magnitude a card measures: its bright limit or, for a detector, the magnitude that fills the central pixel,
 * whichever is fainter. NaN where sky and dark current alone fill the pixel: then nothing is measured.
 */
export const brightestUsable = (card: CardSettings): number =>
  card.model === "formula" ? card.brightLimit : Math.max(card.brightLimit, saturationMagnitude(card));

/**
 * Magnitude at which the central pixel fills within one exposure; brighter stars saturate.
 *
 * `rate(m) t f_c + sky = full well`, f_c from {@link centralPixelShare}.
 */
export const saturationMagnitude = (card: DetectorCard): number => {
  const zero = exposureElectrons(card, 0);
  const room = card.fullWell - zero.sky - zero.dark;
  return room > 0 ? 2.5 * Math.log10((zero.star * centralPixelShare(card.fwhmPx)) / room) : Number.NaN;
};
