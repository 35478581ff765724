import { describe, expect, test } from "vitest";
import { julianDateOfInstant } from "#shared/science/epoch.ts";
import { eclipticToEquatorial } from "#shared/science/frames.ts";
import { meanObliquity } from "#shared/science/obliquity.ts";
import { separation } from "#shared/science/separation.ts";
import {
  FIRST_SUN_JD,
  LAST_SUN_JD,
  sunDistance,
  sunIcrs,
  sunLongitudeCounted,
  sunLongitudeOfDate,
} from "#shared/science/sun.ts";
import { written } from "./positions.ts";

const at = (julianDate: number): [number, number] => {
  const [ra = 0, dec = 0] = written(2, (target) => sunIcrs(target, julianDate));
  return [ra, dec];
};

describe("the Sun", () => {
  test("of 1992 October 13", () => {
    // Meeus 1998, Astronomical Algorithms, 2nd ed., example 25.a: λ 199.90895°, R 0.99766 au.
    expect(Math.abs(sunLongitudeOfDate(2_448_908.5) - 199.90895)).toBeLessThan(0.01);
    expect(sunDistance(2_448_908.5)).toBeCloseTo(0.99766, 5);
    // Computed.
    expect(sunLongitudeOfDate(2_448_908.5)).toBeCloseTo(199.90299, 5);
    expect(sunDistance(2_448_908.5)).toBeCloseTo(0.997661, 6);
  });

  test("on the equator of date", () => {
    const ofDate = (date: number): [number, number] => {
      const [ra = 0, dec = 0] = written(2, (target) =>
        eclipticToEquatorial(target, sunLongitudeOfDate(date), 0, meanObliquity(date)),
      );
      return [ra, dec];
    };
    // Meeus 1998, example 25.a: α 198.38083°, δ −7.78507°.
    expect(separation(...ofDate(2_448_908.5), 198.38083, -7.78507)).toBeLessThan(0.01);
    // Computed, for 2026 October 4, 0h UTC, 69.2 s later in TT, with the obliquity of the same low-precision formulas, which
    // is 0.0007° less: 0.37° from the place among the stars below.
    const [ra, dec] = ofDate(julianDateOfInstant(Date.UTC(2026, 9, 4)) + 69.2 / 86_400);
    expect(ra).toBeCloseTo(189.9144, 3);
    expect(dec).toBeCloseTo(-4.2682, 3);
  });

  test("is where an ephemeris has it among the stars", () => {
    // Computed with astropy 5.2.1, GCRS.
    const autumn = julianDateOfInstant(Date.UTC(2026, 9, 4));
    expect(separation(...at(autumn), 189.57123, -4.12206)).toBeLessThan(0.01);
    expect(separation(...at(2_451_545), 281.28271, -23.0337)).toBeLessThan(0.01);
  });

  test("goes round once a year, always forward", () => {
    let before = sunLongitudeCounted(FIRST_SUN_JD);
    for (let date = FIRST_SUN_JD + 1; date < LAST_SUN_JD; date += 1) {
      const now = sunLongitudeCounted(date);
      expect(now - before).toBeGreaterThan(0.95);
      expect(now - before).toBeLessThan(1.02);
      before = now;
    }
    // A sidereal year, from memory: 365.25636 days.
    const year = sunLongitudeCounted(2_451_545 + 365.25636) - sunLongitudeCounted(2_451_545);
    expect(Math.abs(year - 360)).toBeLessThan(0.001);
  });

  test("is not told before 1950 or after 2050", () => {
    for (const date of [FIRST_SUN_JD - 1, LAST_SUN_JD + 1, Number.NaN]) {
      expect(sunLongitudeOfDate(date)).toBeNaN();
      expect(sunDistance(date)).toBeNaN();
      expect(at(date)).toEqual([Number.NaN, Number.NaN]);
    }
  });
});
