import type { CampaignSettings, FormulaCard } from "#shared/science/cards.ts";

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
