import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { greatestSunElongation, leastSunElongation, sunBandDays } from "#shared/science/keep-out.ts";
import { latitudes } from "./positions.ts";

const LATITUDES = [0, 10, 30, 45, 60, 80];

describe("days in a band of elongations", () => {
  /** Computed: least elongation, days at ecliptic latitudes 0, 10, 30, 45, 60 and 80. */
  test.each([
    [30, [304.38, 307.56, 365.25, 365.25, 365.25, 365.25]],
    [45, [273.94, 275.75, 293.69, 365.25, 365.25, 365.25]],
    [50, [263.79, 265.3, 279.87, 315.28, 365.25, 365.25]],
    [60, [243.5, 244.54, 254.18, 273.94, 365.25, 365.25]],
    [90, [182.625, 182.625, 182.625, 182.625, 182.625, 182.625]],
  ])("outside an avoidance angle of %d°", (angle, days) => {
    for (const [index, latitude] of LATITUDES.entries()) {
      expect(Math.abs(sunBandDays(latitude, angle, 180) - (days[index] ?? 0))).toBeLessThan(0.006);
      expect(sunBandDays(-latitude, angle, 180)).toBe(sunBandDays(latitude, angle, 180));
    }
  });

  test("within a field of regard from 85° to 135°", () => {
    // Computed.
    const days = [101.46, 122.79, 196.99, 202.99, 243.76, 365.25];
    for (const [index, latitude] of [0, 30, 45, 60, 80, 90].entries())
      expect(Math.abs(sunBandDays(latitude, 85, 135) - (days[index] ?? 0))).toBeLessThan(0.006);
  });

  test("are none where the Sun never is so near or so far", () => {
    expect(sunBandDays(60, 0, 59)).toBe(0);
    expect(sunBandDays(60, 121, 180)).toBe(0);
    expect(sunBandDays(60, 60, 120)).toBe(365.25);
    expect(leastSunElongation(-60)).toBe(60);
    expect(greatestSunElongation(-60)).toBe(120);
  });

  test("add up to the year", () => {
    const elongations = fc.double({ min: 0, max: 180, noNaN: true });
    fc.assert(
      fc.property(latitudes, elongations, (latitude, edge) => {
        const inside = sunBandDays(latitude, 0, edge);
        expect(inside + sunBandDays(latitude, edge, 180)).toBeCloseTo(365.25, 9);
        expect(inside).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  test("are missing for a band or a latitude that is none", () => {
    expect(sunBandDays(0, 100, 90)).toBeNaN();
    expect(sunBandDays(0, -1, 90)).toBeNaN();
    expect(sunBandDays(0, 90, 181)).toBeNaN();
    expect(sunBandDays(91, 0, 180)).toBeNaN();
    expect(sunBandDays(Number.NaN, 0, 180)).toBeNaN();
  });
});
