import type { CardSettings, DetectorCard, FormulaCard } from "./cards.ts";
import { photonNoisePpm, pixelWeight } from "./ccd.ts";
import { electronRate, PHOTON_BANDS } from "./passbands.ts";
import { noiseOverHours } from "./red-noise.ts";
import { centralPixelShare, fillingMagnitude, pixelCapacity } from "./saturation.ts";
import { comparisonFactor, osbornScintillation, youngScintillation } from "./scintillation.ts";

/** Parts of the noise of one hour, ppm; `total` is their sum in quadrature. */
export interface NoiseParts {
  readonly photon: number;
  readonly background: number;
  readonly read: number;
  readonly digitisation: number;
  readonly dark: number;
  readonly scintillation: number;
  readonly jitter: number;
  readonly red: number;
  readonly floor: number;
  readonly total: number;
}

const HOUR_S = 3600;

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
  const rate = (mag: number, extinction: number): number =>
    electronRate(mag, band, apertureM, obstruction, throughput, extinction, card.magnitudeSystem);
  const star = rate(magnitude, card.extinction * card.airmass) * exposureS;
  // The sky is seen through the same air, but its brightness is measured from the ground: no extinction is taken off.
  const skyRate = rate(card.skyBrightness, 0);
  return { star, sky: skyRate * card.pixelScale ** 2 * exposureS, dark: card.darkRate * exposureS };
};

/** Exposures in an hour. */
const exposuresInHour = (card: DetectorCard): number => HOUR_S / (card.exposureS + card.overheadS);

/** Scintillation of one exposure as a fraction; none in space. */
const scintillationOf = (card: DetectorCard): number => {
  const { apertureM, airmass, siteAltitudeM, exposureS } = card;
  if (siteAltitudeM === null) return 0;
  return card.scintillationLaw === "osborn"
    ? osbornScintillation(apertureM, airmass, siteAltitudeM, exposureS, card.scintillationCoefficient)
    : youngScintillation(apertureM, airmass, siteAltitudeM, exposureS);
};

const detectorParts = (card: DetectorCard, magnitude: number): NoiseParts => {
  const { star, sky, dark } = exposureElectrons(card, magnitude);
  const weight = pixelWeight(Math.PI * card.apertureRadiusPx ** 2, card.skyPixels);
  const averaged = 1 / Math.sqrt(exposuresInHour(card));
  // One electron of noise in an exposure, as ppm of the star in an hour.
  const perHour = (1e6 / star) * averaged;
  const compared = card.comparisonStars === undefined ? 1 : comparisonFactor(card.comparisonStars);
  const photon = photonNoisePpm(star) * averaged * compared;
  const background = Math.sqrt(weight * sky) * perHour;
  const darkPpm = Math.sqrt(weight * dark) * perHour;
  const read = Math.sqrt(weight) * card.readNoise * perHour;
  const digitisation = Math.sqrt(weight) * (card.gain ?? 1) * (card.digitisation ?? 0) * perHour;
  const twinkle = 1e6 * scintillationOf(card) * averaged * compared;
  const jitter = (card.jitterPpm ?? 0) * averaged;
  const red = card.redNoisePpm ?? 0;
  const floor = card.floorPpm;
  const total = Math.sqrt(
    photon ** 2 +
      background ** 2 +
      read ** 2 +
      digitisation ** 2 +
      darkPpm ** 2 +
      twinkle ** 2 +
      jitter ** 2 +
      red ** 2 +
      floor ** 2,
  );
  return {
    photon,
    background,
    read,
    digitisation,
    dark: darkPpm,
    scintillation: twinkle,
    jitter,
    red,
    floor,
    total,
  };
};

const formulaParts = (card: FormulaCard, magnitude: number): NoiseParts => {
  const step = magnitude - card.referenceMagnitude;
  return {
    photon: card.photonPpm * 10 ** (0.2 * step),
    background: card.backgroundPpm * 10 ** (0.4 * step),
    read: 0,
    digitisation: 0,
    dark: 0,
    scintillation: 0,
    jitter: 0,
    red: 0,
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

/** Red noise of a card, ppm; a curve has none of its own. */
export const redNoiseOf = (card: CardSettings): number =>
  card.model === "detector" ? (card.redNoisePpm ?? 0) : 0;

/**
 * Noise over a transit of that many hours, ppm: white noise averages down with their root, red noise does not.
 *
 * @returns NaN where {@link noiseInOneHour} is
 */
export const noiseInTransit = (card: CardSettings, magnitude: number, hours: number): number =>
  noiseOverHours(noiseInOneHour(card, magnitude), redNoiseOf(card), hours);

/**
 * Noise of an hour, ppm, that would average down with the root of time to what the noise is over the whole signal: a long
 * transit has more red noise than an hour shows.
 *
 * @param noise1h ppm, the red part included
 * @param hours time that carries the signal
 */
export const hourlyNoiseOfSignal = (card: CardSettings, noise1h: number, hours: number): number => {
  const red = redNoiseOf(card);
  return red === 0 ? noise1h : noiseOverHours(noise1h, red, hours) * Math.sqrt(hours);
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
 * `rate(m) t f_c + sky = min(full well, most counts × gain)`, f_c from {@link centralPixelShare}.
 */
export const saturationMagnitude = (card: DetectorCard): number => {
  const zero = exposureElectrons(card, 0);
  const capacity = pixelCapacity(card.fullWell, card.mostCounts, card.gain);
  return fillingMagnitude(zero.star, centralPixelShare(card.fwhmPx), zero.sky + zero.dark, capacity);
};
