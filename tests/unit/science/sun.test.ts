import { describe, expect, test } from "vitest";
import { julianDateOfInstant } from "#shared/science/epoch.ts";
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
