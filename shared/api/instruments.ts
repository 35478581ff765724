import { z } from "zod";
import { PHOTON_BANDS, type PhotonBandKey } from "../science/passbands.ts";
import { id, name, note, personRef, timestamp } from "./common.ts";

/** Catalogue columns that can hold a star's magnitude in an instrument's passband. */
export const PASSBAND_COLUMNS = [
  "card_mag",
  "g_mag",
  "bp_mag",
  "rp_mag",
  "v_mag",
  "j_mag",
  "h_mag",
  "ks_mag",
] as const;

const magnitude = z
  .number()
  .min(-5, "A magnitude here lies between −5 and 40.")
  .max(40, "A magnitude here lies between −5 and 40.");
const ppm = z.number().min(0, "Noise is zero or more.").max(1e6);
const positive = (most: number, what: string) => z.number().positive(`${what} is above zero.`).max(most);
const limits = { brightLimit: magnitude, faintLimit: magnitude };

const formulaSettings = z.strictObject({
  model: z.literal("formula"),
  passband: z.enum(PASSBAND_COLUMNS),
  referenceMagnitude: magnitude,
  photonPpm: ppm,
  backgroundPpm: ppm,
  floorPpm: ppm,
  ...limits,
});

const detectorSettings = z.strictObject({
  model: z.literal("detector"),
  passband: z.enum(PASSBAND_COLUMNS),
  photonBand: z.enum(Object.keys(PHOTON_BANDS) as [PhotonBandKey, ...PhotonBandKey[]]),
  apertureM: positive(100, "The aperture"),
  obstruction: z.number().min(0).max(0.9, "The obstruction is a ratio of diameters, 0 to 0.9."),
  throughput: z.number().positive("The throughput is above zero.").max(1, "The throughput is at most 1."),
  extinction: z.number().min(0).max(5),
  airmass: z.number().min(1, "The airmass is 1 or more.").max(10),
  siteAltitudeM: z.number().min(-500).max(10_000).nullable(),
  pixelScale: positive(3600, "The pixel scale"),
  apertureRadiusPx: positive(1000, "The aperture radius"),
  skyPixels: positive(1e6, "The number of sky pixels"),
  readNoise: z.number().min(0).max(10_000),
  darkRate: z.number().min(0).max(1e6),
  fullWell: positive(1e8, "The full well"),
  fwhmPx: positive(1000, "The image size"),
  skyBrightness: magnitude,
  exposureS: positive(86_400, "The exposure"),
  overheadS: z.number().min(0).max(86_400),
  floorPpm: ppm,
  ...limits,
  magnitudeSystem: z.enum(["vega", "ab"]).optional(),
  gain: positive(10_000, "The gain").optional(),
  digitisation: z.number().min(0).max(1000).optional(),
  mostCounts: positive(1e10, "The largest number of counts").optional(),
  scintillationLaw: z.enum(["young", "osborn"]).optional(),
  scintillationCoefficient: positive(100, "The coefficient of scintillation").optional(),
  comparisonStars: positive(10_000, "The number of comparison stars").optional(),
  jitterPpm: ppm.optional(),
  redNoisePpm: ppm.optional(),
});

export const cardSettings = z
  .discriminatedUnion("model", [formulaSettings, detectorSettings])
  .refine((s) => s.brightLimit < s.faintLimit, {
    path: ["faintLimit"],
    message: "The faint limit must be a larger magnitude than the bright limit.",
  });

/** A card as one of its versions: `id` names the card through all of them, `versionId` this one. */
export const card = z.object({
  id,
  versionId: id,
  number: z.int(),
  name: z.string(),
  source: z.string(),
  /** False without a source: every number made with it is marked unverified. */
  isVerified: z.boolean(),
  settings: cardSettings,
  savedBy: personRef,
  savedAt: timestamp,
});
export type Card = z.infer<typeof card>;
/** GET …/instruments → { cards } (latest versions); GET …/instruments/:id/versions → { cards } (newest first); GET …/instruments/versions/:versionId → { card }; POST → 201 { card }. */
export const cardBody = z.strictObject({ name, source: note, settings: cardSettings });
/** PUT …/instruments/:id → { card }: a new version; `number` is the one the person saw (409 when stale). */
export const cardSaveBody = cardBody.extend({ number: z.int().positive() });

export const campaignSettings = z.strictObject({
  lengthDays: positive(36_525, "The length"),
  duty: z.number().positive("The share of time is above zero.").max(1, "The share of time is at most 1."),
  leastTransits: z.int().min(1, "At least one transit is needed.").max(1000),
  snrLimit: positive(1000, "The signal-to-noise limit"),
  statistic: z.enum(["boxcar", "trapezoid"]),
});
export const campaign = z.object({
  id,
  versionId: id,
  number: z.int(),
  name: z.string(),
  settings: campaignSettings,
  savedBy: personRef,
  savedAt: timestamp,
});
export type Campaign = z.infer<typeof campaign>;
/** GET …/campaigns → { campaigns }; GET …/campaigns/:id/versions → { campaigns } (newest first); GET …/campaigns/versions/:versionId → { campaign }; POST → 201; PUT …/campaigns/:id → { campaign }. */
export const campaignBody = z.strictObject({ name, settings: campaignSettings });
export const campaignSaveBody = campaignBody.extend({ number: z.int().positive() });
