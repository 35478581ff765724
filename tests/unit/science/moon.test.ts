import { describe, expect, test } from "vitest";
import { julianDateOfInstant } from "#shared/science/epoch.ts";
import {
  illuminatedFraction,
  moonElongation,
  moonIcrs,
  moonIllumination,
  moonLatitude,
  moonLongitudeOfDate,
  moonParallax,
} from "#shared/science/moon.ts";
import { separation } from "#shared/science/separation.ts";
import { written } from "./positions.ts";

describe("the Moon", () => {
  test("of 1992 April 12", () => {
    // Meeus 1998, Astronomical Algorithms, 2nd ed., example 47.a: λ 133.162655°, β −3.229126°, parallax 0.991990°.
    expect(Math.abs(moonLongitudeOfDate(2_448_724.5) - 133.162655)).toBeLessThan(0.3);
    expect(Math.abs(moonLatitude(2_448_724.5) - -3.229126)).toBeLessThan(0.2);
    expect(Math.abs(moonParallax(2_448_724.5) - 0.99199)).toBeLessThan(0.003);
    // Computed.
    expect(moonLongitudeOfDate(2_448_724.5)).toBeCloseTo(133.2448, 4);
    expect(moonLatitude(2_448_724.5)).toBeCloseTo(-3.3073, 4);
    expect(moonParallax(2_448_724.5)).toBeCloseTo(0.99291, 5);
  });

  test("is where an ephemeris has it among the stars", () => {
    // Computed with astropy 5.2.1, GCRS, and from there the separations from the Sun.
    const autumn = julianDateOfInstant(Date.UTC(2026, 9, 4));
    const [ra = 0, dec = 0] = written(2, (target) => moonIcrs(target, autumn));
    expect(separation(ra, dec, 108.0479, 25.9223)).toBeLessThan(0.35);
    expect(Math.abs(moonElongation(autumn) - 84.215)).toBeLessThan(0.35);
    expect(Math.abs(moonElongation(julianDateOfInstant(Date.UTC(2026, 2, 20, 12))) - 19.258)).toBeLessThan(
      0.35,
    );
  });

  test("is lit by as much as it is away from the Sun", () => {
    expect(illuminatedFraction(0)).toBe(0);
    expect(illuminatedFraction(90)).toBeCloseTo(0.5, 12);
    expect(illuminatedFraction(180)).toBe(1);
    expect(illuminatedFraction(181)).toBeNaN();
    // Meeus 1998, example 48.a: 0.6786 on 1992 April 12 at 0h.
    expect(Math.abs(moonIllumination(2_448_724.5) - 0.6786)).toBeLessThan(0.004);
  });

  test("is not told outside the years of the Sun", () => {
    for (const date of [2_400_000, 2_500_000, Number.NaN]) {
      expect(moonLongitudeOfDate(date)).toBeNaN();
      expect(moonLatitude(date)).toBeNaN();
      expect(moonParallax(date)).toBeNaN();
      expect(moonIllumination(date)).toBeNaN();
    }
  });
});
