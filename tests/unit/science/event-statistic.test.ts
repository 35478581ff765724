import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  falseAlarms,
  multipleEventStatistic,
  noiseOnTimescale,
  thresholdForTests,
} from "#shared/science/event-statistic.ts";
import { noiseFromCurve } from "#shared/science/noise-curve.ts";

describe("multiple-event statistic", () => {
  test("an Earth before the Sun, 20 ppm in 6.5 hours, 4 transits: 14.0905 ppm in 13.09548 h, 11.930 (computed)", () => {
    const noise = noiseOnTimescale(20, 6.5, 13.09548);
    expect(noise).toBeCloseTo(14.0905, 3);
    expect(multipleEventStatistic(84.0502, noise, 4)).toBeCloseTo(11.93, 3);
  });

  /** Computed: depth and noise of an hour, ppm; hours; transits. */
  test.each([
    [500, 120, 2.5, 20, 29.4628],
    [1000, 1000, 1, 50, 7.0711],
  ])("%d ppm, %d ppm an hour, %d h, %d transits: %d", (depth, noise, hours, transits, statistic) => {
    expect(multipleEventStatistic(depth, noiseOnTimescale(noise, 1, hours), transits)).toBeCloseTo(
      statistic,
      4,
    );
  });

  test("it grows with the root of time and transits in white noise, more slowly in red", () => {
    expect(noiseOnTimescale(100, 1, 4)).toBe(50);
    expect(noiseOnTimescale(100, 1, 4, -0.25)).toBeGreaterThan(50);
    expect(noiseOnTimescale(100, 1, 4, 0)).toBe(100);
    expect(multipleEventStatistic(100, 50, 16)).toBe(8);
  });
});

describe("threshold", () => {
  /** Computed: tests, threshold. */
  test.each([
    [1.7e12, 7.1081],
    [1e9, 5.9978],
    [1e10, 6.3613],
    [1e12, 7.0345],
  ])("%d tests ask for %d", (tests, threshold) => {
    expect(thresholdForTests(tests)).toBeCloseTo(threshold, 4);
  });

  test("7.1 makes 1.06 false alarms in 1.7e12 tests (computed)", () => {
    expect(falseAlarms(7.1, 1.7e12)).toBeCloseTo(1.06, 2);
  });

  test("threshold and alarms invert each other; no threshold for as many alarms as tests", () => {
    const inputs = [
      fc.double({ min: 1, max: 20, noNaN: true }),
      fc.double({ min: 0.001, max: 5, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (exponent, allowed) => {
        const tests = 10 ** exponent;
        expect(falseAlarms(thresholdForTests(tests, allowed), tests) / allowed).toBeCloseTo(1, 9);
      }),
    );
    expect(thresholdForTests(1)).toBeNaN();
    expect(thresholdForTests(100, 0)).toBeNaN();
  });
});

describe("measured noise by duration", () => {
  const hours = [1.5, 2, 2.5, 3, 3.5, 4.5, 5, 6, 7.5, 9, 10.5, 12, 12.5, 15];
  const ppm = [98, 86, 78, 72, 67, 61, 58, 54, 50, 47, 45, 43.5, 43, 41];

  test("passes through its points, and is monotone between them", () => {
    for (const [i, duration] of hours.entries())
      expect(noiseFromCurve(hours, ppm, duration)).toBeCloseTo(ppm[i] ?? 0, 12);
    for (let duration = 1.5; duration < 14.9; duration += 0.05)
      expect(noiseFromCurve(hours, ppm, duration + 0.05)).toBeLessThan(noiseFromCurve(hours, ppm, duration));
  });

  test("a table with a bump keeps to its extremes", () => {
    const bump = [10, 10, 40, 10, 10];
    for (let x = 0; x <= 4; x += 0.03) {
      expect(noiseFromCurve([0, 1, 2, 3, 4], bump, x)).toBeGreaterThan(10 - 1e-9);
      expect(noiseFromCurve([0, 1, 2, 3, 4], bump, x)).toBeLessThan(40 + 1e-9);
    }
  });

  /** Computed by an independent implementation of the same method. */
  test.each([
    [1.1, 86.23821428571],
    [1.5, 71.91964285714],
    [2.7, 52.07950151057],
    [3.9, 45.10902675874],
    [5, 44.56877201945],
    [6.9, 44.05579535456],
    [8, 42.47860344337],
    [10.5, 32.60208644588],
  ])("at %d h: %d", (duration, noise) => {
    expect(noiseFromCurve([1, 2, 4, 7, 11], [90, 60, 45, 44, 30], duration)).toBeCloseTo(noise, 9);
  });

  test("two points make a line; nothing outside the table or of a single point", () => {
    expect(noiseFromCurve([1, 3], [10, 20], 2.5)).toBeCloseTo(17.5, 12);
    for (const duration of [0.99, 3.01, Number.NaN])
      expect(noiseFromCurve([1, 3], [10, 20], duration)).toBeNaN();
    expect(noiseFromCurve([1], [10], 1)).toBeNaN();
  });
});
