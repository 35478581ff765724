import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  COOL_DWARF_COLOURS,
  COOL_DWARF_J_H,
  COOL_DWARF_ROWS,
  type CoolDwarfRow,
  coolDwarfTeffColourSlope,
  coolDwarfTeffFromColour,
  coolDwarfTeffScatter,
  coolDwarfTeffSecondSlope,
} from "#shared/science/cool-dwarf-colours.ts";
import { COOL_DWARF_TEFF_SCATTER_K, coolDwarfTeff, coolDwarfTeffSlope } from "#shared/science/cool-dwarfs.ts";
import { BENCHMARK_STARS } from "./mann-2015-stars.ts";
import { slopeOf } from "./slope.ts";

const ROWS: readonly (readonly [string, CoolDwarfRow])[] = Object.entries(COOL_DWARF_ROWS);

/** Y of a row for a dwarf of ordinary iron content and infrared colour. */
const ordinary = (row: CoolDwarfRow): number => (row.second === "j-h" ? 0.58 : 0);

describe("temperature of cool dwarfs from colour", () => {
  /** Computed from Mann et al. 2015, Table 2 (erratum version). */
  test.each([
    ["bp-rp", 1.9, 0, 4016.3],
    ["bp-rp", 2.2, 0, 3733.1],
    ["bp-rp", 2.5, 0, 3525.2],
    ["bp-rp", 3.0, 0, 3262.3],
    ["bp-rp", 3.5, 0, 3040.2],
    ["bp-rp", 4.0, 0, 2863.1],
    ["v-j", 3.0, 0, 3784.4],
    ["v-j", 3.5, 0, 3543.6],
    ["v-j", 4.0, 0, 3359.0],
    ["v-j", 5.0, 0, 3059.4],
    ["v-j", 6.0, 0, 2840.1],
    ["v-ic", 2.0, 0, 3751.4],
    ["v-ic", 2.5, 0, 3439.5],
    ["v-ic", 3.0, 0, 3193.2],
    ["r-z", 1.0, 0, 3909.4],
    ["r-z", 1.5, 0, 3585.4],
    ["r-z", 2.0, 0, 3359.2],
    ["r-z", 3.0, 0, 2965.1],
    ["r-j", 2.5, 0, 3723.5],
    ["r-j", 3.0, 0, 3493.9],
    ["r-j", 4.0, 0, 3158.1],
    ["bp-rp, feh", 2.0, 0, 3908.4],
    ["bp-rp, feh", 2.5, -0.5, 3457.4],
    ["bp-rp, feh", 2.5, 0, 3534.7],
    ["bp-rp, feh", 2.5, 0.3, 3581.1],
    ["bp-rp, feh", 3.0, 0, 3265.6],
    ["bp-rp, feh", 2.9, 0.25, 3353.5],
    ["v-j, feh", 4.4, 0.25, 3279.9],
    ["v-ic, feh", 2.7, 0.25, 3367.2],
    ["r-z, feh", 1.9, 0.25, 3444.5],
    ["r-j, feh", 3.6, 0.25, 3342.4],
    ["bp-rp, j-h", 2.9, 0.55, 3302.7],
    ["v-j, j-h", 4.4, 0.55, 3207.4],
    ["v-ic, j-h", 2.7, 0.55, 3310.5],
    ["r-z, j-h", 1.9, 0.55, 3380.5],
    ["r-j, j-h", 3.6, 0.55, 3263.5],
  ] as const)("%s %d, %d gives %d K", (key, colour, second, teff) => {
    expect(Math.abs(coolDwarfTeffFromColour(COOL_DWARF_ROWS[key], colour, second) - teff)).toBeLessThan(
      0.051,
    );
  });

  test("published stars come out within 2.5 times the scatter", () => {
    for (const star of BENCHMARK_STARS)
      for (const [, row] of ROWS) {
        const colour = { "bp-rp": star.bp - star.rp, "v-j": star.v - star.j }[row.colour as "bp-rp" | "v-j"];
        const second = { none: 0, feh: star.feh, "j-h": star.j - star.h }[row.second];
        // r, z and Ic are not in the rows at hand; Gl 169 (4124 K) lies outside the temperatures of use.
        if (colour === undefined || star.teff > 4100) continue;
        const teff = coolDwarfTeffFromColour(row, colour, second);
        expect(Math.abs(teff - star.teff)).toBeLessThan(2.5 * coolDwarfTeffScatter(row));
      }
  });

  test("Gl 15A, published at 3603 K, is computed at 3668 K from V − J and 3652 K from BP − RP", () => {
    const [star] = BENCHMARK_STARS;
    if (!star) throw new Error("There is no star.");
    expect(coolDwarfTeffFromColour(COOL_DWARF_ROWS["v-j"], star.v - star.j, 0)).toBeCloseTo(3668, -0.5);
    expect(coolDwarfTeffFromColour(COOL_DWARF_ROWS["bp-rp"], star.bp - star.rp, 0)).toBeCloseTo(3652, -0.5);
  });

  test("the J − H row of BP − RP has a positive g: with the other sign the stars come out 100 K cool", () => {
    const row = COOL_DWARF_ROWS["bp-rp, j-h"];
    const offsets = BENCHMARK_STARS.filter((star) => star.teff < 4100).map(
      (star) => coolDwarfTeffFromColour(row, star.bp - star.rp, star.j - star.h) - star.teff,
    );
    expect(Math.abs(offsets.reduce((sum, offset) => sum + offset, 0) / offsets.length)).toBeLessThan(50);
  });

  test("all rows of one colour agree within their scatter for an ordinary dwarf", () => {
    for (const [, row] of ROWS) {
      const { bluest, reddest } = COOL_DWARF_COLOURS[row.colour];
      const colour = bluest + 0.35 * (reddest - bluest);
      const plain = coolDwarfTeffFromColour(COOL_DWARF_ROWS[row.colour], colour, 0);
      expect(Math.abs(coolDwarfTeffFromColour(row, colour, ordinary(row)) - plain)).toBeLessThan(
        1.5 * coolDwarfTeffScatter(row),
      );
    }
  });

  test("outside colours, iron content, J − H and temperatures there is none", () => {
    for (const [, row] of ROWS) {
      const { bluest, reddest } = COOL_DWARF_COLOURS[row.colour];
      for (const colour of [bluest - 0.001, reddest + 0.001, Number.NaN])
        expect(coolDwarfTeffFromColour(row, colour, ordinary(row))).toBeNaN();
    }
    for (const feh of [-0.61, 0.51, Number.NaN])
      expect(coolDwarfTeffFromColour(COOL_DWARF_ROWS["v-j, feh"], 4, feh)).toBeNaN();
    for (const jh of [COOL_DWARF_J_H.bluest - 0.01, COOL_DWARF_J_H.reddest + 0.01, Number.NaN])
      expect(coolDwarfTeffFromColour(COOL_DWARF_ROWS["v-j, j-h"], 4, jh)).toBeNaN();
    expect(coolDwarfTeffFromColour(COOL_DWARF_ROWS["v-j"], 4, Number.NaN)).toBeCloseTo(3359, 0);
  });

  test("what comes out is always between 2700 and 4100 K", () => {
    const row = fc.constantFrom(...ROWS.map(([, each]) => each));
    fc.assert(
      fc.property(row, fc.double({ min: 0.5, max: 7, noNaN: true }), (of, colour) => {
        const teff = coolDwarfTeffFromColour(of, colour, ordinary(of));
        expect(Number.isNaN(teff) || (teff >= 2700 && teff <= 4100)).toBe(true);
      }),
    );
  });

  /** Redder is cooler up to where the quartic turns: computed zeros of its slope, or the end of the sample. */
  test.each([
    ["bp-rp", 4.3],
    ["v-j", 6.3],
    ["v-ic", 3.9],
    ["r-z", 3.7],
    ["r-j", 5.6],
  ] as const)("redder is cooler in %s up to %d", (key, end) => {
    const row = COOL_DWARF_ROWS[key];
    const colour = fc.double({ min: COOL_DWARF_COLOURS[key].bluest, max: end, noNaN: true });
    fc.assert(
      fc.property(colour, (x) => {
        expect(coolDwarfTeffColourSlope(row, x)).toBeLessThan(0);
      }),
    );
  });

  test("the slopes are those of the rows", () => {
    for (const [, row] of ROWS) {
      const { bluest, reddest } = COOL_DWARF_COLOURS[row.colour];
      const colour = bluest + 0.4 * (reddest - bluest);
      const [second, numeric] = [
        ordinary(row),
        slopeOf((x) => coolDwarfTeffFromColour(row, x, ordinary(row)), colour),
      ];
      expect(coolDwarfTeffColourSlope(row, colour)).toBeCloseTo(numeric, 2);
      expect(coolDwarfTeffSecondSlope(row, second)).toBeCloseTo(
        slopeOf((y) => coolDwarfTeffFromColour(row, colour, y), second),
        2,
      );
    }
  });

  test("scatters are those of the table, with the zero point of 60 K in quadrature", () => {
    // Mann et al. 2015, Table 2 (erratum version), K.
    expect(Object.fromEntries(ROWS.map(([key, row]) => [key, row.scatterK]))).toEqual({
      "bp-rp": 52,
      "v-j": 55,
      "v-ic": 53,
      "r-z": 58,
      "r-j": 58,
      "bp-rp, feh": 45,
      "v-j, feh": 42,
      "v-ic, feh": 48,
      "r-z, feh": 50,
      "r-j, feh": 47,
      "bp-rp, j-h": 49,
      "v-j, j-h": 48,
      "v-ic, j-h": 52,
      "r-z, j-h": 55,
      "r-j, j-h": 52,
    });
    expect(coolDwarfTeffScatter(COOL_DWARF_ROWS["v-j, feh"])).toBeCloseTo(Math.hypot(42, 60), 12);
  });

  test("the plain row of BP − RP is the relation that stands alone", () => {
    const row = COOL_DWARF_ROWS["bp-rp"];
    for (const colour of [1.95, 2.7, 3.6, 4.5]) {
      expect(coolDwarfTeffFromColour(row, colour, 0)).toBeCloseTo(coolDwarfTeff(colour), 9);
      expect(coolDwarfTeffColourSlope(row, colour)).toBeCloseTo(coolDwarfTeffSlope(colour), 9);
    }
    expect(coolDwarfTeffScatter(row)).toBe(COOL_DWARF_TEFF_SCATTER_K);
  });
});
