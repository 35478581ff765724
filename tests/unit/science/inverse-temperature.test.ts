import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  INVERSE_TEMPERATURE_ROWS,
  inverseTeffColourSlope,
  inverseTeffIronSlope,
  teffFromInverse,
} from "#shared/science/inverse-temperature.ts";
import { sunlikeTeff } from "#shared/science/sunlike.ts";
import { slopeOf } from "./slope.ts";

const { dwarfs, giants } = INVERSE_TEMPERATURE_ROWS;

describe("temperature by its inverse", () => {
  /** Computed from Mucciarelli et al. 2021, A&A 653, A90, Table 1; the first is printed beside the relation, too. */
  test.each([
    [dwarfs, 0.82, 0, 5683.94],
    [dwarfs, 0.6, 0, 6414.56],
    [dwarfs, 1.0, 0, 5213.07],
    [dwarfs, 0.82, -0.5, 5645.14],
    [giants, 1.2, 0, 4773.79],
  ])("%o at %d and %d gives %d K", (row, colour, feh, teff) => {
    expect(teffFromInverse(row, colour, feh)).toBeCloseTo(teff, 2);
  });

  test("at the Sun's colour it is 78 K below the scale of Casagrande et al. 2021", () => {
    expect(sunlikeTeff(0.82, 4.44, 0) - teffFromInverse(dwarfs, 0.82, 0)).toBeCloseTo(78, -0.5);
  });

  test("redder is cooler, and the slopes are those of the relation", () => {
    const row = fc.constantFrom(dwarfs, giants);
    fc.assert(
      fc.property(
        row,
        fc.double({ min: 0.45, max: 1.45, noNaN: true }),
        fc.double({ min: -2.5, max: 0.1, noNaN: true }),
        (of, colour, feh) => {
          const byColour = slopeOf((x) => teffFromInverse(of, x, feh), colour);
          const byIron = slopeOf((m) => teffFromInverse(of, colour, m), feh);
          expect(inverseTeffColourSlope(of, colour, feh)).toBeLessThan(0);
          expect(inverseTeffColourSlope(of, colour, feh)).toBeCloseTo(byColour, 1);
          expect(inverseTeffIronSlope(of, colour, feh)).toBeCloseTo(byIron, 1);
        },
      ),
    );
  });

  test("outside the colours and the iron content of its stars there is none", () => {
    for (const row of [dwarfs, giants]) {
      for (const colour of [row.colours[0] - 0.001, row.colours[1] + 0.001, Number.NaN])
        expect(teffFromInverse(row, colour, 0)).toBeNaN();
      for (const feh of [row.feh[0] - 0.01, row.feh[1] + 0.01, Number.NaN])
        expect(teffFromInverse(row, 0.8, feh)).toBeNaN();
    }
  });
});
