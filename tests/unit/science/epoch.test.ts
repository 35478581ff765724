import { expect, test } from "vitest";
import {
  julianDateOfBesselianEpoch,
  julianDateOfEpoch,
  julianDateOfInstant,
  julianEpoch,
} from "#shared/science/epoch.ts";

test("epochs and Julian dates", () => {
  expect(julianEpoch(2_451_545)).toBe(2000);
  // ESA 1997, SP-1200, vol. 1, 1.2: the catalogue epoch J1991.25 is JD 2448349.0625.
  expect(julianDateOfEpoch(1991.25)).toBe(2_448_349.0625);
  expect(julianEpoch(julianDateOfEpoch(2016.5))).toBe(2016.5);
  // Lieske 1979, A&A 73, 282: B1950.0 is JD 2433282.42345905.
  expect(julianDateOfBesselianEpoch(1950)).toBeCloseTo(2_433_282.42345905, 6);
});

test("an instant has its Julian date", () => {
  // Meeus 1998, Astronomical Algorithms, 2nd ed., example 12.a: 1987 April 10 at 0h is JD 2446895.5.
  expect(julianDateOfInstant(Date.UTC(1987, 3, 10))).toBe(2_446_895.5);
  expect(julianDateOfInstant(Date.UTC(2000, 0, 1, 12))).toBe(2_451_545);
});
