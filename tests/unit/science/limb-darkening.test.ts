import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  COOL_DWARF_DARKENING,
  chordBrightness,
  limbDarkening,
  linearDarkening,
  meanBrightness,
  quadraticDarkening,
  relativeBrightness,
  SUNLIKE_DARKENING,
} from "#shared/science/limb-darkening.ts";
import { boxDepthPpm, midTransitDepthPpm } from "#shared/science/transit-depth.ts";

const SUN = { u1: 0.3508, u2: 0.2223 };

const coefficients = (teff: number, logg?: number) => {
  const found = limbDarkening(teff, logg);
  if (!found) throw new Error(`No coefficients at ${teff} K.`);
  return found;
};

describe("limb darkening in a broad red band", () => {
  /**
   * Claret 2018, A&A 618, A20, table 5: temperature, u1 and u2 at log g 4.5 and at 5.0; then computed from the pair of 4.5 the
   * boost of a depth at b = 0 and 0.5, and the mean along the central chord.
   */
  test.each([
    [2300, 0.5076, 0.3676, 0.5221, 0.3406, 1.2995, 1.2025, 1.1121],
    [2500, 0.4131, 0.4608, 0.4703, 0.4207, 1.2731, 1.1921, 1.104],
    [2700, 0.2626, 0.5381, 0.2975, 0.5494, 1.2154, 1.1609, 1.0842],
    [2900, 0.1863, 0.5198, 0.1998, 0.5387, 1.1747, 1.1344, 1.0692],
    [3000, 0.1719, 0.4977, Number.NaN, Number.NaN, 1.1631, 1.126, 1.0647],
    [3200, 0.167, 0.4609, 0.1553, 0.4742, 1.1527, 1.1174, 1.0605],
    [3400, 0.1862, 0.4287, 0.159, 0.44, 1.1541, 1.1164, 1.0605],
    [3500, 0.2007, 0.4094, 0.1642, 0.4259, 1.1562, 1.1167, 1.0611],
    [3700, 0.2348, 0.375, 0.1769, 0.4062, 1.1638, 1.1194, 1.0633],
    [3800, 0.2604, 0.3569, 0.1859, 0.3961, 1.1713, 1.123, 1.0658],
    [4000, 0.3416, 0.2948, 0.2283, 0.3639, 1.1947, 1.1337, 1.0734],
    [4300, 0.4844, 0.1877, 0.3722, 0.2671, 1.2388, 1.1542, 1.0877],
    [4500, 0.5047, 0.1564, 0.46, 0.1971, 1.2412, 1.1537, 1.0881],
    [4800, 0.4652, 0.1789, 0.4708, 0.1725, 1.2268, 1.1464, 1.0833],
    [5100, 0.4258, 0.1936, 0.4291, 0.1908, 1.2109, 1.1377, 1.0778],
    [5300, 0.405, 0.2004, 0.4065, 0.1996, 1.2025, 1.1329, 1.0749],
    [5500, 0.3876, 0.2036, 0.3884, 0.2021, 1.1949, 1.1285, 1.0722],
    [5800, 0.3508, 0.2223, 0.3449, 0.2258, 1.182, 1.1217, 1.0678],
    [6000, 0.3362, 0.2251, 0.3289, 0.2288, 1.1759, 1.1182, 1.0657],
    [6300, 0.3189, 0.2278, 0.3097, 0.2299, 1.1686, 1.1139, 1.0631],
    [6500, 0.3092, 0.2271, 0.2989, 0.231, 1.164, 1.1111, 1.0614],
    [6800, 0.2942, 0.2287, 0.2862, 0.2301, 1.1577, 1.1073, 1.0592],
    [7000, 0.2858, 0.229, 0.2787, 0.2293, 1.154, 1.1051, 1.0579],
    [7200, 0.2765, 0.2297, 0.2707, 0.2288, 1.15, 1.1027, 1.0565],
  ])("%d K", (teff, u1, u2, u1Dense, u2Dense, centre, half, chord) => {
    const pair = coefficients(teff);
    expect(pair.u1).toBeCloseTo(u1, 12);
    expect(pair.u2).toBeCloseTo(u2, 12);
    expect(relativeBrightness(pair, 0)).toBeCloseTo(centre, 4);
    expect(relativeBrightness(pair, 0.5)).toBeCloseTo(half, 4);
    expect(chordBrightness(u1, u2, 0)).toBeCloseTo(chord, 4);
    if (Number.isNaN(u1Dense)) return;
    expect(linearDarkening(teff, 5)).toBeCloseTo(u1Dense, 12);
    expect(quadraticDarkening(teff, 5)).toBeCloseTo(u2Dense, 12);
  });

  test("is linear between temperatures and between both log g", () => {
    expect(coefficients(5900).u1).toBeCloseTo((0.3508 + 0.3362) / 2, 12);
    expect(coefficients(5800, 4.75).u1).toBeCloseTo((0.3508 + 0.3449) / 2, 12);
    expect(coefficients(5900, 4.75).u2).toBeCloseTo((0.2223 + 0.2251 + 0.2258 + 0.2288) / 4, 12);
    expect(coefficients(5000).u1).toBeCloseTo(0.4652 + (2 / 3) * (0.4258 - 0.4652), 12);
  });

  test("the column of log g 5.0 lacks 3000 K, and is linear from 2900 to 3200 K", () => {
    expect(linearDarkening(3000, 5)).toBeCloseTo(0.1998 + (0.1553 - 0.1998) / 3, 12);
    expect(quadraticDarkening(3100, 5)).toBeCloseTo(0.5387 + (2 / 3) * (0.4742 - 0.5387), 12);
    expect(linearDarkening(3000, 4.5)).toBeCloseTo(0.1719, 12);
  });

  test("ends with the table, in temperature and in log g", () => {
    for (const teff of [2299, 7201, Number.NaN]) expect(limbDarkening(teff)).toBeNull();
    for (const logg of [4.49, 5.01, Number.NaN]) {
      expect(limbDarkening(5000, logg)).toBeNull();
      expect(linearDarkening(5000, logg)).toBeNaN();
      expect(quadraticDarkening(5000, logg)).toBeNaN();
    }
    expect(limbDarkening(2300, 4.5)).not.toBeNull();
    expect(limbDarkening(7200, 5)).not.toBeNull();
  });

  test("one pair for all serves within 2 % of the boost (computed: 1.18 and 1.156)", () => {
    expect(relativeBrightness(SUNLIKE_DARKENING, 0)).toBeCloseTo(1.18, 2);
    expect(relativeBrightness(COOL_DWARF_DARKENING, 0)).toBeCloseTo(1.156, 2);
  });

  test("the least boost lies near 3300 K, the greatest near 4400 K", () => {
    const boosts = Array.from({ length: 25 }, (_, i) => 2700 + 100 * i).map(
      (teff) => [teff, relativeBrightness(coefficients(teff), 0)] as const,
    );
    const hottest = boosts.filter(([teff]) => teff >= 3000 && teff <= 5000);
    expect(Math.abs(3300 - (hottest.toSorted((a, b) => a[1] - b[1])[0]?.[0] ?? 0))).toBeLessThanOrEqual(100);
    expect(Math.abs(4400 - (hottest.toSorted((a, b) => b[1] - a[1])[0]?.[0] ?? 0))).toBeLessThanOrEqual(100);
  });
});

describe("depths of small planets", () => {
  /** Computed: k, b, the small-planet form, and the exact depth by two-dimensional integration. */
  test.each([
    [0.01, 0, 118.201, 118.2, 1e-4],
    [0.1, 0, 11820.1, 11809.7, 1e-3],
    [0.1, 0.5, 11217.4, 11198.7, 2e-3],
    [0.1, 0.7, 10420.1, 10383.9, 4e-3],
    [0.1, 0.9, 8644.9, 8450.6, 0.0231],
  ])("k = %d, b = %d: %d ppm (exact %d)", (k, b, small, exact, tolerance) => {
    const depth = midTransitDepthPpm(k, SUN, b);
    expect(Math.abs(depth - small)).toBeLessThan(0.06);
    expect(Math.abs(depth / exact - 1)).toBeLessThan(tolerance);
  });

  test("the mean along a chord is that of the brightness, at every b", () => {
    const inputs = [
      fc.double({ min: 0, max: 0.99, noNaN: true }),
      fc.constantFrom(2300, 4300, 5800),
    ] as const;
    fc.assert(
      fc.property(...inputs, (b, teff) => {
        const pair = coefficients(teff);
        const n = 2000;
        let sum = 0;
        for (let i = 0; i < n; i++) {
          const x = (Math.sqrt(1 - b * b) * (i + 0.5)) / n;
          sum += relativeBrightness(pair, Math.hypot(x, b)) / n;
        }
        expect(chordBrightness(pair.u1, pair.u2, b)).toBeCloseTo(sum, 4);
      }),
      { numRuns: 30 },
    );
    expect(chordBrightness(0.3, 0.2, 1.01)).toBeNaN();
  });

  /** Burke et al. 2015, ApJ 809, 8, supplement: mean depth over k² at k = 0 for linear limb darkening; 1.08905 computed. */
  test.each([
    [0.5, 1.0696],
    [0.6, 1.0874],
    [0.7, 1.1068],
  ])("with u = %d the mean over impact parameters is %d", (u, published) => {
    expect(Math.abs(chordBrightness(u, 0, 0) - published)).toBeLessThan(0.003);
    if (u === 0.6) expect(chordBrightness(u, 0, 0)).toBeCloseTo(1.08905, 5);
  });

  test("a disc without limb darkening is evenly bright; the disc's own mean is 1", () => {
    const none = { u1: 0, u2: 0 };
    for (const b of [0, 0.4, 0.8]) {
      expect(midTransitDepthPpm(0.1, none, b)).toBeCloseTo(1e4, 8);
      expect(boxDepthPpm(0.1, none, b)).toBeCloseTo(1e4, 8);
    }
    let sum = 0;
    for (let i = 0; i < 1000; i++) sum += relativeBrightness(SUN, Math.sqrt((i + 0.5) / 1000)) / 1000;
    expect(sum).toBeCloseTo(1, 4);
    expect(meanBrightness(0.3, 0.6)).toBeCloseTo(0.8, 12);
  });

  test("a transit that grazes has no such depth", () => {
    expect(midTransitDepthPpm(0.1, SUN, 0.91)).toBeNaN();
    expect(boxDepthPpm(0.1, SUN, 0.91)).toBeNaN();
    expect(boxDepthPpm(0, SUN, 0)).toBeNaN();
    expect(boxDepthPpm(0.1, SUN, 0.9)).toBeGreaterThan(0);
  });

  test("a box sees less than mid-transit does, and both lose with b", () => {
    const inside = fc.double({ min: 0, max: 0.85, noNaN: true });
    fc.assert(
      fc.property(inside, (b) => {
        expect(boxDepthPpm(0.1, SUN, b)).toBeLessThan(midTransitDepthPpm(0.1, SUN, b));
        expect(boxDepthPpm(0.1, SUN, b + 0.02)).toBeLessThan(boxDepthPpm(0.1, SUN, b));
        expect(midTransitDepthPpm(0.1, SUN, b + 0.02)).toBeLessThan(midTransitDepthPpm(0.1, SUN, b));
      }),
    );
  });
});
