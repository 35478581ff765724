import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { DetectorCard, FormulaCard } from "#shared/science/cards.ts";
import { ccdSignalToNoise } from "#shared/science/ccd.ts";
import {
  brightestUsable,
  noiseInOneHour,
  noiseInTransit,
  noiseParts,
  saturationMagnitude,
} from "#shared/science/noise.ts";
import { electronRate, PHOTON_BANDS } from "#shared/science/passbands.ts";
import { osbornScintillation, youngScintillation } from "#shared/science/scintillation.ts";

const FORMULA: FormulaCard = {
  model: "formula",
  passband: "card_mag",
  referenceMagnitude: 10,
  photonPpm: 90,
  backgroundPpm: 12,
  floorPpm: 25,
  brightLimit: 7,
  faintLimit: 14.5,
};

/** A perfect half-metre in space: photons alone. */
const IDEAL: DetectorCard = {
  model: "detector",
  passband: "v_mag",
  photonBand: "V",
  apertureM: 0.5,
  obstruction: 0,
  throughput: 0.5,
  extinction: 0,
  airmass: 1,
  siteAltitudeM: null,
  pixelScale: 1,
  apertureRadiusPx: 4,
  skyPixels: 500,
  readNoise: 0,
  darkRate: 0,
  fullWell: 1e12,
  fwhmPx: 2.5,
  skyBrightness: 40,
  exposureS: 60,
  overheadS: 0,
  floorPpm: 0,
  brightLimit: 0,
  faintLimit: 25,
};

describe("card by formula", () => {
  test.each([
    [10.2, "102.8"],
    [12.4, "294.1"],
    [9.1, "64.7"],
  ])("magnitude %d has a noise of %s ppm in one hour", (magnitude, printed) => {
    expect(noiseInOneHour(FORMULA, magnitude).toFixed(1)).toBe(printed);
    expect(noiseParts(FORMULA, magnitude).total).toBeCloseTo(noiseInOneHour(FORMULA, magnitude), 9);
  });

  test("nothing outside its limits; the plot is drawn there all the same", () => {
    for (const magnitude of [6.999, 14.501, Number.NaN]) expect(noiseInOneHour(FORMULA, magnitude)).toBeNaN();
    expect(noiseInOneHour(FORMULA, 7)).toBeGreaterThan(0);
    expect(noiseInOneHour(FORMULA, 14.5)).toBeGreaterThan(0);
    expect(noiseParts(FORMULA, 15).total).toBeGreaterThan(noiseInOneHour(FORMULA, 14.5));
  });
});

describe("photons", () => {
  test("photons alone make 440.06 ppm in 60 s and 56.81 ppm in an hour, the widths of the bands apart (computed)", () => {
    const widths = Math.sqrt((996.2 * 880) / (PHOTON_BANDS.V.photonRate * PHOTON_BANDS.V.widthAngstrom));
    expect(noiseInOneHour(IDEAL, 10) / widths).toBeCloseTo(56.81, 1);
    const oneExposure = noiseParts({ ...IDEAL, overheadS: 3540 }, 10).photon;
    expect(oneExposure / widths).toBeCloseTo(440.06, 1);
  });

  test("AB magnitudes count where the card says so", () => {
    const card = { ...IDEAL, photonBand: "Ks" } as const;
    const ratio = noiseInOneHour(card, 10) / noiseInOneHour({ ...card, magnitudeSystem: "ab" }, 10);
    expect(ratio ** 2).toBeCloseTo(253.3 / 46.6, 6);
  });
});

describe("detector", () => {
  test("the parts of a detector's noise are those of the equation", () => {
    const card: DetectorCard = { ...IDEAL, readNoise: 8, darkRate: 0.1, skyBrightness: 20, overheadS: 10 };
    const band = PHOTON_BANDS.V;
    const star = electronRate(12, band, 0.5, 0, 0.5, 0) * 60;
    const sky = electronRate(20, band, 0.5, 0, 0.5, 0) * 60;
    const ratio = ccdSignalToNoise(star, Math.PI * 16, 500, sky, 6, 8);
    expect(noiseInOneHour(card, 12)).toBeCloseTo(1e6 / ratio / Math.sqrt(3600 / 70), 6);
  });
});

describe("what a card may say besides", () => {
  const GROUND: DetectorCard = {
    ...IDEAL,
    readNoise: 8,
    darkRate: 0.1,
    skyBrightness: 20,
    overheadS: 10,
    siteAltitudeM: 2400,
    airmass: 1.5,
  };
  const of = (more: Partial<DetectorCard>) => noiseParts({ ...GROUND, ...more }, 12);
  const perHour = Math.sqrt(70 / 3600);

  test("a card that says nothing has no such noise", () => {
    const { digitisation, jitter, red } = of({});
    expect([digitisation, jitter, red]).toEqual([0, 0, 0]);
  });

  test("digitisation adds as read noise does", () => {
    const { digitisation, read } = of({ gain: 5, digitisation: 0.289 });
    expect(digitisation / read).toBeCloseTo((5 * 0.289) / 8, 10);
    expect(of({ digitisation: 2 }).digitisation / read).toBeCloseTo(2 / 8, 10);
  });

  test("scintillation by the law of the card; none in space", () => {
    expect(noiseParts(IDEAL, 10).scintillation).toBe(0);
    expect(of({}).scintillation).toBeCloseTo(1e6 * youngScintillation(0.5, 1.5, 2400, 60) * perHour, 8);
    const osborn = 1e6 * osbornScintillation(0.5, 1.5, 2400, 60) * perHour;
    expect(of({ scintillationLaw: "osborn" }).scintillation).toBeCloseTo(osborn, 8);
    const site = of({ scintillationLaw: "osborn", scintillationCoefficient: 1.3 }).scintillation;
    expect(site / osborn).toBeCloseTo(1.3 / 1.5, 10);
  });

  test("comparison stars raise photon noise and scintillation alone", () => {
    const [alone, compared] = [of({}), of({ comparisonStars: 2 })];
    expect(compared.photon / alone.photon).toBeCloseTo(Math.sqrt(1.5), 10);
    expect(compared.scintillation / alone.scintillation).toBeCloseTo(Math.sqrt(1.5), 10);
    expect(compared.background).toBe(alone.background);
    expect(compared.read).toBe(alone.read);
  });

  test("jitter averages down over exposures, red noise over transits only", () => {
    expect(of({ jitterPpm: 200 }).jitter).toBeCloseTo(200 * perHour, 10);
    expect(of({ redNoisePpm: 200 }).red).toBe(200);
    const white = noiseInOneHour(GROUND, 12);
    expect(noiseInTransit(GROUND, 12, 4)).toBeCloseTo(white / 2, 10);
    expect(noiseInTransit({ ...GROUND, redNoisePpm: 200 }, 12, 4)).toBeCloseTo(Math.hypot(white / 2, 200), 8);
    expect(noiseInTransit(FORMULA, 12.4, 4)).toBeCloseTo(noiseInOneHour(FORMULA, 12.4) / 2, 10);
    expect(noiseInTransit(FORMULA, 15, 4)).toBeNaN();
  });

  test("a converter that ends early saturates a fainter star", () => {
    const card = { ...GROUND, fullWell: 1e5 };
    const early = saturationMagnitude({ ...card, mostCounts: 65_535, gain: 0.5 });
    expect(early).toBeGreaterThan(saturationMagnitude(card));
    expect(saturationMagnitude({ ...card, mostCounts: 65_535, gain: 2 })).toBe(saturationMagnitude(card));
  });
});

describe("saturation", () => {
  test("a star that fills its pixel has no noise, even inside the bright limit of the card", () => {
    const card = { ...IDEAL, fullWell: 1e5, exposureS: 10 };
    const limit = saturationMagnitude(card);
    expect(limit).toBeGreaterThan(card.brightLimit);
    expect(noiseInOneHour(card, limit - 0.01)).toBeNaN();
    expect(noiseInOneHour(card, limit + 0.01)).toBeGreaterThan(0);
  });

  test("a sky that fills the pixel by itself leaves nothing to measure", () => {
    const card = { ...IDEAL, fullWell: 10, skyBrightness: 10 };
    expect(brightestUsable(card)).toBeNaN();
    expect(noiseInOneHour(card, 15)).toBeNaN();
  });
});

test("a fainter star is never less noisy, and no part exceeds the whole", () => {
  const ground = {
    ...IDEAL,
    siteAltitudeM: 2000,
    readNoise: 9,
    darkRate: 1,
    skyBrightness: 21,
    floorPpm: 40,
    gain: 2,
    digitisation: 0.289,
    comparisonStars: 3,
    jitterPpm: 100,
    redNoisePpm: 60,
  };
  const magnitude = fc.double({ min: 7, max: 14, noNaN: true });
  fc.assert(
    fc.property(fc.constantFrom(FORMULA, ground), magnitude, (card, m) => {
      expect(noiseInOneHour(card, m + 0.1)).toBeGreaterThanOrEqual(noiseInOneHour(card, m));
      const { total, ...parts } = noiseParts(card, m);
      expect(Math.max(...Object.values(parts))).toBeLessThanOrEqual(total);
      expect(Math.sqrt(Object.values(parts).reduce((sum, part) => sum + part ** 2, 0))).toBeCloseTo(total, 6);
    }),
  );
});
