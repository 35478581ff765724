import { expect, test } from "vitest";
import { nestedPixel, ringPixel } from "#shared/science/healpix.ts";
import { nestedNeighbours } from "#shared/science/healpix-regions.ts";
import { at, expectWithin, referenceRows } from "./table.ts";

/** Indices are whole numbers: they are the same or they are wrong. */
const NONE = 0;

test("nested indices are those of astropy_healpix at orders 0 to 24", () => {
  expectWithin(
    "pixels",
    (row, answer) => Math.abs(nestedPixel(at(row, 0), at(row, 1), at(row, 2)) - at(answer, 0)),
    NONE,
  );
});

test("ring indices are those of astropy_healpix at orders 0 to 24", () => {
  expectWithin(
    "pixels",
    (row, answer) => Math.abs(ringPixel(at(row, 0), at(row, 1), at(row, 2)) - at(answer, 1)),
    NONE,
  );
});

test("neighbours are those of astropy_healpix, in the same order", () => {
  for (const { input, expected } of referenceRows("neighbours"))
    expect(nestedNeighbours(at(input, 0), at(input, 1))).toEqual(expected.filter((pixel) => pixel >= 0));
});
