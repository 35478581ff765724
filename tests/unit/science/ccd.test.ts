import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { ccdSignalToNoise, photonNoisePpm, ROUNDING_COUNTS } from "#shared/science/ccd.ts";

const PERFECT_SKY = Number.POSITIVE_INFINITY;

describe("CCD equation", () => {
  /** Howell 2006, Handbook of CCD Astronomy, 2nd ed., 4.4, from memory: 342; computed 342.075. */
  test("Howell's worked example: 300 s, 24013 counts, a signal-to-noise ratio of 342", () => {
    const gain = 5;
    const dark = (22 * 300) / 3600;
    const ratio = ccdSignalToNoise(24013 * gain, 1, PERFECT_SKY, 620 * gain, dark, 5, gain * ROUNDING_COUNTS);
    expect(ratio.toFixed(0)).toBe("342");
    expect(ratio).toBeCloseTo(342.075, 3);
  });

  /** Computed: electrons, pixels, sky pixels, sky, dark, read noise, ratio and ppm. */
  test.each([
    [1e5, 50, PERFECT_SKY, 100, 1, 10, 301.443, 3317.38],
    [1e5, 50, 200, 100, 1, 10, 298.06, 3355.03],
    [1e6, 100, 500, 50, 0.5, 8, 993.2, 1006.847],
  ])("%d electrons in %d pixels, sky of %d", (star, pixels, skyPixels, sky, dark, read, ratio, ppm) => {
    const value = ccdSignalToNoise(star, pixels, skyPixels, sky, dark, read);
    expect(value).toBeCloseTo(ratio, 3);
    expect(Math.abs(1e6 / value - ppm)).toBeLessThan(0.01);
  });

  test("frames add up with their root, and as if all electrons had come with as many readings", () => {
    const one = ccdSignalToNoise(1e4, 20, 300, 30, 2, 6, 1.4);
    expect(ccdSignalToNoise(1e4, 20, 300, 30, 2, 6, 1.4, 9)).toBeCloseTo(3 * one, 9);
    const nine = ccdSignalToNoise(9e4, 20, 300, 270, 18, 3 * 6, 3 * 1.4);
    expect(nine).toBeCloseTo(3 * one, 9);
    // One long exposure is read once.
    expect(ccdSignalToNoise(9e4, 20, 300, 270, 18, 6, 1.4)).toBeGreaterThan(nine);
  });

  test("the brighter the star, the nearer to its photons alone; never better", () => {
    const other = [60, 400, 80, 5, 9, 1.4] as const;
    const excess = (star: number): number =>
      1e6 / ccdSignalToNoise(star, ...other) / photonNoisePpm(star) - 1;
    fc.assert(
      fc.property(fc.double({ min: 2, max: 9, noNaN: true }), (exponent) => {
        const star = 10 ** exponent;
        expect(excess(star)).toBeGreaterThan(0);
        expect(excess(10 * star)).toBeLessThan(excess(star));
      }),
    );
    expect(excess(1e9)).toBeLessThan(1e-5);
  });
});
