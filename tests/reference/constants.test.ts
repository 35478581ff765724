import { expect, test } from "vitest";
import {
  AU_M,
  AU_PER_SOLAR_RADIUS,
  EARTH_RADIUS_M,
  JUPITER_RADIUS_M,
  SOLAR_GM,
  SOLAR_MBOL,
  SOLAR_RADIUS_M,
} from "#shared/science/constants.ts";
import { at, referenceRows } from "./table.ts";

test("the nominal constants are those of astropy.constants.iau2015, to the last digit", () => {
  const [row] = referenceRows("constants");
  const expected = row?.expected ?? [];
  expect(expected.slice(0, 5)).toEqual([SOLAR_RADIUS_M, SOLAR_GM, EARTH_RADIUS_M, JUPITER_RADIUS_M, AU_M]);
  // Ours is the rounded value in use; the resolutions give 4.739996.
  expect(Math.abs(SOLAR_MBOL - at(expected, 5))).toBeLessThan(5e-6);
  expect(AU_PER_SOLAR_RADIUS).toBeCloseTo(at(expected, 6), 10);
});
