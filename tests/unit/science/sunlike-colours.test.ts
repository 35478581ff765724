import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { extinction } from "#shared/science/extinction.ts";
import { SUNLIKE_COLOURS } from "#shared/science/recipes.ts";
import {
  sunlikeTeff,
  sunlikeTeffFehSlope,
  sunlikeTeffLoggSlope,
  sunlikeTeffSlope,
} from "#shared/science/sunlike.ts";
import {
  SUNLIKE_ROWS,
  type SunlikeRow,
  sunlikeTeffColourSlope,
  sunlikeTeffFromColour,
  sunlikeTeffGravitySlope,
  sunlikeTeffIronSlope,
} from "#shared/science/sunlike-colours.ts";
import { unsaturatedG } from "#shared/science/survey-photometry.ts";
import { slopeOf } from "./slope.ts";

const ROWS: readonly SunlikeRow[] = SUNLIKE_COLOURS.map((key) => SUNLIKE_ROWS[key]);
const middle = ([bluest, reddest]: readonly [number, number]): number => (bluest + reddest) / 2;

describe("temperature from twelve colours", () => {
  /** Computed from the coefficients of Casagrande et al. 2021 in BP − RP; the last is a giant. */
  test.each([
    [0.5, 4.3, 0, 6855.9],
    [0.7, 4.3, 0, 6130.1],
    [0.82, 4.44, 0, 5761.6],
    [0.82, 4.44, -0.5, 5730.2],
    [0.82, 4.44, 0.3, 5780.4],
    [1.0, 4.5, 0, 5262.7],
    [1.3, 4.6, 0, 4608.5],
    [1.5, 4.6, 0, 4285.5],
    [2.0, 4.7, 0, 3837.7],
    [1.2, 2.5, 0, 4716.1],
  ])("BP − RP %d, log g %d, [Fe/H] %d gives %d K", (colour, logg, feh, teff) => {
    expect(sunlikeTeffFromColour(SUNLIKE_ROWS["bp-rp"], colour, logg, feh)).toBeCloseTo(teff, 1);
  });

  /** Computed from the table of Casagrande et al. 2021, term by term: a dwarf and a giant in every colour. */
  test.each([
    ["bp-rp", 0.92, 4.4, -0.3, 5445.5],
    ["bp-rp", 1.14, 2.5, -0.7, 4811.3],
    ["bp-j", 1.35, 4.4, -0.3, 5771.6],
    ["bp-j", 2.22, 2.5, -0.7, 4521.7],
    ["bp-h", 1.84, 4.4, -0.3, 5542.9],
    ["bp-h", 2.2, 2.5, -0.7, 5084.7],
    ["bp-ks", 1.86, 4.4, -0.3, 5587.4],
    ["bp-ks", 2.3, 2.5, -0.7, 5065.8],
    ["rp-j", 0.54, 4.4, -0.3, 5782.9],
    ["rp-j", 0.98, 2.5, -0.7, 4413.0],
    ["rp-h", 0.76, 4.4, -0.3, 6015.1],
    ["rp-h", 1.1, 2.5, -0.7, 5230.1],
    ["rp-ks", 0.86, 4.4, -0.3, 5873.1],
    ["rp-ks", 1.2, 2.5, -0.7, 5186.6],
    ["g-j", 0.93, 4.4, -0.3, 6027.0],
    ["g-j", 1.72, 2.5, -0.7, 4400.2],
    ["g-h", 1.19, 4.4, -0.3, 6050.8],
    ["g-h", 1.63, 2.5, -0.7, 5267.4],
    ["g-ks", 1.24, 4.4, -0.3, 6027.6],
    ["g-ks", 1.68, 2.5, -0.7, 5315.0],
    ["g-bp", -0.66, 4.4, -0.3, 4345.4],
    ["g-bp", -0.9, 2.5, -0.7, 3786.5],
    ["g-rp", 0.43, 4.4, -0.3, 6114.7],
    ["g-rp", 0.55, 2.5, -0.7, 5277.1],
  ] as const)("%s %d, log g %d, [Fe/H] %d gives %d K", (key, colour, logg, feh, teff) => {
    expect(Math.abs(sunlikeTeffFromColour(SUNLIKE_ROWS[key], colour, logg, feh) - teff)).toBeLessThan(0.051);
  });

  test("HD 122563, dereddened, is 4678 K as its author prints", () => {
    // README of the author's program: log g 1.40, [Fe/H] −2.75, BP 6.3975, RP 5.1787, E(B − V) 0.003.
    const [bp, rp, ebv] = [6.3975, 5.1787, 0.003];
    const intrinsic = bp - extinction("bp", ebv, bp - rp) - (rp - extinction("rp", ebv, bp - rp));
    const teff = sunlikeTeffFromColour(SUNLIKE_ROWS["bp-rp"], intrinsic, 1.4, -2.75);
    expect(teff).toBeCloseTo(4678, 0);
    expect(teff).toBeCloseTo(4678.2, 1);
  });

  test("HD 140283 is 5785 ± 92 K over all colours, and every colour is near that", () => {
    // README of the author's program: log g 3.65, [Fe/H] −2.29, no reddening; a weighted mean is printed.
    const magnitudes: Readonly<Record<string, number>> = {
      g: unsaturatedG(7.036),
      bp: 7.3207,
      rp: 6.5618,
      j: 6.014,
      h: 5.696,
      ks: 5.588,
    };
    const found = SUNLIKE_COLOURS.map((key) => {
      const [blue = "", red = ""] = key.split("-");
      const colour = (magnitudes[blue] ?? Number.NaN) - (magnitudes[red] ?? Number.NaN);
      return sunlikeTeffFromColour(SUNLIKE_ROWS[key], colour, 3.65, -2.29);
    });
    expect(found[0]).toBeCloseTo(5806.7, 1); // computed
    const mean = found.reduce((sum, teff) => sum + teff, 0) / found.length;
    expect(Math.abs(mean - 5785)).toBeLessThan(5);
    // The printed error is the spread: no colour is more than 1.5 of it away.
    for (const teff of found) expect(Math.abs(teff - 5785)).toBeLessThan(1.5 * 92);
  });

  /** Limits of the program of Casagrande et al. 2021: dwarfs, giants. */
  test.each([
    ["bp-rp", [0.2, 2.0], [0.2, 2.55]],
    ["bp-j", [0.25, 3.0], [0.9, 4.2]],
    ["bp-h", [0.4, 4.0], [0.4, 4.9]],
    ["bp-ks", [0.3, 4.2], [0.3, 5.3]],
    ["rp-j", [0.2, 1.05], [0.6, 1.55]],
    ["rp-h", [0.2, 1.6], [0.2, 2.45]],
    ["rp-ks", [0.2, 1.85], [0.2, 2.7]],
    ["g-j", [0.15, 2.1], [1.0, 2.8]],
    ["g-h", [0.25, 2.6], [0.25, 3.7]],
    ["g-ks", [0.2, 2.8], [0.2, 3.9]],
    ["g-bp", [-1.0, -0.15], [-1.4, -0.15]],
    ["g-rp", [0.15, 0.85], [0.15, 1.15]],
  ] as const)("%s holds for dwarfs %o and giants %o", (key, dwarfs, giants) => {
    expect(SUNLIKE_ROWS[key].dwarfs).toEqual(dwarfs);
    expect(SUNLIKE_ROWS[key].giants).toEqual(giants);
  });

  test("outside the colours of dwarfs and of giants there is none", () => {
    for (const row of ROWS)
      for (const [logg, limits] of [
        [4.4, row.dwarfs],
        [2, row.giants],
      ] as const) {
        expect(sunlikeTeffFromColour(row, limits[0] - 0.001, logg, 0)).toBeNaN();
        expect(sunlikeTeffFromColour(row, limits[1] + 0.001, logg, 0)).toBeNaN();
        expect(sunlikeTeffFromColour(row, Number.NaN, logg, 0)).toBeNaN();
        expect(sunlikeTeffFromColour(row, limits[0], logg, 0)).not.toBeNaN();
        expect(sunlikeTeffFromColour(row, limits[1], logg, 0)).not.toBeNaN();
      }
    // 2.2 is a colour of giants alone; a log g of 3.2 is that of a giant still.
    expect(sunlikeTeffFromColour(SUNLIKE_ROWS["bp-rp"], 2.2, 3.201, 0)).toBeNaN();
    expect(sunlikeTeffFromColour(SUNLIKE_ROWS["bp-rp"], 2.2, 3.2, 0)).not.toBeNaN();
  });

  test("outside log g 0 to 5 and [Fe/H] −4 to 0.6 there is none", () => {
    for (const row of ROWS) {
      for (const logg of [-0.01, 5.01, Number.NaN])
        expect(sunlikeTeffFromColour(row, middle(row.giants), logg, 0)).toBeNaN();
      for (const feh of [-4.01, 0.61, Number.NaN])
        expect(sunlikeTeffFromColour(row, middle(row.dwarfs), 4.4, feh)).toBeNaN();
    }
  });

  test("redder dwarfs of solar iron content are cooler in every colour", () => {
    const row = fc.constantFrom(...ROWS);
    fc.assert(
      fc.property(row, fc.double({ min: 0.02, max: 0.9, noNaN: true }), (of, share) => {
        const colour = of.dwarfs[0] + share * (of.dwarfs[1] - of.dwarfs[0]);
        // G − BP runs the other way round: the larger it is, the bluer is the star.
        const sense = of === SUNLIKE_ROWS["g-bp"] ? -1 : 1;
        expect(sense * sunlikeTeffColourSlope(of, colour, 4.4, 0)).toBeLessThan(0);
      }),
    );
  });

  test("the slopes are those of every row", () => {
    for (const row of ROWS) {
      const [x, g, m] = [middle(row.dwarfs), 4.42, -0.3];
      const wanted = [
        slopeOf((v) => sunlikeTeffFromColour(row, v, g, m), x),
        slopeOf((v) => sunlikeTeffFromColour(row, x, v, m), g),
        slopeOf((v) => sunlikeTeffFromColour(row, x, g, v), m),
      ] as const;
      expect(sunlikeTeffColourSlope(row, x, g, m)).toBeCloseTo(wanted[0], 2);
      expect(sunlikeTeffGravitySlope(row, x, m)).toBeCloseTo(wanted[1], 2);
      expect(sunlikeTeffIronSlope(row, x, g)).toBeCloseTo(wanted[2], 2);
    }
  });

  test("in BP − RP it is the relation that stands alone", () => {
    const row = SUNLIKE_ROWS["bp-rp"];
    fc.assert(
      fc.property(
        fc.double({ min: 0.2, max: 2, noNaN: true }),
        fc.double({ min: 3.21, max: 5, noNaN: true }),
        fc.double({ min: -4, max: 0.6, noNaN: true }),
        (x, g, m) => {
          expect(sunlikeTeffFromColour(row, x, g, m)).toBeCloseTo(sunlikeTeff(x, g, m), 8);
          expect(sunlikeTeffColourSlope(row, x, g, m)).toBeCloseTo(sunlikeTeffSlope(x, g, m), 8);
          expect(sunlikeTeffGravitySlope(row, x, m)).toBeCloseTo(sunlikeTeffLoggSlope(x, m), 8);
          expect(sunlikeTeffIronSlope(row, x, g)).toBeCloseTo(sunlikeTeffFehSlope(x, g), 8);
        },
      ),
    );
  });
});
