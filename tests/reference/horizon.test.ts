import { test } from "vitest";
import { starAltitude, starAzimuth } from "#shared/science/altitude.ts";
import { julianDateOfBesselianEpoch } from "#shared/science/epoch.ts";
import { separation } from "#shared/science/separation.ts";
import { earthRotationAngle, greenwichSiderealTime } from "#shared/science/sidereal-time.ts";
import { at, expectWithin } from "./table.ts";

/** Degrees between two angles, the short way round. */
const between = (a: number, b: number): number => Math.abs(((((a - b) % 360) + 540) % 360) - 180);

test("altitudes and azimuths are those of AltAz without air, to 0.015°", () => {
  // Left out are nutation (up to 17″), aberration (21″) and UT1 − UTC (0.9 s, 14″): together 0.014° at worst.
  expectWithin(
    "altitudes",
    (row, answer) =>
      separation(
        starAzimuth(at(row, 0), at(row, 1), at(row, 2), at(row, 3), at(row, 4)),
        starAltitude(at(row, 0), at(row, 1), at(row, 2), at(row, 3), at(row, 4)),
        at(answer, 1),
        at(answer, 0),
      ),
    0.015,
  );
});

test("sidereal time is that of erfa.gmst82 to 1e-6°: the same model, on dates that are exact to 2e-10 days", () => {
  expectWithin("sidereal", (row, answer) => between(greenwichSiderealTime(at(row, 0)), at(answer, 0)), 1e-6);
});

test("sidereal time is that of erfa.gmst06 to 1e-4°, as the precession of the models differs", () => {
  expectWithin("sidereal", (row, answer) => between(greenwichSiderealTime(at(row, 0)), at(answer, 1)), 1e-4);
});

test("the Earth rotation angle is that of erfa.era00: the same formula, to rounding", () => {
  expectWithin("sidereal", (row, answer) => between(earthRotationAngle(at(row, 0)), at(answer, 2)), 1e-10);
});

test("Besselian epochs are those of astropy.time, to the last digit of a Julian date", () => {
  expectWithin(
    "epochs",
    (row, answer) => Math.abs(julianDateOfBesselianEpoch(at(row, 0)) - at(answer, 0)),
    1e-9,
  );
});
