import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { coveredLight, transitLossPpm } from "#shared/science/light-curve.ts";
import { fullTransitDuration, impactParameter, transitDuration } from "#shared/science/transit.ts";
import { boxDepthPpm } from "#shared/science/transit-depth.ts";

const SUN = { u1: 0.3508, u2: 0.2223 };
const loss = (hours: number, k = 0.01, b = 0) => transitLossPpm(hours, 240, 20, k, b, SUN);

/** Area of the overlap of two discs, of radius 1 and k at distance z, over the area of the first. */
const overlap = (k: number, z: number): number => {
  if (z >= 1 + k) return 0;
  if (z <= 1 - k) return k * k;
  if (z <= k - 1) return 1;
  const star = Math.acos((1 - k * k + z * z) / (2 * z));
  const planet = Math.acos((k * k + z * z - 1) / (2 * z * k));
  const kite = 0.5 * Math.sqrt(Math.max(0, 4 * z * z - (1 + z * z - k * k) ** 2));
  return (k * k * planet + star - kite) / Math.PI;
};

describe("light behind the planet", () => {
  /** Computed by two-dimensional integration. */
  test.each([
    [0.01, 0, 118.2],
    [0.1, 0, 11809.7],
    [0.1, 0.5, 11198.7],
    [0.1, 0.7, 10383.9],
    [0.1, 0.9, 8450.6],
  ])("k = %d at b = %d: %d ppm", (k, b, exact) => {
    expect(1e6 * coveredLight(k, b, SUN.u1, SUN.u2)).toBeCloseTo(exact, 1);
    expect(loss(0, k, b)).toBeCloseTo(exact, 1);
  });

  test("without limb darkening it is the overlap of two discs, across the limb too", () => {
    const inputs = [
      fc.double({ min: 0.005, max: 1.4, noNaN: true }),
      fc.double({ min: 0.001, max: 2.5, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (k, z) => {
        expect(coveredLight(k, z, 0, 0)).toBeCloseTo(overlap(k, z), 5);
      }),
    );
  });

  test("a disc as large as the star hides it all; none touches it from outside", () => {
    expect(coveredLight(1, 0, SUN.u1, SUN.u2)).toBeCloseTo(1, 12);
    expect(coveredLight(2, 0.5, SUN.u1, SUN.u2)).toBeCloseTo(1, 12);
    expect(coveredLight(0.1, 1.1, SUN.u1, SUN.u2)).toBe(0);
    expect(coveredLight(0.1, 1.0999, SUN.u1, SUN.u2)).toBeGreaterThan(0);
  });

  test("it shrinks steadily as the planet leaves, without a step at the limb", () => {
    for (let z = 0; z < 1.1; z += 0.005) {
      const [here, next] = [
        coveredLight(0.1, z, SUN.u1, SUN.u2),
        coveredLight(0.1, z + 0.005, SUN.u1, SUN.u2),
      ];
      expect(next).toBeLessThanOrEqual(here);
      expect(here - next).toBeLessThan(7e-4);
    }
  });
});

describe("light curve", () => {
  test("begins and ends with the transit, is even, and deepest at the middle", () => {
    const half = transitDuration(240, 20, 0.1, 0.3) / 2;
    expect(loss(half * 1.001, 0.1, 0.3)).toBe(0);
    expect(loss(half * 0.99, 0.1, 0.3)).toBeGreaterThan(0);
    expect(loss(-1, 0.1, 0.3)).toBeCloseTo(loss(1, 0.1, 0.3), 9);
    for (const hours of [0.3, 0.7, 1.1, 1.5])
      expect(loss(hours, 0.1, 0.3)).toBeLessThan(loss(hours - 0.3, 0.1, 0.3));
  });

  test("no light is lost while the planet passes behind the star", () => {
    expect(loss(120, 0.1)).toBe(0);
    expect(transitLossPpm(120, 240, 20, 0.1, 0, SUN, 0.3, 40)).toBe(0);
  });

  test("its mean from second to third contact is what a box sees of a small planet", () => {
    const half = fullTransitDuration(240, 20, 0.005, 0.3) / 2;
    let sum = 0;
    for (let i = 0; i < 1000; i++) sum += loss(((i + 0.5) / 1000) * half, 0.005, 0.3) / 1000;
    expect(sum / boxDepthPpm(0.005, SUN, 0.3)).toBeCloseTo(1, 2);
  });

  test("a grazing transit has its light curve", () => {
    const half = transitDuration(240, 20, 0.1, 1.05) / 2;
    expect(loss(0, 0.1, 1.05)).toBeGreaterThan(0);
    expect(loss(0, 0.1, 1.05)).toBeLessThan(loss(0, 0.1, 0.95));
    expect(loss(half * 0.98, 0.1, 1.05)).toBeGreaterThan(0);
    expect(loss(half * 1.02, 0.1, 1.05)).toBe(0);
    expect(loss(0, 0.1, 1.11)).toBe(0);
  });

  /** Computed as roots of the separation, to 25 digits: e, ω, T14, h, for a = 20, k = 0.1, i = 89°, 10 days. */
  test.each([
    [0.3, 90, 3.008795],
    [0.3, -90, 5.219042],
    [0.3, 0, 3.840102],
  ])("e = %d, ω = %d° lasts %d h", (e, omega, duration) => {
    const b = impactParameter(20, 89, e, omega);
    const at = (hours: number): number => transitLossPpm(hours, 240, 20, 0.1, b, SUN, e, omega);
    const contact = (sign: number): number => {
      let [inside, outside] = [0, sign * duration];
      for (let i = 0; i < 50; i++) {
        const middle = (inside + outside) / 2;
        if (at(middle) > 0) inside = middle;
        else outside = middle;
      }
      return inside;
    };
    expect(contact(1) - contact(-1)).toBeCloseTo(duration, 5);
  });

  test("e towards 0 is the circular orbit, whatever ω", () => {
    const inputs = [
      fc.double({ min: -3, max: 3, noNaN: true }),
      fc.double({ min: -180, max: 180, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (hours, omega) => {
        expect(transitLossPpm(hours, 240, 20, 0.1, 0.3, SUN, 1e-12, omega)).toBeCloseTo(
          loss(hours, 0.1, 0.3),
          4,
        );
      }),
    );
  });

  test("an orbit that meets the star has none", () => {
    expect(transitLossPpm(0, 240, 1, 0.1, 0, SUN)).toBeNaN();
    expect(transitLossPpm(0, 240, 1.5, 0.1, 0, SUN, 0.4, 90)).toBeNaN();
    expect(transitLossPpm(0, 240, 20, 0.1, 0, SUN, 1, 90)).toBeNaN();
  });
});
