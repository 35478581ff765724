import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { altitude, azimuth, hoursAbove, starAltitude, starAzimuth } from "#shared/science/altitude.ts";
import { latitudes, longitudes } from "./positions.ts";

test("Venus over Washington", () => {
  // Meeus 1998, Astronomical Algorithms, 2nd ed., example 13.b: h 15.1249°, azimuth 68.0337° west of south.
  expect(altitude(64.352133, -6.71989167, 38.92138889)).toBeCloseTo(15.1249, 4);
  expect(azimuth(64.352133, -6.71989167, 38.92138889)).toBeCloseTo(248.0337, 4);
  // Computed.
  expect(altitude(64.352133, -6.71989167, 38.92138889)).toBeCloseTo(15.12487, 5);
  expect(azimuth(64.352133, -6.71989167, 38.92138889)).toBeCloseTo(248.03369, 5);
});

test("what culminates does so on the meridian, what rises does so in the east", () => {
  expect(altitude(0, 10, 40)).toBeCloseTo(60, 12);
  expect(azimuth(0, 10, 40)).toBeCloseTo(180, 12);
  expect(azimuth(0, 80, 40)).toBeCloseTo(0, 12);
  expect(altitude(0, 40, 40)).toBeCloseTo(90, 12);
  expect(azimuth(-90, 0, 40)).toBeCloseTo(90, 12);
  expect(altitude(12, 90, 40)).toBeCloseTo(40, 12);
});

test("east and west of the meridian are alike", () => {
  fc.assert(
    fc.property(longitudes, latitudes, latitudes, (hourAngle, dec, latitude) => {
      const height = altitude(hourAngle, dec, latitude);
      expect(height).toBeCloseTo(altitude(-hourAngle, dec, latitude), 12);
      expect(height).toBeCloseTo(altitude(hourAngle, latitude, dec), 11);
      expect(Math.abs(height)).toBeLessThanOrEqual(90);
    }),
  );
});

test("a star at an instant is brought to the equator of date", () => {
  // Meeus's Venus again, 1987 April 10, 19h 21m: its apparent place of date 347.3193375, −6.7198917 (example 13.b) lies at
  // 347.484201, −6.650739 on the axes of J2000.0 (computed). Nutation is left out.
  const date = 2_446_895.5 + (19 + 21 / 60) / 24;
  expect(
    Math.abs(starAltitude(347.484201, -6.650739, date, 38.92138889, -77.0655556) - 15.1249),
  ).toBeLessThan(0.01);
  expect(
    Math.abs(starAzimuth(347.484201, -6.650739, date, 38.92138889, -77.0655556) - 248.0337),
  ).toBeLessThan(0.01);
});

describe("the hours above an altitude", () => {
  /** Computed: latitude, declination, hours above 30°, above airmass 1.5 (41.8103°), above the horizon. */
  test.each([
    [28.3, 18.88424, 8.6986, 6.9106, 13.3785],
    [-24.6, -29, 9.039, 7.2108, 13.9221],
    [-24.6, 0, 7.5312, 5.6968, 11.9672],
    [45, 60, 14.4314, 10.7926, 24],
    [28.3, -30, 1.9747, 0, 9.5589],
  ])("at %d° for a star at %d°", (latitude, dec, thirty, airmass, horizon) => {
    expect(hoursAbove(latitude, dec, 30)).toBeCloseTo(thirty, 4);
    expect(hoursAbove(latitude, dec, 41.8103)).toBeCloseTo(airmass, 4);
    expect(hoursAbove(latitude, dec, 0)).toBeCloseTo(horizon, 4);
  });

  test("are all or none at the poles", () => {
    expect(hoursAbove(90, 31, 30)).toBe(24);
    expect(hoursAbove(90, 29, 30)).toBe(0);
    expect(hoursAbove(-90, 31, 30)).toBe(0);
    expect(hoursAbove(50, 90, 49)).toBe(24);
    expect(hoursAbove(50, 90, 51)).toBe(0);
  });

  test("are those in which the altitude is at least that", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -89, max: 89, noNaN: true }),
        fc.double({ min: -89, max: 89, noNaN: true }),
        fc.double({ min: -80, max: 80, noNaN: true }),
        (latitude, dec, least) => {
          const hours = hoursAbove(latitude, dec, least);
          fc.pre(hours > 0 && hours < 23.9);
          expect(altitude((hours / 2) * 15 * 1.00273791, dec, latitude)).toBeCloseTo(least, 6);
        },
      ),
    );
  });

  test("are missing where there is no such site, star or altitude", () => {
    expect(hoursAbove(91, 0, 30)).toBeNaN();
    expect(hoursAbove(40, Number.NaN, 30)).toBeNaN();
    expect(hoursAbove(40, 0, 95)).toBeNaN();
  });
});
