import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  bolometricCorrectionKs,
  bolometricCorrectionKsSlope,
  COOL_DWARF_ABS_KS,
  coolDwarfTeff,
  coolDwarfTeffSlope,
  logMassFehSlope,
  logMassSlope,
  massFehOverWholeRange,
  massFromAbsKs,
  massFromAbsKsFeh,
  massOverWholeRange,
  RADIUS_COEFFICIENTS,
  radiusFehSlope,
  radiusFromAbsKs,
  radiusFromAbsKsFeh,
  radiusSlope,
} from "#shared/science/cool-dwarfs.ts";
import { slopeOf } from "./slope.ts";

/** Computed from the printed coefficients of Mann et al. 2015 (eq. 4, 5, erratum 2016) and Mann et al. 2019 (eq. 4, 5). */
const TABLE = [
  [4.6, 0.687788, 0.684645, 0.669384, 0.693802, 0.654487, 0.660308, 0.659615],
  [5.0, 0.6115, 0.60925, 0.59567, 0.617398, 0.597187, 0.599549, 0.59892],
  [6.0, 0.4443, 0.44382, 0.433927, 0.449756, 0.440431, 0.43663, 0.436171],
  [7.0, 0.3107, 0.31133, 0.30439, 0.315494, 0.288949, 0.285405, 0.285106],
  [7.5, 0.2565, 0.257438, 0.251699, 0.26088, 0.228034, 0.225424, 0.225187],
  [8.0, 0.2107, 0.21178, 0.207059, 0.214612, 0.179794, 0.177924, 0.177737],
  [9.0, 0.1443, 0.14517, 0.141934, 0.147112, 0.117426, 0.116094, 0.115972],
  [9.8, 0.115372, 0.115599, 0.113022, 0.117145, 0.091445, 0.090167, 0.090072],
] as const;

describe("radius and mass from M Ks", () => {
  test.each(TABLE)("M Ks %d", (m, r4, r5, r5Poor, r5Rich, m4, m5, m5Rich) => {
    expect(radiusFromAbsKs(m)).toBeCloseTo(r4, 6);
    // Mann et al. 2015, eq. 5: the [Fe/H] term multiplies.
    expect(radiusFromAbsKsFeh(m, 0)).toBeCloseTo(r5, 6);
    expect(radiusFromAbsKsFeh(m, -0.5)).toBeCloseTo(r5Poor, 6);
    expect(radiusFromAbsKsFeh(m, 0.3)).toBeCloseTo(r5Rich, 6);
    expect(massFromAbsKs(m)).toBeCloseTo(m4, 6);
    expect(massFromAbsKsFeh(m, 0)).toBeCloseTo(m5, 6);
    expect(massFromAbsKsFeh(m, 0.3)).toBeCloseTo(m5Rich, 6);
  });

  test("benchmark stars: Gl 15A and Gl 15B of the star table of Mann et al. 2015", () => {
    // M Ks is itself rounded to 0.0005 mag, which is 0.0001 of radius: three digits hold.
    expect(radiusFromAbsKs(6.263)).toBeCloseTo(0.406, 3);
    expect(radiusFromAbsKs(8.17)).toBeCloseTo(0.1971, 3);
    expect(massFromAbsKs(6.263)).toBeCloseTo(0.3982, 3);
    expect(massFromAbsKs(8.17)).toBeCloseTo(0.1662, 3);
  });

  test("the range ends before the parabola of the radius turns at M Ks 10.476 and 0.10769 R☉ (computed)", () => {
    const [constant, linear, square] = RADIUS_COEFFICIENTS;
    const turn = -linear / (2 * square);
    expect(turn).toBeCloseTo(10.476, 3);
    expect(constant + turn * (linear + turn * square)).toBeCloseTo(0.10769, 5);
    expect(COOL_DWARF_ABS_KS.faintest).toBeLessThan(turn);
    expect(radiusFromAbsKs(turn)).toBeNaN();
  });

  /** Computed; the wrong fifth power of one public program would give 0.484 and 0.113 at these ends. */
  test.each([
    [4, 0.743751, 0.750669, 0.749881],
    [11, 0.073542, 0.074093, 0.074015],
  ])("M Ks %d, where the mass alone is published", (m, m4, m5, m5Rich) => {
    expect(massOverWholeRange(m)).toBeCloseTo(m4, 6);
    expect(massFehOverWholeRange(m, 0)).toBeCloseTo(m5, 6);
    expect(massFehOverWholeRange(m, 0.3)).toBeCloseTo(m5Rich, 6);
    expect(massFromAbsKs(m)).toBeNaN();
  });

  test("inside the range in use both forms of the mass are one", () => {
    for (const m of [4.6, 6.1, 9.8]) {
      expect(massOverWholeRange(m)).toBe(massFromAbsKs(m));
      expect(massFehOverWholeRange(m, -0.2)).toBe(massFromAbsKsFeh(m, -0.2));
    }
    for (const m of [3.99, 11.01, Number.NaN]) {
      expect(massOverWholeRange(m)).toBeNaN();
      expect(massFehOverWholeRange(m, 0)).toBeNaN();
    }
    for (const feh of [-0.61, 0.41, Number.NaN]) expect(massFehOverWholeRange(7, feh)).toBeNaN();
  });

  /** README of the authors' program: GJ 1214 0.1803 ± 0.0047 and TRAPPIST-1 0.0898 ± 0.0023, from the full posterior. */
  test.each([
    ["GJ 1214", 8.782, 1000 / 14.55, 0.1803, 0.1825, 0.1806],
    ["TRAPPIST-1", 10.296, 80.4512, 0.0898, 0.0909, 0.0897],
  ])("%s is within 1.5 percent of its authors' mass", (_, ks, parallax, printed, byEq4, byEq5) => {
    const absKs = ks + 5 - 5 * Math.log10(1000 / parallax);
    expect(Math.abs(massOverWholeRange(absKs) / printed - 1)).toBeLessThan(0.015);
    expect(massOverWholeRange(absKs)).toBeCloseTo(byEq4, 4);
    // The distances are rounded: a unit of the fourth digit.
    expect(Math.abs(massFehOverWholeRange(absKs, 0) - byEq5)).toBeLessThan(1e-4);
  });

  test("nothing outside 4.6 to 9.8 and outside the metallicities of the samples", () => {
    for (const relation of [radiusFromAbsKs, massFromAbsKs])
      for (const m of [4.599, 9.801, -1.3, 12, Number.NaN]) expect(relation(m)).toBeNaN();
    for (const feh of [-0.61, 0.51, Number.NaN]) expect(radiusFromAbsKsFeh(7, feh)).toBeNaN();
    for (const feh of [-0.61, 0.41, Number.NaN]) expect(massFromAbsKsFeh(7, feh)).toBeNaN();
  });

  test("fainter is always smaller and lighter inside the range", () => {
    const magnitude = fc.double({ min: 4.6, max: 9.79, noNaN: true });
    fc.assert(
      fc.property(magnitude, (m) => {
        expect(radiusFromAbsKs(m + 0.01)).toBeLessThan(radiusFromAbsKs(m));
        expect(massFromAbsKs(m + 0.01)).toBeLessThan(massFromAbsKs(m));
      }),
    );
  });

  test("the slopes are those of the relations", () => {
    for (const m of [5, 6.3, 7.5, 9.2]) {
      expect(radiusSlope(m)).toBeCloseTo(slopeOf(radiusFromAbsKs, m), 6);
      expect(radiusFehSlope(m, 0.2)).toBeCloseTo(
        slopeOf((x) => radiusFromAbsKsFeh(x, 0.2), m),
        6,
      );
      expect(logMassSlope(m)).toBeCloseTo(
        slopeOf((x) => Math.log(massFromAbsKs(x)), m),
        6,
      );
      expect(logMassFehSlope(m)).toBeCloseTo(
        slopeOf((x) => Math.log(massFromAbsKsFeh(x, 0.2)), m),
        6,
      );
    }
  });
});

describe("temperature of cool dwarfs from BP − RP", () => {
  /** Computed from Mann et al. 2015, Table 2 (erratum version). */
  test.each([
    [1.9, 4016.3],
    [2.2, 3733.1],
    [2.5, 3525.2],
    [3.0, 3262.3],
    [3.5, 3040.2],
    [4.0, 2863.1],
  ])("BP − RP %d gives %d K", (colour, teff) => {
    expect(coolDwarfTeff(colour)).toBeCloseTo(teff, 1);
  });

  test("the quartic is refused outside its sample, where it turns up again", () => {
    for (const colour of [1.89, 4.76, 0.8, Number.NaN]) expect(coolDwarfTeff(colour)).toBeNaN();
    expect(coolDwarfTeffSlope(2.7)).toBeCloseTo(slopeOf(coolDwarfTeff, 2.7), 3);
  });

  test("Gl 15A, published at 3603 K, comes out at 3652 K", () => {
    expect(coolDwarfTeff(8.532 - 6.225)).toBeCloseTo(3652, 0);
  });
});

describe("bolometric correction to Ks", () => {
  test("agrees with the published rows that it was fitted to, within its scatter", () => {
    // Gl 15A 2.580 and Gl 15B 2.688, from F_bol and Ks of the star table of Mann et al. 2015.
    expect(Math.abs(bolometricCorrectionKs(8.532 - 6.225) - 2.58)).toBeLessThan(0.06);
    expect(Math.abs(bolometricCorrectionKs(11.457 - 8.414) - 2.688)).toBeLessThan(0.06);
  });

  test("holds from 1.90 to 4.75 only", () => {
    for (const colour of [1.89, 4.76, Number.NaN]) expect(bolometricCorrectionKs(colour)).toBeNaN();
    expect(bolometricCorrectionKsSlope(3)).toBeCloseTo(slopeOf(bolometricCorrectionKs, 3), 6);
  });
});
