import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  AU_PER_SOLAR_RADIUS,
  EARTH_RADII_PER_SOLAR,
  GAUSSIAN_YEAR_D,
  JUPITER_RADIUS_M,
  SOLAR_RADIUS_M,
} from "#shared/science/constants.ts";
import { scaledAxisFromDensity } from "#shared/science/orbit.ts";
import {
  approximateDuration,
  centralDuration,
  characteristicDuration,
  characteristicDurationHours,
  depthPpm,
  fullTransitDuration,
  impactFromDurations,
  impactParameter,
  inclinationFromImpact,
  ingressDuration,
  MEAN_CHORD,
  MEAN_ROOT_CHORD,
  MEDIAN_CHORD,
  meanDuration,
  meanTransitProbability,
  scaledAxisFromDuration,
  transitDuration,
  transitProbability,
} from "#shared/science/transit.ts";

const HOURS_PER_YEAR = 24 * GAUSSIAN_YEAR_D;
const EARTH = 1 / EARTH_RADII_PER_SOLAR;

describe("Earth before the Sun", () => {
  test("probability 0.465047 %, depth 84.0502 ppm", () => {
    expect(100 * transitProbability(AU_PER_SOLAR_RADIUS)).toBeCloseTo(0.465047, 6);
    expect(100 * transitProbability(AU_PER_SOLAR_RADIUS, EARTH)).toBeCloseTo(0.46931, 6);
    expect(100 * transitProbability(AU_PER_SOLAR_RADIUS, -EARTH)).toBeCloseTo(0.460783, 6);
    expect(depthPpm(EARTH)).toBeCloseTo(84.0502, 4);
  });

  test("a central transit of 13.09548 h, 12.97646 h for a point, and their mean over impact parameters", () => {
    expect(transitDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS, EARTH, 0)).toBeCloseTo(13.09548, 4);
    expect(centralDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS)).toBeCloseTo(12.97646, 3);
    expect(MEAN_CHORD * centralDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS)).toBeCloseTo(10.1917, 3);
  });
});

test("a giant planet in 3.5 days", () => {
  const [a, k] = [9.701, 0.102762685];
  expect(100 * transitProbability(a)).toBeCloseTo(10.3082, 4);
  expect(100 * transitProbability(a, k)).toBeCloseTo(11.3675, 4);
  expect(depthPpm(k)).toBeCloseTo(10560.17, 1);
  expect(transitDuration(84, a, k, 0)).toBeCloseTo(3.046034, 5);
  expect(fullTransitDuration(84, a, k, 0)).toBeCloseTo(2.476517, 5);
  expect(transitDuration(84, a, k, 0.5)).toBeCloseTo(2.717354, 5);
});

test("i = 89°, a = 20, k = 0.1, 10 days: 3.98696 h and 3.17007 h", () => {
  const b = 20 * Math.cos((89 * Math.PI) / 180);
  expect(transitDuration(240, 20, 0.1, b)).toBeCloseTo(3.98696, 4);
  expect(fullTransitDuration(240, 20, 0.1, b)).toBeCloseTo(3.17007, 4);
});

/** Gillon et al. 2017, Nature 542, 456, Table 1: period, inclination, depth, a/R★, computed impact parameter, computed and printed minutes. */
test.each([
  ["b", 1.51087081, 89.65, 0.7266, 20.5, 0.1252, 36.434, 36.4],
  ["c", 2.4218233, 89.67, 0.687, 28.08, 0.1617, 42.34, 42.37],
  ["d", 4.04961, 89.75, 0.367, 39.55, 0.1726, 49.119, 49.13],
  ["e", 6.099615, 89.86, 0.519, 51.97, 0.127, 57.271, 57.21],
  ["f", 9.20669, 89.68, 0.673, 68.4, 0.382, 62.462, 62.6],
  ["g", 12.35294, 89.71, 0.782, 83.2, 0.4211, 68.307, 68.4],
])(
  "the published duration of TRAPPIST-1 %s",
  (_, period, inclination, depth, a, impact, computed, printed) => {
    const b = impactParameter(a, inclination);
    expect(b).toBeCloseTo(impact, 4);
    const minutes = transitDuration(1440 * period, a, Math.sqrt(depth / 100), b);
    expect(minutes).toBeCloseTo(computed, 2);
    expect(Math.abs(minutes / printed - 1)).toBeLessThan(0.003);
  },
);

/**
 * Published transits of single planets; the durations from memory. HD 209458 b: a/R★ of Stassun, Collins & Gaudi 2017, AJ
 * 153, 136, and of Torres, Winn & Holman 2008 (from memory). GJ 1214 b: Cloutier 2021, radius of the star from memory.
 */
test.each([
  ["HD 209458 b, a/R★ 8.81", 3.52474859, 86.71, 0.12086, 8.81, 3.0692, 3.07],
  ["HD 209458 b, a/R★ 8.76", 3.52474859, 86.71, 0.12086, 8.76, 3.0912, 3.07],
  [
    "GJ 1214 b",
    1.580404571,
    88.7,
    2.742 / (0.215 * EARTH_RADII_PER_SOLAR),
    (0.0149 / 0.215) * AU_PER_SOLAR_RADIUS,
    51.8 / 60,
    52.7 / 60,
  ],
])("the duration of %s", (_, period, inclination, k, a, computed, printed) => {
  const hours = transitDuration(24 * period, a, k, impactParameter(a, inclination));
  expect(hours).toBeCloseTo(computed, 3);
  expect(Math.abs(hours / printed - 1)).toBeLessThan(0.02);
});

test("HD 209458 b with a/R★ 8.76: b = 0.5027, T23 = 2.2231 h; GJ 1214 b: T23 = 39.69 min (computed)", () => {
  const b = impactParameter(8.76, 86.71);
  expect(b).toBeCloseTo(0.5027, 4);
  expect(fullTransitDuration(24 * 3.52474859, 8.76, 0.12086, b)).toBeCloseTo(2.2231, 4);
  const a = (0.0149 / 0.215) * AU_PER_SOLAR_RADIUS;
  const k = 2.742 / (0.215 * EARTH_RADII_PER_SOLAR);
  expect(fullTransitDuration(1440 * 1.580404571, a, k, impactParameter(a, 88.7))).toBeCloseTo(39.69, 2);
});

test("TRAPPIST-1 e from its axis in au and its radius: a/R★ 51.773, 57.486 min (computed)", () => {
  const a = (0.02817 / 0.117) * AU_PER_SOLAR_RADIUS;
  expect(a).toBeCloseTo(51.773, 3);
  expect(transitDuration(1440 * 6.099615, a, 0.07193, impactParameter(a, 89.86))).toBeCloseTo(57.486, 3);
});

describe("eccentric orbits", () => {
  /** Computed: e, ω, i, a, k, P in days, b, T14 and T23 in hours, and both by integration of the orbit. */
  test.each([
    [0.3, 90, 89, 20, 0.1, 10, 0.2443, 3.00808, 2.42901, 3.00878, 2.42933],
    [0.3, -90, 89, 20, 0.1, 10, 0.4538, 5.21904, 4.04747, 5.21902, 4.04747],
    [0.3, 0, 89, 20, 0.1, 10, 0.3176, 3.83978, 3.06975, 3.84005, 3.06989],
    [0, 0, 89, 20, 0.1, 10, 0.349, 3.98696, 3.17007, 3.98696, 3.17007],
  ])(
    "e = %d, ω = %d°, i = %d°",
    (e, omega, inclination, a, k, days, b, outer, full, outerExact, fullExact) => {
      const impact = impactParameter(a, inclination, e, omega);
      expect(impact).toBeCloseTo(b, 4);
      const t14 = transitDuration(24 * days, a, k, impact, e, omega);
      const t23 = fullTransitDuration(24 * days, a, k, impact, e, omega);
      expect(t14).toBeCloseTo(outer, 5);
      expect(t23).toBeCloseTo(full, 5);
      expect(Math.abs(t14 / outerExact - 1)).toBeLessThan(3e-4);
      expect(Math.abs(t23 / fullExact - 1)).toBeLessThan(3e-4);
    },
  );

  test("e = 0.6, ω = 120°, 100 days: b = 0.1985, 4.47105 h (by integration 4.47122)", () => {
    const b = impactParameter(90, 89.7, 0.6, 120);
    expect(b).toBeCloseTo(0.1985, 4);
    const hours = transitDuration(2400, 90, 0.02, b, 0.6, 120);
    expect(hours).toBeCloseTo(4.47105, 5);
    expect(Math.abs(hours / 4.47122 - 1)).toBeLessThan(1e-4);
  });

  /** Computed; by 4 million random orbits 0.10997, 0.15723, 0.08477 and 0.14664. */
  test("probabilities at a = 10, k = 0.1", () => {
    expect(transitProbability(10, 0.1)).toBeCloseTo(0.11, 6);
    expect(transitProbability(10, 0.1, 0.3, 90)).toBeCloseTo(0.157143, 6);
    expect(transitProbability(10, 0.1, 0.3, -90)).toBeCloseTo(0.084615, 6);
    expect(transitProbability(10, 0.1, 0.5, 0)).toBeCloseTo(0.146667, 6);
  });

  test("the mean probability is that over ω", () => {
    let sum = 0;
    for (let omega = 0.5; omega < 360; omega++) sum += transitProbability(30, 0.05, 0.4, omega) / 360;
    expect(meanTransitProbability(30, 0.4, 0.05)).toBeCloseTo(sum, 10);
    expect(meanTransitProbability(30, 0)).toBe(transitProbability(30));
  });

  test("the mean duration over ω, weighted by the probability, is √(1 − e²) of the circular one", () => {
    let [sum, weight] = [0, 0];
    for (let omega = 0.5; omega < 360; omega++) {
      const p = transitProbability(100, 0, 0.4, omega);
      sum += p * transitDuration(100, 100, 0, 0, 0.4, omega);
      weight += p;
    }
    expect(sum / weight / centralDuration(100, 100)).toBeCloseTo(Math.sqrt(1 - 0.16), 4);
  });

  test("nothing where the orbit meets the star or is open", () => {
    for (const e of [0.5, 1, -0.1, Number.NaN]) {
      expect(transitProbability(1.9, 0, e, 0)).toBeNaN();
      expect(meanTransitProbability(1.9, e)).toBeNaN();
      expect(transitDuration(10, 1.9, 0.1, 0, e, 0)).toBeNaN();
      expect(fullTransitDuration(10, 1.9, 0.1, 0, e, 0)).toBeNaN();
    }
    expect(transitProbability(1.02, 0.1)).toBe(1);
    expect(meanTransitProbability(1.3, 0.2, 0.3)).toBe(1);
  });

  const orbits = [
    fc.double({ min: 5, max: 300, noNaN: true }),
    fc.double({ min: 0, max: 0.6, noNaN: true }),
    fc.double({ min: -180, max: 180, noNaN: true }),
    fc.double({ min: 0, max: 1, noNaN: true }),
  ] as const;

  test("impact parameter and inclination invert each other", () => {
    fc.assert(
      fc.property(...orbits, (a, e, omega, b) => {
        expect(impactParameter(a, inclinationFromImpact(b, a, e, omega), e, omega)).toBeCloseTo(b, 10);
      }),
    );
    expect(inclinationFromImpact(0, 20)).toBe(90);
    expect(inclinationFromImpact(21, 20)).toBeNaN();
  });

  test("ω and 180° − ω are alike; e towards 0 is the circular orbit", () => {
    fc.assert(
      fc.property(...orbits, (a, e, omega, b) => {
        const here = transitDuration(100, a, 0.1, b, e, omega);
        expect(transitDuration(100, a, 0.1, b, e, 180 - omega) / here).toBeCloseTo(1, 10);
        expect(transitDuration(100, a, 0.1, b, 1e-12, omega)).toBeCloseTo(transitDuration(100, a, 0.1, b), 8);
      }),
    );
  });
});

describe("characteristic durations", () => {
  /** Computed: days, density, hours, and hours with the constant rounded to 13. */
  test.each([
    [3, 1, 2.6182, 2.6229],
    [10, 5, 2.2872, 2.2913],
    [1, 50, 0.49276, 0.49365],
  ])("%d days, %d solar densities: %d h", (days, density, hours, rounded) => {
    expect(characteristicDurationHours(days, density)).toBeCloseTo(hours, 4);
    expect(13 * Math.cbrt(days / 365.25 / density)).toBeCloseTo(rounded, 3);
  });

  test("for a small planet far out they are the durations", () => {
    const t0 = characteristicDuration(1000, 200);
    expect(t0 / centralDuration(1000, 200)).toBeCloseTo(1, 4);
    const [k, b] = [0.01, 0.4];
    const [outer, full] = [transitDuration(1000, 200, k, b), fullTransitDuration(1000, 200, k, b)];
    expect(approximateDuration(t0, b) / ((outer + full) / 2)).toBeCloseTo(1, 3);
    expect(ingressDuration(t0, k, b) / ((outer - full) / 2)).toBeCloseTo(1, 3);
    expect(ingressDuration(t0, k, 1)).toBeNaN();
    expect(approximateDuration(t0, 1.1)).toBeNaN();
    expect(characteristicDuration(10, 1)).toBeNaN();
  });

  test("the mean duration is about P / 4a, shorter on eccentric orbits", () => {
    expect(meanDuration(HOURS_PER_YEAR, AU_PER_SOLAR_RADIUS)).toBeCloseTo(10.1917, 4);
    expect(meanDuration(1000, 200) / (1000 / 800)).toBeCloseTo(1, 4);
    expect(meanDuration(1000, 200, 0.6) / meanDuration(1000, 200)).toBeCloseTo(0.8, 12);
    expect(meanDuration(1000, 2, 0.6)).toBeNaN();
  });

  test("means over impact parameters: π/4, √3/2 in the median, 0.874017 for the root (computed)", () => {
    const n = 20_000;
    let [chord, root] = [0, 0];
    for (let i = 0; i < n; i++) {
      const c = Math.sqrt(1 - ((i + 0.5) / n) ** 2);
      chord += c / n;
      root += Math.sqrt(c) / n;
    }
    expect(MEAN_CHORD).toBeCloseTo(chord, 5);
    expect(MEAN_ROOT_CHORD).toBeCloseTo(root, 5);
    expect(MEAN_ROOT_CHORD).toBeCloseTo(0.87402, 5);
    expect(MEDIAN_CHORD).toBe(Math.sqrt(1 - 0.5 ** 2));
  });
});

describe("inverses of the duration", () => {
  const inputs = [
    fc.double({ min: 2, max: 500, noNaN: true }),
    fc.double({ min: 0.01, max: 0.3, noNaN: true }),
    fc.double({ min: 0.05, max: 0.65, noNaN: true }),
  ] as const;

  test("axis and impact parameter are found again", () => {
    fc.assert(
      fc.property(...inputs, (a, k, b) => {
        const outer = transitDuration(100, a, k, b);
        const full = fullTransitDuration(100, a, k, b);
        expect(scaledAxisFromDuration(100, outer, k, b) / a).toBeCloseTo(1, 8);
        expect(impactFromDurations(100, outer, full, k) ** 2).toBeCloseTo(b * b, 5);
      }),
    );
  });

  test("no axis for a duration of nothing or of half the period, none for a planet that misses", () => {
    for (const duration of [0, -1, 50, Number.NaN])
      expect(scaledAxisFromDuration(100, duration, 0.1, 0)).toBeNaN();
    expect(scaledAxisFromDuration(100, 3, 0.1, 1.2)).toBeNaN();
    expect(impactFromDurations(100, 3, 3, 0.1)).toBeNaN();
    expect(impactFromDurations(100, 3, 0, 0.1)).toBeNaN();
  });
});

/** Common practice, no source. */
describe("facts of the trade", () => {
  test("a 3.5-day orbit around a Sun transits with about 10 %, an Earth at one insolation with about 0.5 %", () => {
    expect(100 * transitProbability(scaledAxisFromDensity(3.5, 1))).toBeCloseTo(10, 0);
    expect((100 * transitProbability(AU_PER_SOLAR_RADIUS)).toFixed(1)).toBe("0.5");
  });

  test("a Jupiter, a Neptune and an Earth on the Sun: about 1 %, 0.1 % and 84 ppm; a Jupiter on an early M dwarf 3 %", () => {
    const jupiter = JUPITER_RADIUS_M / SOLAR_RADIUS_M;
    expect((depthPpm(jupiter) / 1e4).toFixed(0)).toBe("1");
    expect((depthPpm(3.9 * EARTH) / 1e4).toFixed(1)).toBe("0.1");
    expect(depthPpm(EARTH).toFixed(0)).toBe("84");
    expect((depthPpm(jupiter / 0.6) / 1e4).toFixed(0)).toBe("3");
  });
});

describe("geometry", () => {
  test("a planet that misses lasts 0, one that grazes has no full transit, an orbit inside the star has neither", () => {
    expect(transitDuration(10, 20, 0.1, 1.2)).toBe(0);
    expect(fullTransitDuration(10, 20, 0.1, 0.95)).toBe(0);
    expect(transitDuration(10, 20, 0.1, 0.95)).toBeGreaterThan(0);
    expect(transitDuration(10, 0.9, 0.1, 0)).toBeNaN();
    expect(fullTransitDuration(10, 0.9, 0.1, 0)).toBeNaN();
    expect(transitProbability(1)).toBeNaN();
    expect(transitDuration(Number.NaN, 20, 0.1, 0)).toBeNaN();
    expect(transitDuration(10, 20, Number.NaN, 0)).toBeNaN();
  });

  test("durations shrink with the impact parameter; the full one is never the longer", () => {
    const inputs = [
      fc.double({ min: 2, max: 500, noNaN: true }),
      fc.double({ min: 0.001, max: 0.3, noNaN: true }),
      fc.double({ min: 0, max: 0.99, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (a, k, b) => {
        const outer = transitDuration(100, a, k, b);
        expect(fullTransitDuration(100, a, k, b)).toBeLessThanOrEqual(outer);
        expect(transitDuration(100, a, k, Math.min(1, b + 0.01))).toBeLessThanOrEqual(outer);
        expect(transitProbability(a)).toBeLessThanOrEqual(1);
      }),
    );
  });
});
