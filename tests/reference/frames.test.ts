import { test } from "vitest";
import { icrsToEcliptic, icrsToGalactic } from "#shared/science/frames.ts";
import { meanObliquity } from "#shared/science/obliquity.ts";
import { generalPrecession, icrsToDate } from "#shared/science/precession.ts";
import { separation } from "#shared/science/separation.ts";
import { at, expectWithin } from "./table.ts";

const place = new Float64Array(2);

/** Degrees between what a function writes and two numbers of the answer. */
const distance = (
  write: (target: Float64Array) => void,
  expected: readonly number[],
  index: number,
): number => {
  write(place);
  return separation(at([...place], 0), at([...place], 1), at(expected, index), at(expected, index + 1));
};

test("galactic coordinates are those of erfa.icrs2g: the same matrix, to rounding", () => {
  expectWithin(
    "galactic",
    (row, answer) => distance((to) => icrsToGalactic(to, at(row, 0), at(row, 1)), answer, 2),
    1e-12,
  );
});

test("galactic coordinates are those of astropy's frame to 1e-5°, as that comes by way of FK5, 25 mas away", () => {
  expectWithin(
    "galactic",
    (row, answer) => distance((to) => icrsToGalactic(to, at(row, 0), at(row, 1)), answer, 0),
    1e-5,
  );
});

test("ecliptic coordinates are those of BarycentricMeanEcliptic to 1e-5°, as that has the frame bias, 23 mas", () => {
  expectWithin(
    "ecliptic",
    (row, answer) => distance((to) => icrsToEcliptic(to, at(row, 0), at(row, 1)), answer, 0),
    1e-5,
  );
});

test("places of date are those of erfa.pmat06 to 1e-5°: the frame bias again, and the terms of fourth order", () => {
  expectWithin(
    "precession",
    (row, answer) => distance((to) => icrsToDate(to, at(row, 0), at(row, 1), at(row, 2)), answer, 0),
    1e-5,
  );
});

test("general precession is that of erfa.p06e to 0.001″, for the terms that are left out", () => {
  expectWithin(
    "precession",
    (row, answer) => 3600 * Math.abs(generalPrecession(at(row, 2)) - at(answer, 2)),
    0.001,
  );
});

test("the obliquity is that of erfa.obl06: the same polynomial, to rounding", () => {
  expectWithin("obliquity", (row, answer) => Math.abs(meanObliquity(at(row, 0)) - at(answer, 0)), 1e-13);
});
