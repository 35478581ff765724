import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  type MainSequencePlace,
  type MainSequenceQuantity,
  type MainSequenceStar,
  mainSequence,
  mainSequenceAbsG,
  mainSequenceOfType,
} from "#shared/science/main-sequence.ts";
import { MAIN_SEQUENCE_ROWS, MAIN_SEQUENCE_VERSION } from "#shared/science/main-sequence-table.ts";

/** Type, printed log L and printed radius: Pecaut & Mamajek 2013, ApJS 208, 9, Table 5, version 2024.05.15. */
const PRINTED = [
  ["F0V", 0.864, 1.728],
  ["F1V", 0.79, 1.679],
  ["F2V", 0.71, 1.622],
  ["F3V", 0.668, 1.578],
  ["F4V", 0.622, 1.533],
  ["F5V", 0.556, 1.473],
  ["F6V", 0.432, 1.359],
  ["F7V", 0.39, 1.324],
  ["F8V", 0.292, 1.221],
  ["F9V", 0.216, 1.167],
  ["F9.5V", 0.18, 1.142],
  ["G0V", 0.13, 1.1],
  ["G1V", 0.077, 1.06],
  ["G2V", 0.01, 1.012],
  ["G3V", -0.014, 1.002],
  ["G4V", -0.036, 0.991],
  ["G5V", -0.054, 0.977],
  ["G6V", -0.098, 0.949],
  ["G7V", -0.134, 0.927],
  ["G8V", -0.204, 0.914],
  ["G9V", -0.26, 0.853],
  ["K0V", -0.324, 0.813],
  ["K1V", -0.394, 0.797],
  ["K2V", -0.428, 0.783],
  ["K3V", -0.57, 0.755],
  ["K4V", -0.692, 0.71],
  ["K5V", -0.78, 0.701],
  ["K6V", -0.848, 0.669],
  ["K7V", -0.992, 0.63],
  ["K8V", -1.064, 0.615],
  ["K9V", -1.1, 0.608],
  ["M0V", -1.164, 0.588],
  ["M0.5V", -1.268, 0.544],
  ["M1V", -1.336, 0.501],
  ["M1.5V", -1.444, 0.482],
  ["M2V", -1.54, 0.446],
  ["M2.5V", -1.636, 0.421],
  ["M3V", -1.788, 0.361],
  ["M3.5V", -2.032, 0.3],
  ["M4V", -2.144, 0.274],
  ["M4.5V", -2.4, 0.217],
  ["M5V", -2.52, 0.196],
  ["M5.5V", -2.792, 0.156],
  ["M6V", -2.98, 0.137],
  ["M6.5V", -3.096, 0.126],
  ["M7V", -3.188, 0.12],
  ["M7.5V", -3.24, 0.116],
  ["M8V", -3.292, 0.114],
  ["M8.5V", -3.472, 0.104],
  ["M9V", -3.52, 0.102],
  ["M9.5V", -3.572, 0.101],
] as const;

/**
 * Rows in which the printed log L contradicts the magnitudes of the same row: what follows from these less what is printed,
 * dex (computed).
 */
const MISPRINTED_LIGHT: Readonly<Record<string, number>> = {
  G8V: 0.036,
  K0V: -0.014,
  K5V: 0.016,
  K6V: -0.012,
  K7V: -0.02,
  M1V: -0.056,
  M8V: 0.008,
  "M9.5V": 0.02,
};
/** The same for the radius, relative. */
const MISPRINTED_RADIUS: Readonly<Record<string, number>> = {
  K3V: -0.036,
  K7V: -0.014,
  M7V: -0.016,
  "M9.5V": 0.018,
};

const starOf = (type: string): MainSequenceStar => {
  const star = mainSequenceOfType(type);
  if (!star) throw new Error(`There is no ${type}.`);
  return star;
};

describe("mean main sequence", () => {
  test("is version 2024.05.15 with F0V to M9.5V", () => {
    expect(MAIN_SEQUENCE_VERSION).toBe("2024.05.15");
    expect(MAIN_SEQUENCE_ROWS).toHaveLength(51);
    expect(PRINTED.map(([type]) => type)).toEqual(MAIN_SEQUENCE_ROWS.map(([type]) => type));
  });

  test.each(PRINTED)(
    "%s: light and radius are those printed, or their known slips",
    (type, light, radius) => {
      const star = starOf(type);
      // Rounding: M_V to 0.01 and BC_V to 0.005 mag are 0.006 dex.
      expect(Math.abs(star.logLuminosity - light - (MISPRINTED_LIGHT[type] ?? 0))).toBeLessThan(0.0065);
      expect(Math.abs(star.radius / radius - 1 - (MISPRINTED_RADIUS[type] ?? 0))).toBeLessThan(0.012);
    },
  );

  /** Computed from the table: BC_Ks = BC_V + (V − Ks). */
  test.each([
    ["M2V", 2.61],
    ["M4V", 2.74],
    ["M6V", 2.97],
    ["G2V", 1.479],
  ])("%s has BC Ks %d", (type, correction) => {
    expect(starOf(type).bcKs).toBeCloseTo(correction, 9);
  });

  test("the columns agree with each other: M_Ks is M_V − (V − Ks) to 0.08 mag", () => {
    // Computed: worst in K3V (0.08) and K4V and K7V (0.04).
    for (const [type] of PRINTED) {
      const star = starOf(type);
      expect(Math.abs(star.absV - star.vKs - star.absKs)).toBeLessThan(0.081);
      // G is tied to V less tightly among the coolest.
      if (star.teff > 3000) expect(Math.abs(star.absV + star.gV - star.absG)).toBeLessThan(0.11);
    }
  });

  test("temperature and M_Ks change in one sense along it", () => {
    for (let i = 1; i < PRINTED.length; i++) {
      const [before, after] = [starOf(PRINTED[i - 1]?.[0] ?? ""), starOf(PRINTED[i]?.[0] ?? "")];
      expect(after.teff).toBeLessThan(before.teff);
      expect(after.absKs).toBeGreaterThan(before.absKs);
      if (after.bpRp < 4.7) expect(after.bpRp).toBeGreaterThan(before.bpRp);
    }
  });
});

describe("between the rows", () => {
  const RANGES: Readonly<Record<MainSequencePlace, readonly [number, number]>> = {
    teff: [2330, 7220],
    absKs: [1.836, 10.5],
    bpRp: [0.377, 4.7],
  };
  const PLACES = Object.keys(RANGES) as MainSequencePlace[];

  test("a row answers with its own values, whatever it is placed by", () => {
    const quantities = Object.keys(starOf("G2V")) as MainSequenceQuantity[];
    for (const [type] of PRINTED) {
      const star = starOf(type);
      for (const place of PLACES)
        for (const quantity of quantities)
          if (place !== "bpRp" || star.teff > 2650) {
            const found = mainSequence(quantity, place, star[place]);
            if (type === "M9.5V" && quantity === "bV") expect(found).toBeNaN();
            else expect(found).toBeCloseTo(star[quantity], 9);
          }
    }
  });

  test("half-way between two rows is half-way in everything", () => {
    const [warm, cool] = [starOf("M3V"), starOf("M3.5V")];
    for (const place of PLACES) {
      const middle = (warm[place] + cool[place]) / 2;
      expect(mainSequence("absG", place, middle)).toBeCloseTo((warm.absG + cool.absG) / 2, 9);
      expect(mainSequence("mass", place, middle)).toBeCloseTo((warm.mass + cool.mass) / 2, 9);
    }
  });

  test("placing by one quantity and reading it back gives the value", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...PLACES),
        fc.double({ min: 0, max: 0.9999, noNaN: true }),
        (place, share) => {
          const [least, most] = RANGES[place];
          const value = least + share * (most - least);
          expect(mainSequence(place, place, value)).toBeCloseTo(value, 9);
        },
      ),
    );
  });

  test("hotter is brighter, heavier and larger", () => {
    fc.assert(
      fc.property(fc.double({ min: 2335, max: 7200, noNaN: true }), (teff) => {
        for (const quantity of ["mass", "logLuminosity"] as const)
          expect(mainSequence(quantity, "teff", teff + 10)).toBeGreaterThan(
            mainSequence(quantity, "teff", teff),
          );
        expect(mainSequence("absV", "teff", teff + 10)).toBeLessThan(mainSequence("absV", "teff", teff));
      }),
    );
  });

  test("beyond both ends, and for BP − RP of 4.7 and redder, there is nothing", () => {
    for (const place of PLACES) {
      const [least, most] = RANGES[place];
      for (const value of [least - 0.001, most + 0.001, Number.NaN])
        expect(mainSequence("mass", place, value)).toBeNaN();
    }
    expect(mainSequence("mass", "bpRp", 4.7)).toBeNaN();
    expect(mainSequence("mass", "bpRp", 4.86)).toBeNaN();
    expect(mainSequence("mass", "bpRp", 4.6999)).toBeGreaterThan(0.088);
  });
});

describe("spectral types", () => {
  test.each([
    ["G2V", 5770],
    ["G2", 5770],
    [" G2 V ", 5770],
    ["M4.5Ve", 3110],
    ["M 4.5 V", 3110],
    ["K7.0V", 4090],
    ["F9.5V", 5990],
  ])("%s is a row", (type, teff) => {
    expect(mainSequenceOfType(type)?.teff).toBe(teff);
  });

  test.each(["G2III", "G2IV", "M4VI", "G2.5V", "A0V", "L1V", "M9.9V", "M", "", "sdM4", "g2v", "K0V+M2V"])(
    "%s is none",
    (type) => {
      expect(mainSequenceOfType(type)).toBeUndefined();
    },
  );
});

describe("absolute G by BP − RP", () => {
  test("rows of the table and between them", () => {
    expect(mainSequenceAbsG(0.823)).toBeCloseTo(4.635, 6);
    expect(mainSequenceAbsG(2.23)).toBeCloseTo(9.29, 6);
    expect(mainSequenceAbsG(0.377)).toBeCloseTo(2.51, 6);
    expect(mainSequenceAbsG(3.35)).toBeCloseTo(12.45, 6);
    expect(mainSequenceAbsG((2.78 + 2.94) / 2)).toBeCloseTo((10.82 + 11.21) / 2, 6);
    expect(mainSequenceAbsG(4.5)).toBeCloseTo(14.4, 6);
  });

  test("outside 0.377 to 4.7 there is none", () => {
    for (const colour of [0.376, 4.7, 5, Number.NaN]) expect(mainSequenceAbsG(colour)).toBeNaN();
  });
});
