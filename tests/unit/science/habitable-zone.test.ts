import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  distanceAtInsolation,
  type HabitableLimit,
  insolationAtLimit,
  insolationSlope,
} from "#shared/science/habitable-zone.ts";
import { axisFromPeriod, periodFromAxis, scaledAxis } from "#shared/science/orbit.ts";
import { slopeOf } from "./slope.ts";

const LIMITS: readonly HabitableLimit[] = [
  "recent-venus",
  "runaway-greenhouse",
  "maximum-greenhouse",
  "early-mars",
];

/** Computed from Kopparapu et al. 2014, ApJ 787, L29, Table 1, in the order of LIMITS. */
test.each([
  [2600, [1.464535, 0.912899, 0.222762, 0.200215]],
  [3000, [1.479154, 0.921975, 0.232979, 0.209405]],
  [3400, [1.491313, 0.929527, 0.243974, 0.219292]],
  [3800, [1.508171, 0.940018, 0.256727, 0.230759]],
  [4500, [1.563713, 0.97463, 0.285003, 0.256181]],
  [5000, [1.629977, 1.015945, 0.310211, 0.27884]],
  [5500, [1.718451, 1.071113, 0.338921, 0.304648]],
  [5772, [1.774293, 1.105935, 0.355506, 0.319556]],
  [5780, [1.776, 1.107, 0.356, 0.32]],
  [6500, [1.937119, 1.207475, 0.399968, 0.359522]],
  [7200, [2.079656, 1.296364, 0.435629, 0.391578]],
])("insolation of the limits at %d K", (teff, expected) => {
  expect(LIMITS.map((limit) => insolationAtLimit(limit, teff).toFixed(6))).toEqual(
    expected.map((s) => s.toFixed(6)),
  );
});

describe("habitable zone", () => {
  test("the Sun: 0.75, 0.95, 1.68 and 1.77 au, as printed in Kopparapu et al. 2014", () => {
    const distances = LIMITS.map((limit) => distanceAtInsolation(1, insolationAtLimit(limit, 5780)));
    expect(distances.map((d) => d.toFixed(2))).toEqual(["0.75", "0.95", "1.68", "1.77"]);
    expect(distances.map((d) => d.toFixed(4))).toEqual(["0.7504", "0.9504", "1.6760", "1.7678"]);
  });

  test("outside 2600 to 7200 K nothing is given, and nothing is clamped", () => {
    const outside = fc.oneof(fc.double({ min: 1, max: 2599.999 }), fc.double({ min: 7200.001, max: 50_000 }));
    fc.assert(
      fc.property(outside, fc.constantFrom(...LIMITS), (teff, limit) => {
        expect(insolationAtLimit(limit, teff)).toBeNaN();
      }),
    );
    expect(insolationAtLimit("early-mars", Number.NaN)).toBeNaN();
  });

  test("every limit rises with temperature, and its slope is the relation's", () => {
    for (const limit of LIMITS)
      for (const teff of [2700, 3500, 4800, 6100, 7100]) {
        expect(insolationSlope(limit, teff)).toBeGreaterThan(0);
        expect(insolationSlope(limit, teff)).toBeCloseTo(
          slopeOf((t) => insolationAtLimit(limit, t), teff, 0.1),
          9,
        );
      }
  });

  /** Distances and periods computed from the 2014 limits: mass, luminosity, Teff, inner and outer edge. */
  test.each([
    [1, 1, 5772, 0.9509, 338.689, 1.67717, 793.346],
    [0.5, 0.035, 3800, 0.19296, 43.784, 0.36923, 115.894],
    [0.1, 0.0008, 2800, 0.02952, 5.8587, 0.05925, 16.6602],
  ])("edges for %d solar masses, L %d, %d K", (mass, light, teff, inner, innerDays, outer, outerDays) => {
    const innerAu = distanceAtInsolation(light, insolationAtLimit("runaway-greenhouse", teff));
    const outerAu = distanceAtInsolation(light, insolationAtLimit("maximum-greenhouse", teff));
    expect(innerAu).toBeCloseTo(inner, 5);
    expect(outerAu).toBeCloseTo(outer, 5);
    expect(periodFromAxis(innerAu, mass)).toBeCloseTo(innerDays, 3);
    expect(periodFromAxis(outerAu, mass)).toBeCloseTo(outerDays, 3);
  });

  test("where the insolation is Earth's", () => {
    expect(distanceAtInsolation(0.035, 1)).toBeCloseTo(0.187083, 6);
    expect(periodFromAxis(distanceAtInsolation(0.035, 1), 0.5)).toBeCloseTo(41.7989, 4);
    expect(distanceAtInsolation(0.0008, 1)).toBeCloseTo(0.0282843, 7);
    expect(periodFromAxis(distanceAtInsolation(0.0008, 1), 0.1)).toBeCloseTo(5.49434, 5);
  });
});

describe("orbit", () => {
  test("one au in a year of 365.25 days is 0.99998741 au", () => {
    expect(axisFromPeriod(365.25, 1)).toBeCloseTo(0.99998741, 8);
    expect(scaledAxis(1, 1)).toBeCloseTo(215.032156, 6);
  });

  test("period and axis are inverse to each other", () => {
    const positive = fc.double({ min: 0.01, max: 100, noNaN: true });
    fc.assert(
      fc.property(positive, positive, (axis, mass) => {
        expect(axisFromPeriod(periodFromAxis(axis, mass), mass) / axis).toBeCloseTo(1, 10);
      }),
    );
  });
});
