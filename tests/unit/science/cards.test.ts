import { describe, expect, test } from "vitest";
import { cardSettings } from "#shared/api/instruments.ts";
import type { DetectorCard } from "#shared/science/cards.ts";
import { noiseInOneHour } from "#shared/science/noise.ts";

const PLAIN = {
  model: "detector",
  passband: "v_mag",
  photonBand: "V",
  apertureM: 0.5,
  obstruction: 0.3,
  throughput: 0.4,
  extinction: 0.2,
  airmass: 1.3,
  siteAltitudeM: 1500,
  pixelScale: 1,
  apertureRadiusPx: 4,
  skyPixels: 500,
  readNoise: 8,
  darkRate: 0.1,
  fullWell: 1e5,
  fwhmPx: 2.5,
  skyBrightness: 20.5,
  exposureS: 30,
  overheadS: 5,
  floorPpm: 100,
  brightLimit: 8,
  faintLimit: 16,
} as const satisfies DetectorCard;

const MORE = {
  magnitudeSystem: "ab",
  gain: 1.4,
  digitisation: 0.289,
  mostCounts: 65_535,
  scintillationLaw: "osborn",
  scintillationCoefficient: 1.3,
  comparisonStars: 5,
  jitterPpm: 150,
  redNoisePpm: 80,
} as const satisfies Partial<DetectorCard>;

describe("detector card", () => {
  test("may leave out what it does not know, and nothing is filled in for it", () => {
    expect(cardSettings.parse(PLAIN)).toEqual(PLAIN);
    expect(noiseInOneHour(PLAIN, 12)).toBeGreaterThan(0);
  });

  test("may say more, and is noisier for it", () => {
    const card = cardSettings.parse({ ...PLAIN, ...MORE });
    expect(card).toEqual({ ...PLAIN, ...MORE });
    expect(noiseInOneHour(card, 12)).toBeGreaterThan(noiseInOneHour(PLAIN, 12));
  });

  test.each([
    { gain: 0 },
    { digitisation: -1 },
    { mostCounts: 0 },
    { scintillationLaw: "other" },
    { scintillationCoefficient: 0 },
    { comparisonStars: 0 },
    { jitterPpm: -1 },
    { redNoisePpm: -1 },
    { magnitudeSystem: "other" },
    { photonBand: "none" },
  ])("is refused with %o", (wrong) => {
    expect(cardSettings.safeParse({ ...PLAIN, ...wrong }).success).toBe(false);
  });
});
