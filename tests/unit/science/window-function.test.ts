import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { meanTransits, probabilityOfTransits, windowProbability } from "#shared/science/window-function.ts";

describe("number of transits", () => {
  /** Computed for 27 days: period, transits, probability of at least as many. */
  test.each([
    [10, 2, 1],
    [10, 3, 0.7],
    [10, 4, 0],
    [14, 1, 1],
    [14, 2, 0.92857],
    [30, 1, 0.9],
    [30, 2, 0],
  ])("27 days, %d days a period: at least %d with %d", (period, least, probability) => {
    expect(probabilityOfTransits(27, period, least)).toBeCloseTo(probability, 5);
  });

  test("the probabilities of one and more, two and more and so on add up to the mean", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 30, noNaN: true }), (period) => {
        let sum = 0;
        for (let n = 1; n <= 60; n++) sum += probabilityOfTransits(27, period, n);
        expect(sum).toBeCloseTo(meanTransits(27, period), 9);
      }),
    );
    expect(meanTransits(27, 10, 0.5)).toBeCloseTo(1.35, 12);
    expect(probabilityOfTransits(27, Number.NaN, 1)).toBeNaN();
  });
});

describe("window function", () => {
  /** Computed: days observed, share, period, probability of three or more. */
  test.each([
    [1459, 0.88, 300, 0.981984],
    [1459, 0.88, 365.25, 0.926172],
    [1459, 0.88, 400, 0.874162],
    [1459, 0.88, 450, 0.772269],
    [1459, 0.88, 500, 0.644519],
    [1459, 0.88, 730, 0],
    [27, 0.95, 5, 0.999586],
    [27, 0.95, 8, 0.938545],
    [27, 0.95, 9, 0.857375],
    [27, 0.95, 13, 0.118092],
    [180, 0.3, 10, 0.940048],
  ])("%d days, share %d, period %d: %d", (length, duty, period, probability) => {
    expect(windowProbability(length, period, duty)).toBeCloseTo(probability, 6);
  });

  /** Burke & McCullough 2014, ApJ 792, 79: the sum written out for three transits. */
  test("for three it is the written sum, for one `1 − (1 − f)^M`", () => {
    const inputs = [
      fc.double({ min: 2.05, max: 40, noNaN: true }),
      fc.double({ min: 0.05, max: 0.99, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (m, f) => {
        const g = 1 - f;
        const three = 1 - g ** m - m * f * g ** (m - 1) - 0.5 * m * (m - 1) * f ** 2 * g ** (m - 2);
        expect(windowProbability(m, 1, f)).toBeCloseTo(Math.min(1, Math.max(0, three)), 10);
        expect(windowProbability(m, 1, f, 1)).toBeCloseTo(1 - g ** m, 10);
      }),
    );
  });

  test("for whole cycles it is the binomial distribution", () => {
    const [m, f] = [12, 0.35];
    const choose = (k: number): number => (k === 0 ? 1 : (choose(k - 1) * (m - k + 1)) / k);
    for (const least of [1, 2, 3, 5, 8]) {
      let more = 0;
      for (let k = least; k <= m; k++) more += choose(k) * f ** k * (1 - f) ** (m - k);
      expect(windowProbability(m, 1, f, least)).toBeCloseTo(more, 10);
    }
  });

  test("none where too few fit, all where everything is observed; nothing out of range", () => {
    expect(windowProbability(1.9986, 1, 0.88)).toBe(0);
    expect(windowProbability(0.5, 1, 0.95)).toBe(0);
    expect(windowProbability(10, 1, 1)).toBe(1);
    for (const duty of [0, 1.01, Number.NaN]) expect(windowProbability(10, 1, duty)).toBeNaN();
    expect(windowProbability(-1, 1, 0.5)).toBeNaN();
    expect(windowProbability(10, 1, 0.5, 0)).toBeNaN();
  });

  test("more time and fewer transits asked never make it less likely", () => {
    const inputs = [
      fc.double({ min: 1, max: 50, noNaN: true }),
      fc.double({ min: 0.05, max: 0.95, noNaN: true }),
      fc.integer({ min: 1, max: 6 }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (length, duty, least) => {
        const here = windowProbability(length, 1, duty, least);
        expect(windowProbability(length + 1, 1, duty, least)).toBeGreaterThanOrEqual(here - 1e-9);
        expect(windowProbability(length, 1, duty, least + 1)).toBeLessThanOrEqual(here + 1e-9);
      }),
    );
  });
});
