import { expect, test } from "vitest";
import {
  earthRotationAngle,
  greenwichSiderealTime,
  localSiderealTime,
} from "#shared/science/sidereal-time.ts";

const RADIANS = Math.PI / 180;
const APRIL_10 = 2_446_895.5;
const EVENING = APRIL_10 + (19 + 21 / 60) / 24;
const NEW_YEAR_2026 = 2_461_041.5;

test("Greenwich mean sidereal time", () => {
  // Meeus 1998, Astronomical Algorithms, 2nd ed., example 12.a: 13h 10m 46.3668s; 12.b: 8h 34m 57.0896s.
  expect(greenwichSiderealTime(APRIL_10)).toBeCloseTo(15 * (13 + 10 / 60 + 46.3668 / 3600), 5);
  expect(greenwichSiderealTime(EVENING)).toBeCloseTo(15 * (8 + 34 / 60 + 57.0896 / 3600), 5);
  // Computed.
  expect(greenwichSiderealTime(2_451_545)).toBeCloseTo(280.460618, 6);
  expect(greenwichSiderealTime(NEW_YEAR_2026)).toBeCloseTo(100.660859, 6);
});

test("Greenwich mean sidereal time on the test date of SOFA", () => {
  // SOFA test suite, t_gmst82: 1.754174981860675096 rad; t_gmst06, a later model: 1.754174971870091203 rad.
  expect(greenwichSiderealTime(2_453_736.5)).toBeCloseTo(100.506822991, 6);
  expect(greenwichSiderealTime(2_453_736.5) * RADIANS).toBeCloseTo(1.754174981860675, 8);
  expect(greenwichSiderealTime(2_453_736.5) * RADIANS).toBeCloseTo(1.7541749718700912, 7);
});

test("local sidereal time is later to the east", () => {
  // The site of Meeus 1998, example 13.b: 77° 03′ 56″ west.
  const west = -(77 + 3 / 60 + 56 / 3600);
  expect(localSiderealTime(EVENING, west)).toBeCloseTo(128.737873 - 77.0655556, 5);
  expect(localSiderealTime(2_451_545, 90)).toBeCloseTo(10.460618, 6);
});

test("the Earth rotation angle", () => {
  // SOFA test suite, t_era00: 0.4022837240028158102 rad.
  expect(earthRotationAngle(2_454_388.5) * RADIANS).toBeCloseTo(0.4022837240028158, 11);
  // Computed.
  expect(earthRotationAngle(APRIL_10)).toBeCloseTo(197.856285, 6);
  expect(earthRotationAngle(EVENING)).toBeCloseTo(128.900935, 5);
  expect(earthRotationAngle(NEW_YEAR_2026)).toBeCloseTo(100.327712, 6);
});
