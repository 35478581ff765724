import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  chanceAlignments,
  lnMatchFactor,
  lnMatchFactorOfMany,
  matchProbability,
  searchRadius,
} from "#shared/science/match-factor.ts";

const errors = fc.double({ min: 1e-4, max: 10, noNaN: true });
const separations = fc.double({ min: 0, max: 100, noNaN: true });

describe("the match factor of two catalogues", () => {
  /** Computed from Budavári & Szalay 2008, ApJ 679, 301, eq. 16: σ₁, σ₂, ψ in arcsec, ln B, log10 B. */
  test.each([
    [0.1, 0.1, 0, 29.079, 12.62885],
    [0.1, 0.1, 0.1, 28.829, 12.52028],
    [0.1, 0.1, 0.3, 26.829, 11.65169],
    [0.1, 0.1, 0.5, 22.829, 9.91451],
    [0.1, 0.5, 1, 24.59098, 10.67973],
    [0.5, 0.5, 1, 24.86013, 10.79662],
    [1, 1, 3, 22.22383, 9.65169],
    [0.001, 0.06, 0.1, 29.40502, 12.77044],
    [0.05, 0.08, 0.2, 27.64149, 12.00455],
  ])("with errors %d″ and %d″ at %d″", (error1, error2, psi, ln, log10) => {
    expect(lnMatchFactor(error1, error2, psi)).toBeCloseTo(ln, 5);
    expect(lnMatchFactor(error1, error2, psi) / Math.LN10).toBeCloseTo(log10, 5);
  });

  test("is one where nothing speaks for either", () => {
    // Computed. The exact form, with Fisher's distribution on the sphere, gives 28.829002365 too.
    expect(lnMatchFactor(0.1, 0.1, 1.0785)).toBeCloseTo(0, 2);
    expect(lnMatchFactor(0.1, 0.1, 0.1)).toBeCloseTo(28.829002365, 8);
  });

  test("is missing without errors or a separation", () => {
    expect(lnMatchFactor(0, 0, 1)).toBeNaN();
    expect(lnMatchFactor(-0.1, 0.1, 1)).toBeNaN();
    expect(lnMatchFactor(0.1, Number.NaN, 1)).toBeNaN();
    expect(lnMatchFactor(0.1, 0.1, Number.NaN)).toBeNaN();
    // One catalogue may be exact.
    expect(lnMatchFactor(0, 0.1, 0)).toBeCloseTo(lnMatchFactor(0.06, 0.08, 0), 12);
  });
});

describe("the match factor of many catalogues", () => {
  test("three of 0.1″", () => {
    // Computed from Budavári & Szalay 2008, eq. 18.
    expect(lnMatchFactorOfMany([0.1, 0.1, 0.1], [0, 0, 0])).toBeCloseTo(58.445687, 6);
    // Positions at 0, 0.1 and 0.2″ in a line.
    expect(lnMatchFactorOfMany([0.1, 0.1, 0.1], [0.1, 0.2, 0.1])).toBeCloseTo(57.445687, 6);
  });

  test("of two is that of two, and of one is nothing", () => {
    fc.assert(
      fc.property(errors, errors, separations, (error1, error2, psi) => {
        const two = lnMatchFactor(error1, error2, psi);
        expect(lnMatchFactorOfMany([error1, error2], [psi])).toBeCloseTo(two, Math.abs(two) > 1e6 ? -4 : 6);
        expect(lnMatchFactor(error2, error1, psi)).toBe(two);
        expect(lnMatchFactorOfMany([error1], [])).toBeCloseTo(0, 12);
      }),
    );
  });

  test("is missing when an error or a pair is", () => {
    expect(lnMatchFactorOfMany([], [])).toBeNaN();
    expect(lnMatchFactorOfMany([0.1, 0.1, 0.1], [0.1, 0.1])).toBeNaN();
    expect(lnMatchFactorOfMany([0.1, 0], [0.1])).toBeNaN();
    expect(lnMatchFactorOfMany([0.1, 0.1], [Number.NaN])).toBeNaN();
  });
});

describe("the probability of a match", () => {
  /** Computed: separation, with a prior of 1e-6, with one of 5e-10. */
  test.each([
    [0, 1, 0.99953],
    [0.1, 1, 0.999397],
    [0.3, 0.999998, 0.99556],
    [0.5, 0.999878, 0.804174],
    [0.7, 0.95318, 0.010077],
  ])("at %d″ with errors of 0.1″", (psi, often, seldom) => {
    const factor = lnMatchFactor(0.1, 0.1, psi);
    expect(matchProbability(factor, 1e-6)).toBeCloseTo(often, 6);
    expect(matchProbability(factor, 5e-10)).toBeCloseTo(seldom, 6);
  });

  test("is between none and certain, and is the prior when nothing speaks for either", () => {
    expect(matchProbability(0, 0.3)).toBeCloseTo(0.3, 12);
    expect(matchProbability(800, 1e-9)).toBe(1);
    expect(matchProbability(-800, 0.5)).toBe(0);
    expect(matchProbability(20, 0)).toBe(0);
    expect(matchProbability(-20, 1)).toBe(1);
    expect(matchProbability(0, 1.5)).toBeNaN();
    expect(matchProbability(Number.NaN, 0.5)).toBeNaN();
  });
});

describe("the search", () => {
  test("a radius holds its share of the true pairs", () => {
    // Computed: the quantiles of a Gaussian in two dimensions.
    expect(searchRadius(1, 0, 0.68)).toBeCloseTo(1.5096, 4);
    expect(searchRadius(0.6, 0.8, 0.95)).toBeCloseTo(2.4477, 4);
    expect(searchRadius(0, 1, 0.9973)).toBeCloseTo(3.4393, 4);
    expect(searchRadius(1, 1, 0)).toBe(0);
    expect(searchRadius(1, 1, 1)).toBeNaN();
  });

  test("chance alignments grow with the area", () => {
    // Computed: 1, 2 and 3″ at 10⁴ and 10⁵ sources a square degree.
    expect(chanceAlignments(1, 1e4)).toBeCloseTo(0.002424, 6);
    expect(chanceAlignments(2, 1e4)).toBeCloseTo(0.009696, 6);
    expect(chanceAlignments(3, 1e4)).toBeCloseTo(0.021817, 6);
    expect(chanceAlignments(1, 1e5)).toBeCloseTo(0.02424, 5);
    expect(chanceAlignments(3, 1e5)).toBeCloseTo(0.21817, 5);
    expect(chanceAlignments(-1, 1e5)).toBeNaN();
  });
});
