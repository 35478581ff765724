import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  distanceAtInsolation,
  type EarlierHabitableLimit,
  type HabitableLimit,
  insolationAtEarlierLimit,
  insolationAtLimit,
  insolationSlope,
} from "#shared/science/habitable-zone.ts";
import { axisFromPeriod, periodFromAxis, scaledAxis } from "#shared/science/orbit.ts";
import { slopeOf } from "./slope.ts";

const LIMITS: readonly HabitableLimit[] = [
  "recent-venus",
  "runaway-greenhouse",
  "runaway-greenhouse-5-earths",
  "runaway-greenhouse-0.1-earths",
  "maximum-greenhouse",
  "early-mars",
];
const EARLIER_LIMITS: readonly EarlierHabitableLimit[] = [
  "recent-venus",
  "runaway-greenhouse",
  "moist-greenhouse",
  "maximum-greenhouse",
];

const distancesOf = (limits: readonly HabitableLimit[], light: number, teff: number): number[] =>
  limits.map((limit) => distanceAtInsolation(light, insolationAtLimit(limit, teff)));

/** Computed from Kopparapu et al. 2014, ApJ 787, L29, Table 1, in the order of LIMITS. */
test.each([
  [2600, [1.464535, 0.912899, 0.980201, 0.810887, 0.222762, 0.200215]],
  [3000, [1.479154, 0.921975, 0.989753, 0.819466, 0.232979, 0.209405]],
  [3400, [1.491313, 0.929527, 0.997671, 0.826828, 0.243974, 0.219292]],
  [3800, [1.508171, 0.940018, 1.00877, 0.836914, 0.256727, 0.230759]],
  [4500, [1.563713, 0.97463, 1.045757, 0.86921, 0.285003, 0.256181]],
  [5000, [1.629977, 1.015945, 1.090096, 0.907126, 0.310211, 0.27884]],
  [5500, [1.718451, 1.071113, 1.149398, 0.957401, 0.338921, 0.304648]],
  [5772, [1.774293, 1.105935, 1.186855, 0.989034, 0.355506, 0.319556]],
  [5780, [1.776, 1.107, 1.188, 0.99, 0.356, 0.32]],
  [6500, [1.937119, 1.207475, 1.296118, 1.081097, 0.399968, 0.359522]],
  [7200, [2.079656, 1.296364, 1.391755, 1.161784, 0.435629, 0.391578]],
])("insolation of the limits at %d K", (teff, expected) => {
  expect(LIMITS.map((limit) => insolationAtLimit(limit, teff).toFixed(6))).toEqual(
    expected.map((s) => s.toFixed(6)),
  );
});

describe("habitable zone", () => {
  test("the Sun: 0.75, 0.95, 1.68 and 1.77 au, as printed in Kopparapu et al. 2014", () => {
    const four = ["recent-venus", "runaway-greenhouse", "maximum-greenhouse", "early-mars"] as const;
    const distances = distancesOf(four, 1, 5780);
    expect(distances.map((d) => d.toFixed(2))).toEqual(["0.75", "0.95", "1.68", "1.77"]);
    expect(distances.map((d) => d.toFixed(4))).toEqual(["0.7504", "0.9504", "1.6760", "1.7678"]);
  });

  test("a heavier planet keeps its water nearer to the star, a lighter one loses it farther out", () => {
    const masses = ["runaway-greenhouse-5-earths", "runaway-greenhouse-0.1-earths"] as const;
    // Computed; the paper speaks of an inner edge about 7 % closer for 5 than for 0.1 to 1 Earth masses (from memory).
    expect(distancesOf(masses, 1, 5780).map((d) => d.toFixed(4))).toEqual(["0.9175", "1.0050"]);
  });

  test("the Sun by the model of 2013: 0.99 au for the moist greenhouse", () => {
    // Kopparapu et al. 2013, abstract: 0.99 and 1.70 au; the erratum moves the outer edge to a computed 1.6886.
    const moist = distanceAtInsolation(1, insolationAtEarlierLimit("moist-greenhouse", 5780));
    expect(moist.toFixed(2)).toBe("0.99");
    expect(moist).toBeCloseTo(0.9928, 4);
    expect(distanceAtInsolation(1, insolationAtEarlierLimit("maximum-greenhouse", 5780))).toBeCloseTo(
      1.6886,
      4,
    );
  });

  /** Computed from the erratum of Kopparapu et al. 2013. */
  test.each([
    [2600, 0.844282],
    [3800, 0.88344],
    [5000, 0.953728],
    [5780, 1.0146],
    [7200, 1.119521],
  ])("moist greenhouse at %d K", (teff, expected) => {
    expect(insolationAtEarlierLimit("moist-greenhouse", teff)).toBeCloseTo(expected, 6);
  });

  /**
   * Published: Proxima Centauri 0.0423 to 0.0816 au (Anglada-Escudé et al. 2016, Nature 536, 437, Table 1; the range from
   * memory), Kepler-186 0.22 to 0.40 au (Quintana et al. 2014, from memory). Computed: with the limits of 2013 and of 2014.
   */
  test.each([
    ["Proxima Centauri", 0.00155, 3050, [0.0423, 0.0816], [0.041, 0.0813]],
    ["Kepler-186", 0.0412, 3788, [0.2162, 0.4026], [0.2094, 0.4009]],
  ])("%s", (_, light, teff, earlier, today) => {
    const edges = ["runaway-greenhouse", "maximum-greenhouse"] as const;
    const found = edges.map((limit) => distanceAtInsolation(light, insolationAtEarlierLimit(limit, teff)));
    expect(found.map((d) => d.toFixed(4))).toEqual(earlier.map((d) => d.toFixed(4)));
    expect(distancesOf(edges, light, teff).map((d) => d.toFixed(4))).toEqual(today.map((d) => d.toFixed(4)));
  });

  test("early Mars and maximum greenhouse are one curve, scaled by 0.8988", () => {
    for (const teff of [2600, 3600, 4600, 5600, 6600, 7200]) {
      const ratio = insolationAtLimit("early-mars", teff) / insolationAtLimit("maximum-greenhouse", teff);
      expect(Math.abs(ratio - 0.8988)).toBeLessThan(2e-4);
    }
  });

  test("outside 2600 to 7200 K nothing is given, and nothing is clamped", () => {
    const outside = fc.oneof(fc.double({ min: 1, max: 2599.999 }), fc.double({ min: 7200.001, max: 50_000 }));
    fc.assert(
      fc.property(outside, fc.constantFrom(...LIMITS), (teff, limit) => {
        expect(insolationAtLimit(limit, teff)).toBeNaN();
      }),
    );
    fc.assert(
      fc.property(outside, fc.constantFrom(...EARLIER_LIMITS), (teff, limit) => {
        expect(insolationAtEarlierLimit(limit, teff)).toBeNaN();
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
