import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { eccentricityFactors } from "#shared/science/eccentricity.ts";

describe("eccentricity factors", () => {
  test("circular orbits change nothing", () => {
    expect(eccentricityFactors({ prior: "circular" })).toEqual({ probability: 1, duration: 1 });
    expect(eccentricityFactors({ prior: "fixed", e: 0 })).toEqual({ probability: 1, duration: 1 });
  });

  test("one eccentricity for all", () => {
    const { probability, duration } = eccentricityFactors({ prior: "fixed", e: 0.6 });
    expect(probability).toBeCloseTo(1 / 0.64, 12);
    expect(duration).toBeCloseTo(0.8, 12);
  });

  /**
   * Computed from the closed forms `B(α, β − 1) ₂F₁(1, α; α + β − 1; −1) / B(α, β)` and
   * `B(α, β + ½) ₂F₁(−½, α; α + β + ½; −1) / B(α, β)` to 25 digits and cut; 0.867 and 3.03 are those of Kipping 2013, MNRAS 434,
   * L51, from memory.
   */
  test.each([
    [0.867, 3.03, 1.131328291462, 0.953772683907],
    [1, 2, 2 * Math.log(2), 0.904129660128],
    [0.5, 2.5, 1.104569499661, 0.965628481135],
    [0.01, 3, 1.001143576928, 0.999554872537],
    [30, 4, 5.765853104601, 0.45621572495],
  ])("beta distribution with α = %d, β = %d: %d and %d", (alpha, beta, probability, duration) => {
    const factors = eccentricityFactors({ prior: "beta", alpha, beta });
    expect(factors.probability).toBeCloseTo(probability, 10);
    expect(factors.duration).toBeCloseTo(duration, 10);
  });

  test("uniform eccentricities have a mean duration of π/4 and no mean probability", () => {
    const factors = eccentricityFactors({ prior: "beta", alpha: 1, beta: 1 });
    expect(factors.duration).toBeCloseTo(Math.PI / 4, 12);
    expect(factors.probability).toBeNaN();
  });

  test("open orbits and exponents out of range have no factors", () => {
    for (const e of [-0.01, 1, Number.NaN])
      expect(eccentricityFactors({ prior: "fixed", e }).probability).toBeNaN();
    for (const alpha of [0, -1, 1001, Number.NaN])
      expect(eccentricityFactors({ prior: "beta", alpha, beta: 3 }).duration).toBeNaN();
  });

  test("a narrow distribution is that of its mean; the probability never falls, the duration never grows", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.02, max: 0.8, noNaN: true }), (e) => {
        const narrow = eccentricityFactors({ prior: "beta", alpha: 1000 * e, beta: 1000 * (1 - e) });
        const one = eccentricityFactors({ prior: "fixed", e });
        expect(narrow.probability / one.probability).toBeCloseTo(1, 1);
        expect(narrow.duration / one.duration).toBeCloseTo(1, 2);
        expect(narrow.probability).toBeGreaterThan(1);
        expect(narrow.duration).toBeLessThan(1);
      }),
    );
  });
});
