import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { depthError, noiseOverHours, redSignalToNoise } from "#shared/science/red-noise.ts";

describe("red noise", () => {
  /** Computed: white noise of a point, red noise, points; error of the depth. */
  test.each([
    [1000, 50, 100, 111.803],
    [200, 30, 1000, 30.659],
    [3000, 3000, 50, 3029.851],
  ])("%d white, %d red, %d points: %d ppm", (white, red, points, error) => {
    expect(depthError(white, red, points)).toBeCloseTo(error, 3);
  });

  test("more points do not bring it below the red noise; more transits do", () => {
    expect(depthError(1000, 50, 1e12)).toBeCloseTo(50, 3);
    expect(depthError(1000, 50, 100, 4)).toBeCloseTo(111.803 / 2, 3);
  });

  test("equal transits are the special case of unequal ones", () => {
    const positive = fc.double({ min: 1, max: 1000, noNaN: true });
    fc.assert(
      fc.property(
        positive,
        positive,
        fc.integer({ min: 1, max: 200 }),
        fc.integer({ min: 1, max: 9 }),
        (w, r, n, m) => {
          const ratio = redSignalToNoise(500, w, r, new Array<number>(m).fill(n));
          expect((ratio * depthError(w, r, n, m)) / 500).toBeCloseTo(1, 10);
        },
      ),
    );
  });

  test("without red noise only the sum of the points counts; with it, evenly spread points are better", () => {
    expect(redSignalToNoise(500, 1000, 0, [10, 190])).toBeCloseTo(500 / depthError(1000, 0, 200), 9);
    expect(redSignalToNoise(500, 1000, 80, [100, 100])).toBeGreaterThan(
      redSignalToNoise(500, 1000, 80, [10, 190]),
    );
    expect(redSignalToNoise(500, 1000, 80, [])).toBeNaN();
  });

  test("over hours, white noise averages down with the root and red noise stays", () => {
    expect(noiseOverHours(100, 0, 4)).toBe(50);
    expect(noiseOverHours(100, 60, 1)).toBeCloseTo(100, 12);
    expect(noiseOverHours(100, 60, 4)).toBeCloseTo(Math.hypot(40, 60), 12);
    expect(noiseOverHours(100, 101, 4)).toBeNaN();
  });
});
