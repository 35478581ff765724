import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { AU_PER_SOLAR_RADIUS, EARTH_RADII_PER_SOLAR, GAUSSIAN_YEAR_D } from "#shared/science/constants.ts";
import {
  centralDuration,
  depthPpm,
  fullTransitDuration,
  MEAN_CHORD,
  transitDuration,
  transitProbability,
} from "#shared/science/transit.ts";

const HOURS_PER_YEAR = 24 * GAUSSIAN_YEAR_D;
const EARTH = 1 / EARTH_RADII_PER_SOLAR;

describe("Earth before the Sun", () => {
  test("probability 0.465047 %, depth 84.0502 ppm", () => {
    expect(100 * transitProbability(AU_PER_SOLAR_RADIUS)).toBeCloseTo(0.465047, 6);
    expect(depthPpm(EARTH)).toBeCloseTo(84.0502, 4);
  });

  test("a central transit of 13.09548 h, 12.97646 h for a point, and their mean over impact parameters", () => {
    expect(transitDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS, EARTH, 0)).toBeCloseTo(13.09548, 4);
    expect(centralDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS)).toBeCloseTo(12.97646, 3);
    expect(MEAN_CHORD * centralDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS)).toBeCloseTo(10.1917, 3);
  });
});

test("a giant planet in 3.5 days", () => {
  const [a, k] = [9.701, 0.102762685];
  expect(100 * transitProbability(a)).toBeCloseTo(10.3082, 4);
  expect(transitDuration(84, a, k, 0)).toBeCloseTo(3.046034, 5);
  expect(fullTransitDuration(84, a, k, 0)).toBeCloseTo(2.476517, 5);
  expect(transitDuration(84, a, k, 0.5)).toBeCloseTo(2.717354, 5);
});

test("i = 89°, a = 20, k = 0.1, 10 days: 3.98696 h and 3.17007 h", () => {
  const b = 20 * Math.cos((89 * Math.PI) / 180);
  expect(transitDuration(240, 20, 0.1, b)).toBeCloseTo(3.98696, 4);
  expect(fullTransitDuration(240, 20, 0.1, b)).toBeCloseTo(3.17007, 4);
});

/** Gillon et al. 2017, Nature 542, 456, Table 1: period, inclination, depth, a/R★, computed and printed minutes. */
test.each([
  ["b", 1.51087081, 89.65, 0.7266, 20.5, 36.434, 36.4],
  ["c", 2.4218233, 89.67, 0.687, 28.08, 42.34, 42.37],
  ["d", 4.04961, 89.75, 0.367, 39.55, 49.119, 49.13],
  ["e", 6.099615, 89.86, 0.519, 51.97, 57.271, 57.21],
  ["f", 9.20669, 89.68, 0.673, 68.4, 62.462, 62.6],
  ["g", 12.35294, 89.71, 0.782, 83.2, 68.307, 68.4],
])("the published duration of TRAPPIST-1 %s", (_, period, inclination, depth, a, computed, printed) => {
  const b = a * Math.cos((inclination * Math.PI) / 180);
  const minutes = transitDuration(1440 * period, a, Math.sqrt(depth / 100), b);
  expect(minutes).toBeCloseTo(computed, 2);
  expect(Math.abs(minutes / printed - 1)).toBeLessThan(0.003);
});

describe("geometry", () => {
  test("a planet that misses lasts 0, one that grazes has no full transit, an orbit inside the star has neither", () => {
    expect(transitDuration(10, 20, 0.1, 1.2)).toBe(0);
    expect(fullTransitDuration(10, 20, 0.1, 0.95)).toBe(0);
    expect(transitDuration(10, 20, 0.1, 0.95)).toBeGreaterThan(0);
    expect(transitDuration(10, 0.9, 0.1, 0)).toBeNaN();
    expect(fullTransitDuration(10, 0.9, 0.1, 0)).toBeNaN();
    expect(transitProbability(1)).toBeNaN();
    expect(transitDuration(Number.NaN, 20, 0.1, 0)).toBeNaN();
    expect(transitDuration(10, 20, Number.NaN, 0)).toBeNaN();
  });

  test("durations shrink with the impact parameter; the full one is never the longer", () => {
    const inputs = [
      fc.double({ min: 2, max: 500, noNaN: true }),
      fc.double({ min: 0.001, max: 0.3, noNaN: true }),
      fc.double({ min: 0, max: 0.99, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (a, k, b) => {
        const outer = transitDuration(100, a, k, b);
        expect(fullTransitDuration(100, a, k, b)).toBeLessThanOrEqual(outer);
        expect(transitDuration(100, a, k, Math.min(1, b + 0.01))).toBeLessThanOrEqual(outer);
        expect(transitProbability(a)).toBeLessThanOrEqual(1);
      }),
    );
  });
});
