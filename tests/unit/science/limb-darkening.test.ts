import { describe, expect, test } from "vitest";
import { transitLossPpm } from "#shared/science/light-curve.ts";
import { limbDarkening, relativeBrightness } from "#shared/science/limb-darkening.ts";
import { transitDuration } from "#shared/science/transit.ts";

const coefficients = (teff: number) => {
  const found = limbDarkening(teff);
  if (!found) throw new Error(`No coefficients at ${teff} K.`);
  return found;
};

describe("limb darkening in a broad red band", () => {
  /** Claret 2018, A&A 618, A20, table 5, log g 4.5, and the boost of depth computed from it at b = 0 and 0.5. */
  test.each([
    [2300, 0.5076, 0.3676, 1.2995, 1.2025],
    [3000, 0.1719, 0.4977, 1.1631, 1.126],
    [3400, 0.1862, 0.4287, 1.1541, 1.1164],
    [4300, 0.4844, 0.1877, 1.2388, 1.1542],
    [5800, 0.3508, 0.2223, 1.182, 1.1217],
    [7200, 0.2765, 0.2297, 1.15, 1.1027],
  ])("%d K", (teff, u1, u2, centre, half) => {
    const pair = coefficients(teff);
    expect(pair.u1).toBeCloseTo(u1, 6);
    expect(pair.u2).toBeCloseTo(u2, 6);
    expect(relativeBrightness(pair, 0)).toBeCloseTo(centre, 4);
    expect(relativeBrightness(pair, 0.5)).toBeCloseTo(half, 4);
  });

  test("is linear between the rows, and ends with the table", () => {
    expect(coefficients(5900).u1).toBeCloseTo((0.3508 + 0.3362) / 2, 6);
    for (const teff of [2299, 7201, Number.NaN]) expect(limbDarkening(teff)).toBeNull();
  });
});

describe("light curve", () => {
  const sun = { u1: 0.3508, u2: 0.2223 };
  const loss = (hours: number, k = 0.01, b = 0) => transitLossPpm(hours, 240, 20, k, b, sun);

  test("k = 0.01 before a Sun loses 118.2 ppm at the middle (exact 118.200)", () => {
    expect(loss(0)).toBeCloseTo(118.201, 3);
  });

  /** Brute-force two-dimensional integration for k = 0.1. */
  test.each([
    [0, 11809.7],
    [0.5, 11198.7],
    [0.7, 10383.9],
  ])("k = 0.1 at b = %d loses %d ppm within 0.5 %%", (b, exact) => {
    expect(Math.abs(loss(0, 0.1, b) / exact - 1)).toBeLessThan(0.005);
  });

  test("begins and ends with the transit, is even, and deepest at the middle", () => {
    const half = transitDuration(240, 20, 0.1, 0.3) / 2;
    expect(loss(half * 1.001, 0.1, 0.3)).toBe(0);
    expect(loss(half * 0.99, 0.1, 0.3)).toBeGreaterThan(0);
    expect(loss(-1, 0.1, 0.3)).toBeCloseTo(loss(1, 0.1, 0.3), 9);
    for (const hours of [0.3, 0.7, 1.1, 1.5])
      expect(loss(hours, 0.1, 0.3)).toBeLessThan(loss(hours - 0.3, 0.1, 0.3));
  });

  test("no light is lost while the planet passes behind the star", () => {
    expect(loss(120, 0.1)).toBe(0);
  });
});
