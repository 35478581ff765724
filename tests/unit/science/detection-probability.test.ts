import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type DetectionModel, detectionProbability } from "#shared/science/detection-probability.ts";

const MODELS: readonly DetectionModel[] = [
  "error-function",
  "ramp",
  "gamma",
  "gamma-fgk",
  "final",
  "final-by-transits",
];

describe("detection probability", () => {
  /** Computed: statistic, then by error function, gamma 4.65 / 0.98, gamma 4.35 / 1.05 and 0.940 gamma 30.87 / 0.271. */
  test.each([
    [5, 0.017864, 0.004778, 0.006241, 0.004755],
    [6, 0.135666, 0.069056, 0.076806, 0.042936],
    [7, 0.460172, 0.227853, 0.237346, 0.172806],
    [7.1, 0.5, 0.247394, 0.256626, 0.192029],
    [8, 0.81594, 0.432487, 0.437041, 0.40054],
    [10, 0.998134, 0.768495, 0.762636, 0.808524],
    [12, 1, 0.926975, 0.920742, 0.926616],
    [15, 1, 0.990389, 0.98832, 0.939877],
    [20, 1, 0.999793, 0.999683, 0.94],
  ])("at %d", (statistic, ideal, gamma, fgk, final) => {
    expect(detectionProbability("error-function", statistic)).toBeCloseTo(ideal, 6);
    expect(detectionProbability("gamma", statistic)).toBeCloseTo(gamma, 6);
    expect(detectionProbability("gamma-fgk", statistic)).toBeCloseTo(fgk, 6);
    expect(detectionProbability("final", statistic)).toBeCloseTo(final, 6);
  });

  /** Fressin et al. 2013, ApJ 766, 81. */
  test.each([
    [5.9, 0],
    [6, 0],
    [11, 0.5],
    [16, 1],
    [40, 1],
  ])("the ramp at %d is %d", (statistic, probability) => {
    expect(detectionProbability("ramp", statistic)).toBe(probability);
  });

  /** Hsu et al. 2019, AJ 158, 109: transits and the ceiling that a strong signal reaches. */
  test.each([
    [1000, 0.945075],
    [37, 0.945075],
    [36, 0.889724],
    [19, 0.889724],
    [18, 0.886144],
    [10, 0.886144],
    [9, 0.875042],
    [7, 0.875042],
    [6, 0.859865],
    [5, 0.833673],
    [4, 0.768366],
    [3, 0.699093],
  ])("%d transits find at most %d", (transits, ceiling) => {
    expect(detectionProbability("final-by-transits", 60, 7.1, transits)).toBeCloseTo(ceiling, 6);
    // Half of the ceiling is reached between 7.5 and 10: shape times scale.
    expect(detectionProbability("final-by-transits", 7.5, 7.1, transits)).toBeLessThan(ceiling / 2);
    expect(detectionProbability("final-by-transits", 10, 7.1, transits)).toBeGreaterThan(ceiling / 2);
  });

  test("fewer than three transits, or an unknown number, have no such curve", () => {
    for (const transits of [2, 0, Number.NaN])
      expect(detectionProbability("final-by-transits", 10, 7.1, transits)).toBeNaN();
  });

  test("a higher threshold moves the curves that know one", () => {
    for (const model of ["error-function", "gamma", "gamma-fgk"] as const)
      expect(detectionProbability(model, 9, 8.1)).toBeCloseTo(detectionProbability(model, 8, 7.1), 12);
    for (const model of ["ramp", "final"] as const)
      expect(detectionProbability(model, 9, 8.1)).toBe(detectionProbability(model, 9, 7.1));
  });

  test("it lies between 0 and 1 and never falls with the signal; a blank signal has none", () => {
    const statistic = fc.double({ min: -5, max: 60, noNaN: true });
    fc.assert(
      fc.property(fc.constantFrom(...MODELS), statistic, (model, s) => {
        const here = detectionProbability(model, s, 7.1, 12);
        expect(here).toBeGreaterThanOrEqual(0);
        expect(here).toBeLessThanOrEqual(1);
        expect(detectionProbability(model, s + 0.1, 7.1, 12)).toBeGreaterThanOrEqual(here - 1e-12);
      }),
    );
    for (const model of MODELS) expect(detectionProbability(model, Number.NaN, 7.1, 12)).toBeNaN();
  });
});
