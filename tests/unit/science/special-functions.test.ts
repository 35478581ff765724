import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  erf,
  erfc,
  gammaQuantile,
  lnGamma,
  lowerGamma,
  normalTail,
  normalTailQuantile,
  upperGamma,
} from "#shared/science/special-functions.ts";

/** How far apart, as a share of the expected value. */
const apart = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe("error functions", () => {
  /** Abramowitz & Stegun 1964, Table 7.1 (from memory); the tails computed to 30 digits. */
  test.each([
    [0.1, 0.1124629160182849, 0.887537083981715],
    [0.5, 0.5204998778130465, 0.4795001221869535],
    [1, 0.8427007929497149, 0.1572992070502851],
    [1.5, 0.966105146475311, 0.0338948535246893],
    [2, 0.9953222650189527, 0.0046777349810473],
    [3, 0.9999779095030014, 2.20904969985854e-5],
    [5, 0.9999999999984626, 1.53745979442803e-12],
    [7, 1, 4.183825607779e-23],
    [26, 1, 5.663192408856143e-296],
  ])("at %d", (x, value, complement) => {
    expect(erf(x)).toBeCloseTo(value, 14);
    expect(apart(erfc(x), complement)).toBeLessThan(5e-13);
  });

  test("erf is odd, erf and erfc make 1, and nothing of NaN is NaN", () => {
    fc.assert(
      fc.property(fc.double({ min: -8, max: 8, noNaN: true }), (x) => {
        expect(erf(-x) + erf(x)).toBe(0);
        expect(erf(x) + erfc(x)).toBeCloseTo(1, 14);
      }),
    );
    expect(erf(0)).toBe(0);
    expect(erf(Number.NaN)).toBeNaN();
    expect(erfc(Number.NaN)).toBeNaN();
    expect(erf(Number.NEGATIVE_INFINITY)).toBe(-1);
  });
});

describe("tail of the normal distribution", () => {
  test("beyond 7.1: 6.237844e-13 (computed)", () => {
    expect(apart(normalTail(7.1), 6.237844e-13)).toBeLessThan(1e-6);
  });

  /** 1.959964 and 2.326348 are the customary two-sided 95 % and one-sided 99 %, from memory. */
  test.each([
    [0.5, 0],
    [0.1, 1.2815515655446004],
    [0.025, 1.959963984540054],
    [0.01, 2.3263478740408408],
    [0.9, -1.2815515655446004],
    [1 / 1.7e12, 7.1081049844565],
  ])("is %d from %d", (p, x) => {
    expect(normalTailQuantile(p)).toBeCloseTo(x, 12);
  });

  test("the quantile inverts the tail down to 1e-300", () => {
    fc.assert(
      fc.property(fc.double({ min: -300, max: -0.31, noNaN: true }), (exponent) => {
        const p = 10 ** exponent;
        expect(apart(normalTail(normalTailQuantile(p)), p)).toBeLessThan(1e-11);
      }),
    );
    for (const p of [0, 1, -0.1, 1.1, Number.NaN]) expect(normalTailQuantile(p)).toBeNaN();
  });
});

describe("gamma functions", () => {
  /** Γ(1/2) = √π, Γ(3.7) and Γ(100.5) computed to 30 digits. */
  test.each([
    [0.001, 6.907178885383854],
    [0.5, 0.5 * Math.log(Math.PI)],
    [1, 0],
    [2, 0],
    [3.7, 1.4280723266653881],
    [11, Math.log(3628800)],
    [100.5, 361.4355404677776],
  ])("ln Γ(%d) = %d", (x, value) => {
    expect(lnGamma(x)).toBeCloseTo(value, 12);
  });

  test("Γ(x + 1) = x Γ(x), and none at or below zero", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 200, noNaN: true }), (x) => {
        expect(lnGamma(x + 1)).toBeCloseTo(lnGamma(x) + Math.log(x), 10);
      }),
    );
    for (const x of [0, -1, Number.NaN]) expect(lnGamma(x)).toBeNaN();
  });

  /** Computed to 30 digits: shape, x, lower and upper. */
  test.each([
    [0.5, 0.1, 0.345279153981423, 0.654720846018577],
    [1, 1, 0.6321205588285577, 0.3678794411714423],
    [4.65, 3, 0.2356178838685241, 0.7643821161314759],
    [30.87, 36.9, 0.8601186897082795, 0.1398813102917205],
    [30.87, 20, 0.0143688166976647, 0.9856311833023353],
    [2, 30, 0.9999999999970991, 2.90086312034045e-12],
    [100, 130, 0.997249591632694, 0.0027504083673065],
  ])("P(%d, %d) = %d", (a, x, lower, upper) => {
    expect(lowerGamma(a, x)).toBeCloseTo(lower, 12);
    expect(apart(upperGamma(a, x), upper)).toBeLessThan(1e-11);
  });

  test("from 0 to 1, growing; nothing of a shape out of range", () => {
    expect(lowerGamma(3, 0)).toBe(0);
    expect(lowerGamma(3, -1)).toBe(0);
    expect(upperGamma(3, -1)).toBe(1);
    expect(lowerGamma(3, Number.POSITIVE_INFINITY)).toBe(1);
    expect(upperGamma(3, Number.POSITIVE_INFINITY)).toBe(0);
    for (const a of [0, -1, 10_001, Number.NaN]) {
      expect(lowerGamma(a, 1)).toBeNaN();
      expect(upperGamma(a, 1)).toBeNaN();
    }
    expect(lowerGamma(3, Number.NaN)).toBeNaN();
    const shapes = fc.double({ min: 0.1, max: 500, noNaN: true });
    fc.assert(
      fc.property(shapes, fc.double({ min: 0, max: 1000, noNaN: true }), (a, x) => {
        expect(lowerGamma(a, x) + upperGamma(a, x)).toBeCloseTo(1, 12);
        expect(lowerGamma(a, 1.01 * x)).toBeGreaterThanOrEqual(lowerGamma(a, x) - 1e-13);
      }),
    );
  });

  test("the quantile inverts both tails", () => {
    const shapes = fc.double({ min: 0.3, max: 500, noNaN: true });
    fc.assert(
      fc.property(shapes, fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true }), (a, p) => {
        const x = gammaQuantile(p, a);
        expect(apart(lowerGamma(a, x), p)).toBeLessThan(1e-9);
        expect(apart(upperGamma(a, x), 1 - p)).toBeLessThan(1e-9);
      }),
    );
    expect(gammaQuantile(0.25, 1)).toBeCloseTo(-Math.log(0.75), 13);
    for (const p of [0, 1, Number.NaN]) expect(gammaQuantile(p, 2)).toBeNaN();
    expect(gammaQuantile(0.5, 0)).toBeNaN();
  });
});
