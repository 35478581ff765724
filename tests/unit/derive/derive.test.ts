import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { deriveColumns } from "#server/derive/derive.ts";
import { GIVEN_KEYS, STELLAR_KEYS } from "#server/derive/star-columns.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { columnsOf } from "#shared/catalogue/columns.ts";
import { flagsIn } from "#shared/catalogue/flags.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { type Given, PRACTICE_STARS } from "./practice-stars.ts";
import { derived } from "./support.ts";

/** A star like the Sun at 10 pc: M_G 4.68 and colours of the mean sequence. */
const SUNLIKE: Given = {
  parallax: 100,
  parallax_err: 0.05,
  g_mag: 4.68,
  g_mag_err: 0.003,
  bp_mag: 5.823,
  bp_mag_err: 0.003,
  rp_mag: 5.0,
  rp_mag_err: 0.003,
  ks_mag: 3.24,
  ks_mag_err: 0.02,
  logg: 4.44,
  logg_err: 0.05,
  feh: 0,
  feh_err: 0.05,
};

/** An M2 dwarf at 20 pc, with everything given but a temperature. */
const COOL: Given = {
  parallax: 50,
  parallax_err: 0.03,
  g_mag: 10.795,
  g_mag_err: 0.003,
  bp_mag: 11.95,
  bp_mag_err: 0.005,
  rp_mag: 9.72,
  rp_mag_err: 0.004,
  ks_mag: 7.485,
  ks_mag_err: 0.02,
};

const without = (star: Given, ...keys: string[]): Given =>
  Object.fromEntries(Object.entries(star).filter(([key]) => !keys.includes(key)));

const words = (bits: number): string[] => flagsIn(bits).map((flag) => flag.word);

test("every stellar column of the registry but the count of flags is derived", () => {
  expect([...STELLAR_KEYS, "flags"].sort()).toEqual(
    columnsOf("stellar")
      .map((c) => c.key)
      .sort(),
  );
});

describe("no value is missing without a reason", () => {
  const maybe = (min: number, max: number) =>
    fc.oneof(fc.constant(Number.NaN), fc.double({ min, max, noNaN: true }));
  const RANGES: Readonly<Record<string, readonly [number, number]>> = {
    parallax: [-5, 800],
    teff_given: [-10, 40_000],
    logg: [-1, 6],
    feh: [-5, 1],
    ruwe: [0.5, 30],
    light_share: [-0.5, 1.5],
  };
  const rangeOf = (key: string): readonly [number, number] =>
    RANGES[key] ?? (key.endsWith("_err") ? [-0.1, 5] : [-2, 25]);
  const star = fc.record(Object.fromEntries(GIVEN_KEYS.map((key) => [key, maybe(...rangeOf(key))])));

  test.each([DEFAULT_RECIPE, PRACTICE_RECIPE])("recipe $name", ({ settings: recipe }) => {
    fc.assert(
      fc.property(star, (given) => {
        const { value, error, reason } = derived(given, recipe);
        for (const key of STELLAR_KEYS) {
          const isThere = Number.isFinite(value(key));
          expect([key, isThere]).toEqual([key, reason(key) === undefined]);
          expect(isThere || Number.isNaN(value(key))).toBe(true);
          if (!isThere) expect(error(key)).toBeNaN();
          else if (!Number.isNaN(error(key))) expect(error(key)).toBeGreaterThanOrEqual(0);
        }
      }),
      { numRuns: 400 },
    );
  });
});

test("a block gives the same bits as its stars one by one, and the same again", () => {
  const stars: Given[] = [PRACTICE_STARS.A, SUNLIKE, {}, COOL, PRACTICE_STARS.C];
  const block = Object.fromEntries(
    GIVEN_KEYS.map((key) => [key, Float64Array.from(stars, (star) => star[key] ?? Number.NaN)]),
  );
  const columns = deriveColumns(block, stars.length, DEFAULT_RECIPE.settings);
  expect(deriveColumns(block, stars.length, DEFAULT_RECIPE.settings)).toEqual(columns);
  stars.forEach((star, i) => {
    const single = derived(star).columns;
    for (const [key, values] of Object.entries(columns.values))
      expect(values[i]).toBe(single.values[key]?.[0]);
    for (const [key, codes] of Object.entries(columns.blanks)) expect(codes[i]).toBe(single.blanks[key]?.[0]);
    for (const [key, codes] of Object.entries(columns.methods))
      expect(codes[i]).toBe(single.methods[key]?.[0]);
    expect(columns.flagBits[i]).toBe(single.flagBits[0]);
  });
});

test("given values that no star has lead to blanks, not to infinities", () => {
  const star = derived({ ...COOL, parallax: 5e-324, parallax_err: 0 });
  expect([star.value("distance"), star.reason("distance")]).toEqual([Number.NaN, "not-finite"]);
  expect(derived({ ...SUNLIKE, g_mag: -9000 }).reason("luminosity")).toBe("not-finite");
});

describe("distance", () => {
  test.each([
    [{}, "needs-parallax"],
    [{ parallax: 0, parallax_err: 0.1 }, "parallax-not-positive"],
    [{ parallax: -3, parallax_err: 0.1 }, "parallax-not-positive"],
    [{ parallax: 10 }, "needs-parallax-error"],
    [{ parallax: 10, parallax_err: -1 }, "needs-parallax-error"],
    [{ parallax: 10, parallax_err: 1.01 }, "parallax-too-uncertain"],
  ])("%j is blank: %s", (given: Given, reason) => {
    expect(derived(given).reason("distance")).toBe(reason);
    expect(derived({ ...given, ks_mag: 8 }).reason("abs_ks")).toBe("needs-distance");
    expect(derived({ ...given, ks_mag: 8 }).reason("radius")).toBe("needs-distance");
  });

  test("a star without Ks says so", () => {
    expect(derived({ parallax: 50, parallax_err: 0.1 }).reason("abs_ks")).toBe("needs-ks");
  });
});

describe("default recipe", () => {
  test("a star like the Sun comes out like the Sun", () => {
    const star = derived(SUNLIKE);
    expect(star.method("teff")).toBe("sunlike-colour");
    expect(star.method("radius")).toBe("light-and-temperature");
    expect(star.method("luminosity")).toBe("correction-g");
    expect(star.method("mass")).toBe("spectrum");
    // Casagrande et al. 2021 makes the solar colour 5753 K; Torres et al. 2010 makes the Sun 5 % heavy.
    expect(Math.abs(star.value("teff") - 5772)).toBeLessThan(30);
    expect(Math.abs(star.value("luminosity") - 1)).toBeLessThan(0.02);
    expect(Math.abs(star.value("radius") - 1)).toBeLessThan(0.02);
    expect(star.value("mass")).toBeCloseTo(1.05, 1);
    expect(star.value("hz_inner")).toBeCloseTo(0.95, 1);
    expect(star.value("earth_period")).toBeGreaterThan(345);
    expect(words(star.flagBits)).toEqual([]);
  });

  test("gravity and iron that are not given are assumed, marked, and widen the errors", () => {
    const assumed = derived(without(SUNLIKE, "logg", "logg_err", "feh", "feh_err"));
    expect(words(assumed.flagBits)).toEqual(["assumed"]);
    expect(assumed.flags).toBe(0);
    expect(assumed.error("teff")).toBeGreaterThan(derived(SUNLIKE).error("teff"));
  });

  test("a cool dwarf takes the relations of cool dwarfs", () => {
    const star = derived(COOL);
    expect(star.method("teff")).toBe("cool-colour");
    expect(star.method("radius")).toBe("abs-ks");
    expect(star.method("mass")).toBe("abs-ks");
    expect(star.method("luminosity")).toBe("correction-ks");
    // M2V of the mean sequence: 3560 K, 0.446 R☉, 0.45 M☉, log L −1.54.
    expect(Math.abs(star.value("teff") / 3560 - 1)).toBeLessThan(0.05);
    expect(Math.abs(star.value("radius") / 0.446 - 1)).toBeLessThan(0.05);
    expect(Math.abs(Math.log10(star.value("luminosity")) + 1.54)).toBeLessThan(0.05);
    expect(words(star.flagBits)).toEqual([]);
  });

  test("[Fe/H] serves where it is given and inside the sample, and nowhere else", () => {
    const rich = derived({ ...COOL, feh: 0.3, feh_err: 0.08 });
    expect([rich.method("radius"), rich.method("mass")]).toEqual(["abs-ks-feh", "abs-ks-feh"]);
    const between = derived({ ...COOL, feh: 0.45, feh_err: 0.08 });
    expect([between.method("radius"), between.method("mass")]).toEqual(["abs-ks-feh", "abs-ks"]);
    const beyond = derived({ ...COOL, feh: 0.7, feh_err: 0.08 });
    expect([beyond.method("radius"), beyond.value("radius")]).toEqual([
      "abs-ks",
      derived(COOL).value("radius"),
    ]);
    expect(derived({ ...COOL, feh: 0.3 }, PRACTICE_RECIPE.settings).method("radius")).toBe("abs-ks");
  });

  test("a given temperature comes before colour; one that is no temperature does not", () => {
    const star = derived({ ...COOL, teff_given: 3400, teff_given_err: 70 });
    expect([star.method("teff"), star.value("teff")]).toEqual(["given", 3400]);
    expect(star.error("teff")).toBeCloseTo(70, 9);
    expect(derived({ ...COOL, teff_given: 0 }).method("teff")).toBe("cool-colour");
  });

  test("where both colour relations hold, 4000 K is where the one for cool dwarfs takes over", () => {
    // BP − RP 1.95 is inside both; the relation of stars like the Sun gives less than 4000 K there.
    const cool = derived({ ...COOL, bp_mag: 11.67, g_mag: 10.2 });
    expect([cool.method("teff"), Math.round(cool.value("teff"))]).toEqual(["cool-colour", 3962]);
    const warm = derived({ ...COOL, bp_mag: 11.32, g_mag: 9.9 });
    expect(warm.method("teff")).toBe("sunlike-colour");
    expect(warm.value("teff")).toBeGreaterThan(4000);
  });

  test("a colour outside the relation for cool dwarfs leaves the temperature to the next one", () => {
    // BP − RP 1.86 is bluer than the sample, and gives less than 4000 K by the relation of stars like the Sun.
    const star: Given = { ...COOL, bp_mag: 11.58, g_mag: 10.1, v_mag: 10.6, j_mag: 7.8 };
    expect(derived(without(star, "v_mag")).reason("teff")).toBe("outside-teff-relation");
    const byVJ = derived(star);
    expect(byVJ.method("teff")).toBe("cool-v-j");
    expect(byVJ.value("teff")).toBeGreaterThan(3800);
    expect(byVJ.value("teff")).toBeLessThan(4000);
  });

  test("where only the temperature rules a cool dwarf out, radius and mass say so", () => {
    const hot = derived({ ...COOL, teff_given: 4300 }, PRACTICE_RECIPE.settings);
    expect([hot.reason("radius"), hot.reason("mass")]).toEqual([
      "hotter-than-cool-dwarfs",
      "hotter-than-cool-dwarfs",
    ]);
    const faint = derived({ ...COOL, teff_given: 4300, ks_mag: 12 }, PRACTICE_RECIPE.settings);
    expect([faint.reason("radius"), faint.reason("mass")]).toEqual([
      "outside-radius-relation",
      "outside-mass-relation",
    ]);
  });

  test("BP and RP of stars that saturate give no temperature", () => {
    const bright = { ...SUNLIKE, bp_mag: 4.9, rp_mag: 4.1 };
    expect(derived(bright).reason("teff")).toBe("outside-teff-relation");
  });
});

describe("stars that are no dwarfs", () => {
  /** A red giant at 100 pc: BP − RP 1.3, M_G 0.5. */
  const GIANT: Given = {
    parallax: 10,
    parallax_err: 0.05,
    g_mag: 5.5,
    g_mag_err: 0.003,
    bp_mag: 6.4,
    rp_mag: 5.1,
    ks_mag: 3.2,
    ks_mag_err: 0.02,
    teff_given: 4700,
    teff_given_err: 60,
  };

  test("by place: flagged, no mass of a dwarf, but an honest radius from light and temperature", () => {
    const star = derived(GIANT);
    expect(words(star.flagBits)).toEqual(["not dwarf-like"]);
    expect(star.flags).toBe(1);
    expect(star.method("radius")).toBe("light-and-temperature");
    expect(star.value("radius")).toBeGreaterThan(8);
    expect(star.reason("mass")).toBe("not-dwarf-like");
    expect(star.reason("earth_period")).toBe("needs-mass");
    expect(star.value("hz_inner")).toBeGreaterThan(1);
  });

  test("by gravity: the M Ks relations are refused inside their range too", () => {
    const star = derived({ ...COOL, logg: 3.9, logg_err: 0.1 });
    expect(words(star.flagBits)).toContain("not dwarf-like");
    expect(star.method("radius")).not.toBe("abs-ks");
    expect(star.reason("mass")).toBe("not-dwarf-like");
    expect(derived({ ...COOL, logg: 4.0, logg_err: 0.1 }).method("radius")).toBe("abs-ks");
  });

  test("by place: one magnitude above the main sequence is the limit", () => {
    const at = (g: number) => words(derived({ ...COOL, g_mag: g }).flagBits);
    // The sequence has M_G 9.29 at BP − RP 2.23, so 10.795 at 20 pc.
    expect(at(9.81)).toEqual([]);
    expect(at(9.78)).toEqual(["not dwarf-like"]);
  });

  test("where neither gravity nor place is known no gravity is assumed for a mass", () => {
    const star = derived(without(GIANT, "bp_mag", "rp_mag"));
    expect(star.value("mass")).toBeNaN();
    expect(star.reason("mass")).toBe("outside-mass-relation");
  });
});

test("flags: a poor astrometric fit and shared light, with the limits of the recipe", () => {
  const at = (more: Given) => words(derived({ ...COOL, ...more }).flagBits);
  expect(at({ ruwe: 1.4, light_share: 0.98 })).toEqual([]);
  expect(at({ ruwe: 1.41 })).toEqual(["maybe two stars"]);
  expect(at({ light_share: 0.979 })).toEqual(["shared light"]);
  expect(derived({ ...COOL, ruwe: 3, light_share: 0.5 }).flags).toBe(2);
});

test("outside 2600 to 7200 K the habitable zone is blank, the orbit of Earth's light is not", () => {
  const hot = derived({ ...SUNLIKE, teff_given: 7300, teff_given_err: 80 });
  expect(hot.reason("hz_inner")).toBe("outside-habitable-zone");
  expect(hot.reason("hz_outer_period")).toBe("outside-habitable-zone");
  expect(hot.value("earth_distance")).toBeGreaterThan(0.5);
});

test("reasons read as sentences", () => {
  const codes = Object.values(derived({}).columns.blanks).map((blanks) => blanks[0] ?? 0);
  expect(codes).toHaveLength(STELLAR_KEYS.length);
  for (const code of codes) {
    expect(code).toBeGreaterThan(0);
    expect(blankReason(code).sentence).toMatch(/^[A-Z].*\.$/);
  }
});
