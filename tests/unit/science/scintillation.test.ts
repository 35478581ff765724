import { describe, expect, test } from "vitest";
import { photonNoisePpm } from "#shared/science/ccd.ts";
import { electronRate } from "#shared/science/passbands.ts";
import { BESSELL_1998, photonBandOf } from "#shared/science/photometric-systems.ts";
import {
  comparisonFactor,
  OSBORN_COEFFICIENT,
  osbornScintillation,
  youngScintillation,
} from "#shared/science/scintillation.ts";

describe("scintillation", () => {
  /**
   * Young 1967 and Dravins et al. 1998, and Osborn et al. 2015, eq. 7, in 60 s, computed: aperture; Young at the zenith at sea
   * level; Young and Osborn (C_Y = 1.5) at X = 1.5 and 2400 m.
   */
  test.each([
    [0.1, 1770.05, 2665.98, 3868.4],
    [0.2, 1115.06, 1679.46, 2436.94],
    [0.5, 605.35, 911.75, 1322.97],
    [1, 381.35, 574.37, 833.42],
    [2, 240.23, 361.83, 525.02],
    [4, 151.34, 227.94, 330.74],
  ])("%d m", (aperture, zenith, site, median) => {
    expect(1e6 * youngScintillation(aperture, 1, 0, 60)).toBeCloseTo(zenith, 2);
    expect(1e6 * youngScintillation(aperture, 1.5, 2400, 60)).toBeCloseTo(site, 2);
    expect(1e6 * osbornScintillation(aperture, 1.5, 2400, 60)).toBeCloseTo(median, 2);
  });

  test("at the zenith Osborn's law with C_Y = 1 is 1.070547 of Young's, whatever aperture and time (computed)", () => {
    for (const [d, t] of [
      [0.1, 10],
      [0.5, 60],
      [4, 600],
    ] as const)
      expect(osbornScintillation(d, 1, 0, t, 1) / youngScintillation(d, 1, 0, t)).toBeCloseTo(1.070547, 6);
    expect(osbornScintillation(1, 1, 0, 60, 3) / osbornScintillation(1, 1, 0, 60)).toBeCloseTo(
      3 / OSBORN_COEFFICIENT,
      12,
    );
  });

  test("airmass counts with 1.75 in one law, 1.5 in the other; height and time alike", () => {
    const laws = [
      [youngScintillation, 1.75],
      [osbornScintillation, 1.5],
    ] as const;
    for (const [law, exponent] of laws) {
      expect(law(1, 2, 0, 60) / law(1, 1, 0, 60)).toBeCloseTo(2 ** exponent, 12);
      expect(law(1, 1, 8000, 60) / law(1, 1, 0, 60)).toBeCloseTo(1 / Math.E, 12);
      expect(law(1, 1, 0, 240) / law(1, 1, 0, 60)).toBeCloseTo(0.5, 12);
      expect(law(8, 1, 0, 60) / law(1, 1, 0, 60)).toBeCloseTo(0.25, 12);
    }
  });

  test("at V = 10 with half a metre it is 2 to 3 times the photon noise, for any exposure (computed)", () => {
    const rate = electronRate(10, photonBandOf("V", BESSELL_1998.V, 880), 0.5, 0, 0.5, 0);
    for (const seconds of [10, 60, 600]) {
      const photons = photonNoisePpm(rate * seconds);
      expect((1e6 * youngScintillation(0.5, 1.5, 2400, seconds)) / photons).toBeCloseTo(911.75 / 440.06, 3);
      expect((1e6 * osbornScintillation(0.5, 1.5, 2400, seconds)) / photons).toBeCloseTo(1322.97 / 440.06, 3);
    }
  });
});

test("one comparison star doubles the variance, many add none, none is no comparison", () => {
  expect(comparisonFactor(1)).toBeCloseTo(Math.SQRT2, 12);
  expect(comparisonFactor(4)).toBeCloseTo(Math.sqrt(1.25), 12);
  expect(comparisonFactor(Number.POSITIVE_INFINITY)).toBe(1);
  for (const n of [0, -1, Number.NaN]) expect(comparisonFactor(n)).toBeNaN();
});
