import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  GALACTIC_SCALE_LENGTH_PC,
  logDistancePosterior,
  modeOfDistance,
  quantilesOfDistance,
} from "#shared/science/distance-prior.ts";
import { slopeOf } from "./slope.ts";

const L = GALACTIC_SCALE_LENGTH_PC;

/** Computed from eq. 19 of Bailer-Jones 2015 for L = 1350 pc: parallax and error, mas; mode, pc. */
const MODES = [
  [100, 0.1, 10.00002],
  [10, 0.1, 100.019267],
  [10, 1, 102.00228],
  [10, 2, 109.144832],
  [50, 12.5, 23.3896],
  [20, 6, 64.716],
  [5, 1.5, 251.703758],
  [2, 1, 1500],
  [1, 1, 2370.754158],
  [-0.5, 0.5, 3788.801511],
  [-0.1, 0.3, 4008.008156],
] as const;

/** Computed by integration on a logarithmic grid, to the digits shown: 16, 50 and 84 %, pc. */
const QUANTILES = [
  [100, 0.1, [9.99, 10.0, 10.01], 3],
  [10, 0.1, [99.054, 100.039, 101.045], 3],
  [10, 1, [94.316, 104.299, 116.689], 2],
  [10, 2, [99.285, 129.936, 211.312], 2],
  [5, 1.5, [423.9, 1815, 4536], 0],
  [2, 1, [1226, 2791, 5359], 0],
  [1, 1, [1718, 3377, 5961], 0],
] as const;

describe("mode", () => {
  test.each(MODES)("%d ± %d mas", (parallax, error, mode) => {
    expect(Math.abs(modeOfDistance(parallax, error, L) / mode - 1)).toBeLessThan(1e-6);
  });

  test("2 ± 1 mas is 1500 pc exactly: a root in whole numbers", () => {
    expect(modeOfDistance(2, 1, L)).toBeCloseTo(1500, 9);
  });

  test("of three roots the smallest wins, and the others are stationary points too", () => {
    // Computed: the roots of the cubic for 50 ± 12.5 mas and 20 ± 6 mas.
    for (const [parallax, error, roots] of [
      [50, 12.5, [23.3896, 145.969, 2530.6414]],
      [20, 6, [64.716, 242.1303, 2393.1537]],
    ] as const) {
      for (const root of roots)
        expect(slopeOf((r) => logDistancePosterior(r, parallax, error, L), root, 1e-3)).toBeCloseTo(0, 4);
      expect(modeOfDistance(parallax, error, L)).toBeCloseTo(roots[0], 3);
    }
  });

  test("it is a peak of the posterior, whatever the parallax", () => {
    const parallax = fc.double({ min: -5, max: 200, noNaN: true });
    const error = fc.double({ min: 0.01, max: 20, noNaN: true });
    const scale = fc.double({ min: 50, max: 3000, noNaN: true });
    fc.assert(
      fc.property(parallax, error, scale, (w, s, length) => {
        const mode = modeOfDistance(w, s, length);
        const height = logDistancePosterior(mode, w, s, length);
        for (const factor of [0.999, 1.001])
          expect(logDistancePosterior(mode * factor, w, s, length)).toBeLessThanOrEqual(height + 1e-9);
      }),
    );
  });

  test("with a single peak it is the highest point that a search finds", () => {
    for (const [parallax, error] of [
      [10, 1],
      [5, 1.5],
      [1, 1],
      [-0.5, 0.5],
    ] as const) {
      let best = 1;
      for (let r = 1; r < 20_000; r *= 1.0005)
        if (logDistancePosterior(r, parallax, error, L) > logDistancePosterior(best, parallax, error, L))
          best = r;
      expect(Math.abs(modeOfDistance(parallax, error, L) / best - 1)).toBeLessThan(5e-4);
    }
  });

  test("a sharp parallax gives its inverse, none the prior's mode 2 L", () => {
    expect(modeOfDistance(10, 1e-4, L)).toBeCloseTo(100, 6);
    expect(modeOfDistance(0, 1e6, L)).toBeCloseTo(2 * L, 3);
  });
});

describe("quantiles", () => {
  test.each(QUANTILES)("%d ± %d mas", (parallax, error, expected, digits) => {
    const found = quantilesOfDistance(parallax, error, L, [0.16, 0.5, 0.84]);
    // Half a unit of the last digit shown, and one for the grid.
    for (const [i, value] of expected.entries())
      expect(Math.abs((found[i] as number) - value)).toBeLessThan(1.5 * 10 ** -digits);
  });

  test("they rise with their level and hold the levels of the prior where the parallax says nothing", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -2, max: 100, noNaN: true }),
        fc.double({ min: 0.02, max: 5, noNaN: true }),
        (parallax, error) => {
          const found = quantilesOfDistance(parallax, error, L, [0.05, 0.16, 0.5, 0.84, 0.95]);
          expect(found.every((r) => r > 0)).toBe(true);
          expect(found).toEqual([...found].sort((a, b) => a - b));
        },
      ),
    );
    // Computed: the median of r² exp(−r / L) is 2.6740603 L (the gamma distribution of shape 3).
    expect((quantilesOfDistance(0, 1e6, L, [0.5])[0] as number) / L).toBeCloseTo(2.67406, 3);
  });

  test("a level of 0 or 1 has no distance", () => {
    expect(quantilesOfDistance(10, 1, L, [0, 1])).toEqual([Number.NaN, Number.NaN]);
  });
});

test("without a parallax, an error or a scale there is no distance", () => {
  for (const [parallax, error, length] of [
    [Number.NaN, 1, L],
    [10, 0, L],
    [10, Number.NaN, L],
    [10, -1, L],
    [10, 1, 0],
    [10, 1, Number.POSITIVE_INFINITY],
  ] as const) {
    expect(modeOfDistance(parallax, error, length)).toBeNaN();
    expect(quantilesOfDistance(parallax, error, length, [0.5])).toEqual([Number.NaN]);
  }
});
