import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { OCCURRENCES } from "#shared/science/occurrence.ts";
import {
  atLeastOne,
  atLeastOneExpected,
  detectionRate,
  expectedDetections,
  starsNeeded,
  starsPerDetection,
  yieldError,
} from "#shared/science/yields.ts";

describe("expected detections", () => {
  test("5000 stars, 0.4 %, a transit probability of 0.103, nine in ten found: 1.854 (computed)", () => {
    const rate = detectionRate(0.004, 0.103, 1, 0.9);
    expect(5000 * rate).toBeCloseTo(1.854, 12);
    expect(expectedDetections(new Float64Array(5000).fill(rate))).toBeCloseTo(1.854, 9);
    expect(expectedDetections([])).toBe(0);
    expect(expectedDetections([0.1, Number.NaN])).toBeNaN();
  });

  test("its error is Poisson's and that of the occurrence", () => {
    expect(yieldError(9, 0)).toBe(3);
    expect(yieldError(16, 0.1875)).toBeCloseTo(5, 12);
  });
});

describe("at least one", () => {
  test("1000 stars of 0.001 each: 0.632305; by the expected number 0.632121 (computed)", () => {
    expect(atLeastOne(new Float64Array(1000).fill(0.001))).toBeCloseTo(0.632305, 6);
    expect(atLeastOneExpected(1)).toBeCloseTo(0.632121, 6);
  });

  test("it is one less the product of the misses, and never more than the sum", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 20 }),
        (probabilities) => {
          const missed = probabilities.reduce((product, p) => product * (1 - p), 1);
          expect(atLeastOne(probabilities)).toBeCloseTo(1 - missed, 12);
          expect(atLeastOne(probabilities)).toBeLessThanOrEqual(expectedDetections(probabilities) + 1e-12);
        },
      ),
    );
    expect(atLeastOne([0.1, 1.1])).toBeNaN();
  });
});

describe("stars needed", () => {
  /** Computed: probability per star, confidence, stars, whole stars. */
  test.each([
    [1e-3, 0.8, 1608.633, 1609],
    [1e-3, 0.9, 2301.434, 2302],
    [1e-3, 0.95, 2994.234, 2995],
    [1e-3, 0.99, 4602.867, 4603],
  ])("q = %d, confidence %d: %d", (q, confidence, stars, whole) => {
    expect(starsNeeded(confidence, q)).toBeCloseTo(stars, 3);
    expect(Math.ceil(starsNeeded(confidence, q))).toBe(whole);
  });

  test.each([
    [0.01, [161, 230, 299, 459]],
    [0.0025, [643, 920, 1197, 1840]],
  ])("q = %d: whole stars for 80, 90, 95 and 99 %% (computed)", (q, stars) => {
    expect([0.8, 0.9, 0.95, 0.99].map((c) => Math.ceil(starsNeeded(c, q)))).toEqual(stars);
  });

  test("that many stars give that confidence", () => {
    const open = fc.double({ min: 0.01, max: 0.99, noNaN: true });
    fc.assert(
      fc.property(open, fc.double({ min: 1e-6, max: 0.5, noNaN: true }), (confidence, q) => {
        expect(1 - (1 - q) ** starsNeeded(confidence, q)).toBeCloseTo(confidence, 9);
      }),
    );
    for (const out of [0, 1, Number.NaN]) {
      expect(starsNeeded(out, 0.1)).toBeNaN();
      expect(starsNeeded(0.9, out)).toBeNaN();
    }
  });

  /** Common practice, no source. */
  test("a transiting hot Jupiter among 1000 stars at an occurrence of 1 % and a probability of 10 %", () => {
    expect(starsPerDetection(detectionRate(0.01, 0.1, 1, 1))).toBeCloseTo(1000, 9);
    expect(starsPerDetection(0)).toBeNaN();
  });
});

describe("occurrences", () => {
  test("each has a key of its own, a source, and a value with errors that leave it positive", () => {
    expect(new Set(OCCURRENCES.map(({ key }) => key)).size).toBe(OCCURRENCES.length);
    for (const { source, value, errorDown } of OCCURRENCES) {
      expect(source).toMatch(/ \d{4}, /);
      expect(value - (errorDown ?? 0)).toBeGreaterThan(0);
    }
  });

  test("bounds are in order, and a period is bounded or the habitable zone named", () => {
    for (const { radius, period, planets } of OCCURRENCES) {
      for (const [least, most] of period ? [radius, period] : [radius])
        if (least !== null && most !== null) expect(least).toBeLessThan(most);
      if (period) expect(period[1]).not.toBeNull();
      else expect(planets).toMatch(/habitable zone/);
    }
  });

  /** Wright et al. 2012, ApJ 753, 160; Dressing & Charbonneau 2015, ApJ 807, 45; Bryson et al. 2021, AJ 161, 36 (abstracts). */
  test.each([
    ["hot-jupiters-nearby", 0.012, 0.0038, 0.0038],
    ["small-early-m", 2.5, 0.2, 0.2],
    ["earths-zone-optimistic-m", 0.24, 0.18, 0.08],
    ["zone-conservative-least", 0.37, 0.48, 0.21],
    ["zone-optimistic-most", 0.88, 1.28, 0.51],
  ])("%s is %d +%d −%d", (key, value, errorUp, errorDown) => {
    expect(OCCURRENCES.find((o) => o.key === key)).toMatchObject({
      value,
      errorUp,
      errorDown,
      status: "verified",
    });
  });
});
