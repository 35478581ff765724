import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { eclipticToIcrs, icrsToEcliptic } from "#shared/science/frames.ts";
import { sunBandDays } from "#shared/science/keep-out.ts";
import { separation } from "#shared/science/separation.ts";
import { sunIcrs } from "#shared/science/sun.ts";
import { visibilityWindows } from "#shared/science/visibility.ts";
import { latitudes, longitudes, written } from "./positions.ts";

const START = 2_461_041.5;

const elongation = (ra: number, dec: number, date: number): number => {
  const [sunRa = 0, sunDec = 0] = written(2, (target) => sunIcrs(target, date));
  return separation(ra, dec, sunRa, sunDec);
};

const bands = fc
  .tuple(fc.double({ min: 0, max: 180, noNaN: true }), fc.double({ min: 0, max: 180, noNaN: true }))
  .map(([a, b]): [number, number] => [Math.min(a, b), Math.max(a, b)]);

describe("the windows of a field of regard", () => {
  test("hold every date on which the Sun is within the band, and no other", () => {
    fc.assert(
      fc.property(longitudes, latitudes, bands, (ra, dec, [least, most]) => {
        const windows = visibilityWindows(ra, dec, least, most, START, START + 800) ?? [];
        for (let date = START + 0.25; date < START + 800; date += 7.3) {
          const angle = elongation(ra, dec, date);
          // A date at the very edge may fall on either side.
          if (Math.min(Math.abs(angle - least), Math.abs(angle - most)) < 1e-6) continue;
          const isOpen = windows.some(({ start, end }) => date >= start && date <= end);
          expect(isOpen, `on ${date}, at ${angle}`).toBe(angle >= least && angle <= most);
        }
      }),
    );
  });

  test("are in order and do not touch", () => {
    fc.assert(
      fc.property(longitudes, latitudes, bands, (ra, dec, [least, most]) => {
        const windows = visibilityWindows(ra, dec, least, most, START, START + 1500) ?? [];
        for (const [index, { start, end }] of windows.entries()) {
          expect(start).toBeGreaterThanOrEqual(START);
          expect(end).toBeGreaterThan(start);
          expect(end).toBeLessThanOrEqual(START + 1500);
          const next = windows[index + 1];
          if (next) expect(next.start).toBeGreaterThanOrEqual(end);
        }
      }),
    );
  });

  test("make up the days of a year, to the unevenness of the Sun's motion", () => {
    // Common practice, no source: 1 to 2 days for either edge.
    for (const latitude of [0, 30, 60, 80]) {
      const [ra = 0, dec = 0] = written(2, (target) => eclipticToIcrs(target, 77, latitude));
      const windows = visibilityWindows(ra, dec, 85, 135, START, START + 365.25636) ?? [];
      const days = windows.reduce((sum, { start, end }) => sum + end - start, 0);
      expect(Math.abs(days - sunBandDays(latitude, 85, 135))).toBeLessThan(4);
    }
  });

  test("are one, or none, for a star near the pole of the ecliptic", () => {
    const pole = written(2, (target) => eclipticToIcrs(target, 0, 90)) as [number, number];
    expect(visibilityWindows(...pole, 85, 135, START, START + 500)).toEqual([
      { start: START, end: START + 500 },
    ]);
    expect(visibilityWindows(...pole, 100, 135, START, START + 500)).toEqual([]);
  });

  test("are whole where the band reaches the Sun or its opposite", () => {
    const [ra = 0, dec = 0] = written(2, (target) => eclipticToIcrs(target, 100, 5));
    const [longitude = 0] = written(2, (target) => icrsToEcliptic(target, ra, dec));
    expect(longitude).toBeCloseTo(100, 9);
    // Between two conjunctions there is one season.
    expect(visibilityWindows(ra, dec, 45, 180, START + 190, START + 190 + 365)).toHaveLength(1);
    expect(visibilityWindows(ra, dec, 0, 45, START, START + 365)).toHaveLength(1);
  });

  test("are not told for years without a Sun, or for a band that is none", () => {
    expect(visibilityWindows(10, 10, 85, 135, 2_400_000, START)).toBeNull();
    expect(visibilityWindows(10, 10, 85, 135, START, 2_500_000)).toBeNull();
    expect(visibilityWindows(10, 10, 135, 85, START, START + 1)).toBeNull();
    expect(visibilityWindows(10, 100, 85, 135, START, START + 1)).toBeNull();
    expect(visibilityWindows(Number.NaN, 10, 85, 135, START, START + 1)).toBeNull();
    expect(visibilityWindows(10, 10, 85, 135, START + 1, START)).toBeNull();
  });
});
