import { describe, expect, test } from "vitest";
import {
  BC_KS_ROWS,
  bolometricCorrectionKsColourSlope,
  bolometricCorrectionKsFromColour,
  bolometricCorrectionV,
  bolometricCorrectionVSlope,
  luminosityFromAbsV,
} from "#shared/science/bolometric-corrections.ts";
import { COOL_DWARF_COLOURS, type CoolDwarfColour } from "#shared/science/cool-dwarf-colours.ts";
import { bolometricCorrectionKs, bolometricCorrectionKsSlope } from "#shared/science/cool-dwarfs.ts";
import { BENCHMARK_STARS } from "./mann-2015-stars.ts";
import { slopeOf } from "./slope.ts";

const COLOURS = Object.keys(BC_KS_ROWS) as CoolDwarfColour[];

describe("bolometric correction to Ks", () => {
  /** Computed from this project's fit to the published rows. */
  test.each([
    ["v-j", 2.7, 2.476],
    ["v-j", 3.5, 2.6091],
    ["v-j", 4.5, 2.7494],
    ["v-j", 5.5, 2.8607],
    ["v-j", 6.5, 2.9429],
    ["r-j", 3.6, 2.7143],
    ["r-z", 1.9, 2.6672],
    ["v-ic", 2.7, 2.6939],
    ["bp-rp", 2.9, 2.7027],
  ] as const)("%s %d gives %d", (colour, value, correction) => {
    expect(Math.abs(bolometricCorrectionKsFromColour(colour, value) - correction)).toBeLessThan(5.1e-5);
  });

  test("its scatter is 0.036 to 0.040 mag by colour", () => {
    const scatters = Object.fromEntries(COLOURS.map((colour) => [colour, BC_KS_ROWS[colour].scatter]));
    expect(scatters).toEqual({ "v-j": 0.036, "r-j": 0.036, "r-z": 0.038, "bp-rp": 0.04, "v-ic": 0.04 });
  });

  /** From F_bol and Ks of the star table of Mann et al. 2015. */
  test.each([
    ["Gl 15A", 2.58],
    ["Gl 15B", 2.688],
  ])("%s, published at %d, comes out within 2 rms", (name, published) => {
    const star = BENCHMARK_STARS.find((each) => each.name === name);
    if (!star) throw new Error(`There is no star ${name}.`);
    for (const [colour, value] of [
      ["v-j", star.v - star.j],
      ["bp-rp", star.bp - star.rp],
    ] as const)
      expect(Math.abs(bolometricCorrectionKsFromColour(colour, value) - published)).toBeLessThan(
        2 * BC_KS_ROWS[colour].scatter,
      );
  });

  test("the parabola of BP − RP is the one that stands alone", () => {
    for (const colour of [2, 3, 4.5]) {
      expect(bolometricCorrectionKsFromColour("bp-rp", colour)).toBeCloseTo(
        bolometricCorrectionKs(colour),
        12,
      );
      const slope = bolometricCorrectionKsColourSlope("bp-rp", colour);
      expect(slope).toBeCloseTo(bolometricCorrectionKsSlope(colour), 12);
    }
  });

  test("redder stars have more of their light beyond Ks' reach, and outside the sample there is none", () => {
    for (const colour of COLOURS) {
      const { bluest, reddest } = COOL_DWARF_COLOURS[colour];
      const middle = (bluest + reddest) / 2;
      expect(bolometricCorrectionKsColourSlope(colour, middle)).toBeGreaterThan(0);
      expect(bolometricCorrectionKsColourSlope(colour, middle)).toBeCloseTo(
        slopeOf((x) => bolometricCorrectionKsFromColour(colour, x), middle),
        8,
      );
      for (const value of [bluest - 0.001, reddest + 0.001, Number.NaN])
        expect(bolometricCorrectionKsFromColour(colour, value)).toBeNaN();
    }
  });
});

describe("bolometric correction to V", () => {
  /** Computed from the coefficients of Torres 2010, AJ 140, 1158, Table 1. */
  test.each([
    [4000, -1.1236],
    [4500, -0.6017],
    [5000, -0.2856],
    [5500, -0.1385],
    [5772, -0.081],
    [5777, -0.0801],
    [6000, -0.0449],
    [6500, 0.0065],
    [7000, 0.0307],
    [8000, 0.024],
    [10_000, -0.2492],
    [20_000, -1.8922],
  ])("%d K gives %d", (teff, correction) => {
    // Half a unit of the last digit.
    expect(Math.abs(bolometricCorrectionV(teff) - correction)).toBeLessThan(5.1e-5);
  });

  test("the Sun has −0.080 and, with M_V 4.81, its own luminosity", () => {
    // Torres 2010: BC_V −0.080, V −26.76, that is M_V 4.81, and a bolometric magnitude of 4.73.
    expect(bolometricCorrectionV(5777)).toBeCloseTo(-0.08, 3);
    expect(luminosityFromAbsV(4.81, 5777)).toBeCloseTo(1, 3);
  });

  test("the branches meet at log Teff 3.70 and 3.90, with steps of 0.022 and 0.003 mag", () => {
    const step = (logTeff: number): number =>
      bolometricCorrectionV(10 ** logTeff * (1 - 1e-9)) - bolometricCorrectionV(10 ** logTeff * (1 + 1e-9));
    expect(bolometricCorrectionV(10 ** 3.7 * (1 - 1e-9))).toBeCloseTo(-0.27835, 4);
    expect(bolometricCorrectionV(10 ** 3.7 * (1 + 1e-9))).toBeCloseTo(-0.30072, 4);
    expect(step(3.7)).toBeCloseTo(0.022, 3);
    expect(Math.abs(step(3.9))).toBeCloseTo(0.003, 3);
  });

  test("below 4000 K, where the curve follows giants, and above 20 000 K there is none", () => {
    for (const teff of [3300, 3999, 20_001, Number.NaN]) {
      expect(bolometricCorrectionV(teff)).toBeNaN();
      expect(luminosityFromAbsV(5, teff)).toBeNaN();
    }
  });

  test("the slopes are those of its branches", () => {
    for (const teff of [4400, 6100, 9000])
      expect(bolometricCorrectionVSlope(teff)).toBeCloseTo(slopeOf(bolometricCorrectionV, teff, 0.5), 8);
  });
});
