import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { DetectorCard, FormulaCard } from "#shared/science/cards.ts";
import {
  brightestUsable,
  ccdSignalToNoise,
  centralPixelShare,
  erf,
  noiseInOneHour,
  noiseParts,
  saturationMagnitude,
  scintillation,
} from "#shared/science/noise.ts";
import { electronRate, PHOTON_BANDS } from "#shared/science/passbands.ts";

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
  test("V = 10, 0.5 m, throughput 0.5: 86065.4 electrons per second with 996.2 photons and 880 Å at V = 0", () => {
    const band = { label: "V", photonRate: 996.2, widthAngstrom: 880 };
    expect(electronRate(10, band, 0.5, 0, 0.5, 0)).toBeCloseTo(86065.4, 0);
    expect(electronRate(10, band, 1, 0, 0.5, 0)).toBeCloseTo(344262, -1);
    expect(electronRate(10, band, 0.5, 0.3, 0.5, 0)).toBeCloseTo(86065.4 * 0.91, 0);
    expect(electronRate(10, band, 0.5, 0, 0.5, 0.2)).toBeCloseTo(86065.4 * 10 ** -0.08, 0);
  });

  test("photons alone make 440.06 ppm in 60 s and 56.81 ppm in an hour, the widths of the bands apart", () => {
    const widths = Math.sqrt((996.2 * 880) / (PHOTON_BANDS.V.photonRate * PHOTON_BANDS.V.widthAngstrom));
    expect(noiseInOneHour(IDEAL, 10) / widths).toBeCloseTo(56.81, 1);
    const oneExposure = noiseParts({ ...IDEAL, overheadS: 3540 }, 10).photon;
    expect(oneExposure / widths).toBeCloseTo(440.06, 1);
  });

  test("in-band rates at magnitude 0 agree with photon rate times width (computed from transmission curves)", () => {
    const inBand = (key: keyof typeof PHOTON_BANDS) =>
      PHOTON_BANDS[key].photonRate * PHOTON_BANDS[key].widthAngstrom;
    const expected = {
      B: 1.41e6,
      V: 8.396e5,
      R: 9.433e5,
      I: 5.726e5,
      J: 3.112e5,
      H: 2.318e5,
      Ks: 1.195e5,
      G: 3.558e6,
      BP: 2.744e6,
      RP: 1.392e6,
    } as const;
    for (const [key, rate] of Object.entries(expected))
      expect(Math.abs(inBand(key as keyof typeof expected) / rate - 1)).toBeLessThan(0.03);
  });
});

describe("CCD equation", () => {
  test("Howell's worked example: 300 s, 24013 counts, a signal-to-noise ratio of 342", () => {
    const gain = 5;
    const dark = (22 * 300) / 3600;
    const read = Math.hypot(5, gain * 0.289);
    const ratio = ccdSignalToNoise(24013 * gain, 1, Number.POSITIVE_INFINITY, 620 * gain, dark, read);
    expect(ratio.toFixed(0)).toBe("342");
  });

  test("a sky measured in few pixels costs its share", () => {
    expect(ccdSignalToNoise(1e5, 50, Number.POSITIVE_INFINITY, 100, 1, 10)).toBeCloseTo(301.443, 3);
    expect(ccdSignalToNoise(1e5, 50, 200, 100, 1, 10)).toBeCloseTo(298.06, 3);
    expect(ccdSignalToNoise(1e6, 100, 500, 50, 0.5, 8)).toBeCloseTo(993.2, 3);
  });

  test("the parts of a detector's noise are those of the equation", () => {
    const card: DetectorCard = { ...IDEAL, readNoise: 8, darkRate: 0.1, skyBrightness: 20, overheadS: 10 };
    const band = PHOTON_BANDS.V;
    const star = electronRate(12, band, 0.5, 0, 0.5, 0) * 60;
    const sky = electronRate(20, band, 0.5, 0, 0.5, 0) * 60;
    const ratio = ccdSignalToNoise(star, Math.PI * 16, 500, sky, 6, 8);
    expect(noiseInOneHour(card, 12)).toBeCloseTo(1e6 / ratio / Math.sqrt(3600 / 70), 6);
  });
});

describe("scintillation", () => {
  /** Young 1967 and Dravins et al. 1998, 60 s, computed: aperture, at the zenith at sea level, X = 1.5 at 2400 m. */
  test.each([
    [0.1, 1770.05, 2665.98],
    [0.2, 1115.06, 1679.46],
    [0.5, 605.35, 911.75],
    [1, 381.35, 574.37],
    [2, 240.23, 361.83],
    [4, 151.34, 227.94],
  ])("%d m", (aperture, zenith, site) => {
    expect(1e6 * scintillation(aperture, 1, 0, 60)).toBeCloseTo(zenith, 2);
    expect(1e6 * scintillation(aperture, 1.5, 2400, 60)).toBeCloseTo(site, 2);
  });

  test("none in space, and there is some on the ground", () => {
    expect(noiseParts(IDEAL, 10).scintillation).toBe(0);
    const ground = noiseParts({ ...IDEAL, siteAltitudeM: 2400, airmass: 1.5, overheadS: 3540 }, 10);
    expect(ground.scintillation).toBeCloseTo(911.75, 2);
  });
});

describe("saturation", () => {
  test.each([
    [1.5, 0.32207],
    [2, 0.19708],
    [2.5, 0.13129],
    [3, 0.0932],
    [4, 0.0536],
  ])("an image %d pixels wide puts %d on its central pixel", (fwhm, share) => {
    expect(centralPixelShare(fwhm)).toBeCloseTo(share, 5);
  });

  /** Computed for V, 880 Å, throughput 0.5, full well 1e5 electrons: aperture, exposure, width, magnitude. */
  test.each([
    [0.2, 60, 2, 10.529],
    [0.5, 10, 2.5, 10.133],
    [1, 1, 3, 8.766],
  ])("%d m, %d s, %d px saturates at V = %d", (apertureM, exposureS, fwhmPx, magnitude) => {
    const card = { ...IDEAL, apertureM, exposureS, fwhmPx, fullWell: 1e5 };
    const widths =
      2.5 * Math.log10((PHOTON_BANDS.V.photonRate * PHOTON_BANDS.V.widthAngstrom) / (996.2 * 880));
    expect(saturationMagnitude(card) - widths).toBeCloseTo(magnitude, 2);
  });

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

test("the error function is that of the tables", () => {
  expect(erf(0.5)).toBeCloseTo(0.5204998778, 6);
  expect(erf(-1)).toBeCloseTo(-0.8427007929, 6);
  expect(erf(3)).toBeCloseTo(0.9999779095, 6);
});

test("a fainter star is never less noisy, and no part exceeds the whole", () => {
  const ground = {
    ...IDEAL,
    siteAltitudeM: 2000,
    readNoise: 9,
    darkRate: 1,
    skyBrightness: 21,
    floorPpm: 40,
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
