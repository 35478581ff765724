import type { CampaignSettings, DetectorCard, FormulaCard } from "#shared/science/cards.ts";

/** The invented card and campaign of the practice stars. */
export const PRACTICE_CARD: FormulaCard = {
  model: "formula",
  passband: "card_mag",
  referenceMagnitude: 10,
  photonPpm: 90,
  backgroundPpm: 12,
  floorPpm: 25,
  brightLimit: 7,
  faintLimit: 14.5,
};

export const PRACTICE_CAMPAIGN: CampaignSettings = {
  lengthDays: 180,
  duty: 0.9,
  leastTransits: 1,
  snrLimit: 7.1,
  statistic: "boxcar",
};

export type Given = Record<string, number>;

export const PRACTICE_STARS = {
  A: { ks_mag: 7.912, ks_mag_err: 0.02, parallax: 60, parallax_err: 0.05, teff_given: 3350, card_mag: 10.2 },
  B: {
    ks_mag: 9.431,
    ks_mag_err: 0.02,
    parallax: 81.3,
    parallax_err: 0.05,
    teff_given: 2950,
    card_mag: 12.4,
  },
  C: { ks_mag: 6.85, ks_mag_err: 0.02, parallax: 38.5, parallax_err: 0.05, teff_given: 3650, card_mag: 9.1 },
} as const satisfies Record<string, Given>;

/** A small telescope on a mountain that sees star A. */
export const DETECTOR: DetectorCard = {
  model: "detector",
  passband: "card_mag",
  photonBand: "I",
  apertureM: 0.6,
  obstruction: 0.4,
  throughput: 0.5,
  extinction: 0.06,
  airmass: 1.3,
  siteAltitudeM: 2400,
  pixelScale: 0.6,
  apertureRadiusPx: 8,
  skyPixels: 600,
  readNoise: 8,
  darkRate: 0.2,
  fullWell: 1e5,
  fwhmPx: 4,
  skyBrightness: 19.5,
  exposureS: 10,
  overheadS: 5,
  floorPpm: 200,
  brightLimit: 6,
  faintLimit: 17,
};
