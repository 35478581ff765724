import { expect, test } from "vitest";
import {
  AU_PER_SOLAR_RADIUS,
  EARTH_RADII_PER_SOLAR,
  EARTH_RADIUS_M,
  GAUSSIAN_YEAR_D,
  JUPITER_RADIUS_M,
  SOLAR_MBOL,
  SOLAR_RADIUS_M,
} from "#shared/science/constants.ts";

/** Computed from the nominal values of IAU 2015 Resolutions B2 and B3 and the au of IAU 2012 B2. */
test("ratios of the nominal constants", () => {
  expect(AU_PER_SOLAR_RADIUS).toBeCloseTo(215.03215567, 8);
  expect(1 / AU_PER_SOLAR_RADIUS).toBeCloseTo(0.004650467261, 12);
  expect(1 / EARTH_RADII_PER_SOLAR).toBeCloseTo(0.0091678884577, 12);
  expect(1e6 / EARTH_RADII_PER_SOLAR ** 2).toBeCloseTo(84.0501788, 6);
  expect(1e6 * (JUPITER_RADIUS_M / SOLAR_RADIUS_M) ** 2).toBeCloseTo(10560.16944, 4);
  expect(JUPITER_RADIUS_M / EARTH_RADIUS_M).toBeCloseTo(11.20898073, 8);
  expect(SOLAR_MBOL).toBeCloseTo(2.5 * Math.log10(3.0128e28 / 3.828e26), 4);
});

test("a year at 1 au from one nominal solar mass is 365.2568984 days, not 365.25", () => {
  expect(GAUSSIAN_YEAR_D).toBeCloseTo(365.256898384, 7);
});
