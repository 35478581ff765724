import { describe, expect, test } from "vitest";
import {
  approximateLowerLimit,
  approximateUpperLimit,
  confidenceOfSigmas,
  poissonLowerLimit,
  poissonUpperLimit,
  simpleUpperLimit,
} from "#shared/science/poisson-limits.ts";

describe("limits of a Poisson mean", () => {
  const EVENTS = [0, 1, 2, 3, 4, 5, 10] as const;

  /** Gehrels 1986, ApJ 303, 336, Tables 1 and 2; one-sided confidence by σ of a normal distribution, or as given. */
  test.each([
    [
      "1 σ",
      confidenceOfSigmas(1),
      [1.841, 3.3, 4.638, 5.918, 7.163, 8.382, 14.27],
      [0, 0.173, 0.708, 1.367, 2.086, 2.84, 6.891],
    ],
    [
      "90 %",
      0.9,
      // biome-ignore lint/suspicious/noApproximativeNumericConstant: the number that the table prints
      [2.303, 3.89, 5.322, 6.681, 7.994, 9.275, 15.41],
      [0, 0.105, 0.532, 1.102, 1.745, 2.433, 6.221],
    ],
    [
      "95 %",
      0.95,
      [2.996, 4.744, 6.296, 7.754, 9.154, 10.51, 16.96],
      [0, 0.0513, 0.355, 0.818, 1.366, 1.97, 5.425],
    ],
    [
      "99 %",
      0.99,
      [4.605, 6.638, 8.406, 10.05, 11.6, 13.11, 20.14],
      [0, 0.0101, 0.149, 0.436, 0.823, 1.279, 4.13],
    ],
    [
      "2 σ",
      confidenceOfSigmas(2),
      [3.783, 5.683, 7.348, 8.902, 10.39, 11.82, 18.58],
      [0, 0.023, 0.23, 0.596, 1.058, 1.583, 4.719],
    ],
    [
      "3 σ",
      confidenceOfSigmas(3),
      [6.608, 8.9, 10.87, 12.68, 14.39, 16.03, 23.64],
      [0, 0.00135, 0.0529, 0.212, 0.465, 0.792, 3.084],
    ],
  ] as const)("%s", (_, confidence, upper, lower) => {
    for (const [i, n] of EVENTS.entries()) {
      const [high, low] = [upper[i] ?? 0, lower[i] ?? 0];
      expect(Math.abs(poissonUpperLimit(n, confidence) - high)).toBeLessThanOrEqual(
        high < 10 ? 0.00051 : 0.0051,
      );
      const step = low < 0.01 ? 0.0000051 : low < 0.1 ? 0.000051 : 0.00051;
      expect(Math.abs(poissonLowerLimit(n, confidence) - low)).toBeLessThanOrEqual(step);
    }
  });

  test("no event leaves ln 1/(1 − CL) possible; the lower limit is 0", () => {
    expect(poissonUpperLimit(0, 0.95)).toBeCloseTo(-Math.log(0.05), 12);
    expect(poissonLowerLimit(0, 0.95)).toBe(0);
  });

  test("the limits are the means at which the counts become that unlikely", () => {
    const atMost = (n: number, mean: number): number => {
      let [term, sum] = [Math.exp(-mean), 0];
      for (let k = 0; k <= n; k++) {
        sum += term;
        term *= mean / (k + 1);
      }
      return sum;
    };
    for (const n of [1, 4, 17, 60]) {
      expect(atMost(n, poissonUpperLimit(n, 0.9))).toBeCloseTo(0.1, 10);
      expect(1 - atMost(n - 1, poissonLowerLimit(n, 0.9))).toBeCloseTo(0.1, 10);
    }
  });

  test("none for counts that are not whole or a confidence out of range", () => {
    for (const n of [-1, 1.5, 10_000, Number.NaN]) {
      expect(poissonUpperLimit(n, 0.9)).toBeNaN();
      expect(poissonLowerLimit(n, 0.9)).toBeNaN();
    }
    for (const confidence of [0, 1, Number.NaN]) {
      expect(poissonUpperLimit(3, confidence)).toBeNaN();
      expect(poissonLowerLimit(0, confidence)).toBeNaN();
    }
  });

  /** Computed. */
  test("approximations at one σ", () => {
    for (const [n, value] of [
      [0, 1.8258],
      [1, 3.2873],
      [5, 8.3747],
      [10, 14.2611],
    ] as const)
      expect(approximateUpperLimit(n, 1)).toBeCloseTo(value, 4);
    for (const [n, value] of [
      [0, 1.866],
      [1, 3.3229],
      [5, 8.3979],
      [10, 14.2787],
    ] as const)
      expect(simpleUpperLimit(n)).toBeCloseTo(value, 4);
    for (const [n, value] of [
      [1, 0.1715],
      [5, 2.8456],
      [10, 6.8959],
    ] as const)
      expect(approximateLowerLimit(n, 1)).toBeCloseTo(value, 4);
    expect(approximateLowerLimit(0, 1)).toBeNaN();
  });
});
