import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  radiusFromTeff,
  radiusFromTeffFeh,
  radiusOfSubdwarf,
  SUBDWARF_RADIUS_SCATTER,
  subdwarfRadiusSlope,
  TEFF_RADIUS_FEH_SCATTER,
  TEFF_RADIUS_SCATTER,
  teffRadiusFehSlope,
  teffRadiusSlope,
} from "#shared/science/cool-dwarf-radii.ts";
import { radiusFromAbsKs } from "#shared/science/cool-dwarfs.ts";
import { BENCHMARK_STARS } from "./mann-2015-stars.ts";
import { slopeOf } from "./slope.ts";

describe("radius from temperature", () => {
  test.each(BENCHMARK_STARS.filter((star) => star.teff < 4100))(
    "$name comes out within 2.5 times the scatter",
    ({ teff, feh, radius }) => {
      expect(Math.abs(radiusFromTeff(teff) / radius - 1)).toBeLessThan(2.5 * TEFF_RADIUS_SCATTER);
      expect(Math.abs(radiusFromTeffFeh(teff, feh) / radius - 1)).toBeLessThan(2.5 * TEFF_RADIUS_FEH_SCATTER);
    },
  );

  /** Computed from Mann et al. 2015, Table 1 (erratum version): without and with [Fe/H]. */
  test.each([
    [2900, -0.3, 0.141089, 0.123054],
    [3400, 0.2, 0.335284, 0.38973],
    [3900, -0.1, 0.586874, 0.555428],
  ])("%d K and [Fe/H] %d give %d and %d", (teff, feh, plain, withFeh) => {
    expect(radiusFromTeff(teff)).toBeCloseTo(plain, 6);
    expect(radiusFromTeffFeh(teff, feh)).toBeCloseTo(withFeh, 6);
  });

  // Computed: the cubic without [Fe/H] is flat near 2740 K, the other near 4060 K.
  test("hotter is larger, and richer in iron is larger", () => {
    fc.assert(
      fc.property(fc.double({ min: 2750, max: 4040, noNaN: true }), (teff) => {
        expect(teffRadiusSlope(teff)).toBeGreaterThan(0);
        expect(radiusFromTeffFeh(teff, 0.3)).toBeGreaterThan(radiusFromTeffFeh(teff, -0.3));
      }),
    );
  });

  test("the slopes are those of the relations", () => {
    for (const teff of [2900, 3400, 3900]) {
      expect(teffRadiusSlope(teff)).toBeCloseTo(slopeOf(radiusFromTeff, teff, 0.1), 9);
      const wanted = slopeOf((t) => radiusFromTeffFeh(t, 0.2), teff, 0.1);
      expect(teffRadiusFehSlope(teff, 0.2)).toBeCloseTo(wanted, 9);
    }
  });

  test("outside 2700 to 4100 K and [Fe/H] −0.6 to 0.5 there is none", () => {
    for (const teff of [2699, 4101, Number.NaN]) {
      expect(radiusFromTeff(teff)).toBeNaN();
      expect(radiusFromTeffFeh(teff, 0)).toBeNaN();
    }
    for (const feh of [-0.61, 0.51, Number.NaN]) expect(radiusFromTeffFeh(3500, feh)).toBeNaN();
  });
});

describe("radius of subdwarfs", () => {
  /** Computed from Kesseli et al. 2019, AJ 157, 63, eq. 7. */
  test.each([
    [5, 0, 0.5925],
    [7, 0, 0.3049],
    [7, -1, 0.280813],
    [9, 0.5, 0.1461 * 1.0395],
  ])("M Ks %d and [Fe/H] %d give %d", (absKs, feh, radius) => {
    expect(radiusOfSubdwarf(absKs, feh)).toBeCloseTo(radius, 6);
  });

  test("dwarfs of solar iron content agree with Mann et al. 2015 within the scatter of 6 %", () => {
    expect(SUBDWARF_RADIUS_SCATTER).toBe(0.06);
    for (let absKs = 4.6; absKs <= 9.8; absKs += 0.2)
      expect(Math.abs(radiusOfSubdwarf(absKs, 0) / radiusFromAbsKs(absKs) - 1)).toBeLessThan(
        SUBDWARF_RADIUS_SCATTER,
      );
  });

  test("outside M Ks 4 to 10.466 and [Fe/H] −2 to 0.5 there is none, and inside fainter is smaller", () => {
    for (const absKs of [3.99, 10.47, 11, Number.NaN]) expect(radiusOfSubdwarf(absKs, 0)).toBeNaN();
    for (const feh of [-2.01, 0.51, Number.NaN]) expect(radiusOfSubdwarf(7, feh)).toBeNaN();
    fc.assert(
      fc.property(
        fc.double({ min: 4, max: 10.45, noNaN: true }),
        fc.double({ min: -2, max: 0.5, noNaN: true }),
        (absKs, feh) => {
          expect(radiusOfSubdwarf(absKs + 0.01, feh)).toBeLessThan(radiusOfSubdwarf(absKs, feh));
        },
      ),
    );
    expect(subdwarfRadiusSlope(7, -1)).toBeCloseTo(
      slopeOf((m) => radiusOfSubdwarf(m, -1), 7),
      8,
    );
  });
});
