import { describe, expect, test } from "vitest";
import { deriveColumns } from "#server/derive/derive.ts";
import type { StellarKey } from "#server/derive/star-columns.ts";
import { massScatter } from "#shared/science/cool-dwarf-mass-scatter.ts";
import { RADIUS_SCATTER } from "#shared/science/cool-dwarfs.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type RecipeSettings } from "#shared/science/recipes.ts";
import { type Given, PRACTICE_STARS } from "./practice-stars.ts";
import { derived } from "./support.ts";

const DRAWS = 40_000;

/** Normal deviates from a fixed seed (mulberry32, Box–Muller). */
const normalDeviates = (seed: number): (() => number) => {
  let state = seed;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
};

const deviation = (values: Float64Array): number => {
  const mean = values.reduce((sum, v) => sum + v, 0) / values.length;
  return Math.sqrt(values.reduce((sum, v) => sum + (v - mean) ** 2, 0) / (values.length - 1));
};

/**
 * Spread of the derived values when every given value with an error is drawn from its own normal distribution. The
 * scatter of the relations is no input and so is not in it.
 */
const spread = (
  given: Given,
  recipe: RecipeSettings,
  keys: readonly StellarKey[],
): Record<string, number> => {
  const normal = normalDeviates(20_260_101);
  const drawn = Object.fromEntries(
    Object.entries(given).map(([key, value]) => {
      const error = key.endsWith("_err") ? 0 : (given[`${key}_err`] ?? 0);
      return [key, Float64Array.from({ length: DRAWS }, () => value + error * normal())];
    }),
  );
  const { values } = deriveColumns(drawn, DRAWS, recipe);
  return Object.fromEntries(keys.map((key) => [key, deviation(values[key] ?? new Float64Array(0))]));
};

/** The first-order error with the scatter of the relations taken off again: what the inputs alone contribute. */
const fromInputs = (relative: number, ...scatters: number[]): number =>
  Math.sqrt(relative ** 2 - scatters.reduce((sum, s) => sum + s ** 2, 0));

describe("first-order errors against Monte Carlo", () => {
  /** Errors large enough to outweigh the scatter of the relations, small enough to stay linear. */
  const star: Given = { ...PRACTICE_STARS.A, ks_mag_err: 0.06, parallax_err: 0.6, teff_given_err: 60 };
  const one = derived(star, PRACTICE_RECIPE.settings);
  const seen = spread(star, PRACTICE_RECIPE.settings, [
    "distance",
    "abs_ks",
    "radius",
    "mass",
    "density",
    "luminosity",
    "hz_inner",
    "hz_outer_period",
    "earth_distance",
    "earth_period",
    "transit_probability",
    "transit_duration",
    "earth_depth",
  ]);

  /** Powers with which radius and mass enter, and so their scatters. */
  test.each<[StellarKey, number, number]>([
    ["distance", 0, 0],
    ["abs_ks", 0, 0],
    ["radius", 1, 0],
    ["mass", 0, 1],
    ["density", -3, 1],
    ["luminosity", 2, 0],
    ["hz_inner", 1, 0],
    ["hz_outer_period", 1.5, -0.5],
    ["earth_distance", 1, 0],
    ["earth_period", 1.5, -0.5],
    ["transit_duration", 1.5, -0.5],
    ["earth_depth", -2, 0],
  ])("%s", (key, radiusPower, massPower) => {
    const scale = key === "abs_ks" ? 1 : one.value(key);
    const expected = (seen[key] ?? Number.NaN) / scale;
    const found = fromInputs(
      one.error(key) / scale,
      radiusPower * RADIUS_SCATTER,
      massPower * massScatter(one.value("abs_ks")),
    );
    expect(Math.abs(found / expected - 1)).toBeLessThan(0.04);
  });

  test("where luminosity is R² T⁴ the probability owes nothing to the radius: R★ / a is set by temperature", () => {
    const relative = one.error("transit_probability") / one.value("transit_probability");
    expect(relative).toBeCloseTo((2 * 60) / 3350, 4);
    expect((seen.transit_probability ?? 0) / one.value("transit_probability")).toBeCloseTo(relative, 3);
  });
});

describe("what quantities share is not counted twice", () => {
  /** No Ks scatter of its own to hide behind: radius from M_Ks, luminosity from M_G, one parallax for both. */
  const star: Given = {
    parallax: 50,
    parallax_err: 2,
    ks_mag: 7.485,
    ks_mag_err: 0,
    g_mag: 10.795,
    g_mag_err: 0,
    teff_given: 3560,
    teff_given_err: 0,
  };

  test("a parallax moves radius and luminosity alike, so their ratio moves less", () => {
    const one = derived(star);
    expect(one.method("radius")).toBe("abs-ks");
    expect(one.method("luminosity")).toBe("correction-g");
    const seen = spread(star, DEFAULT_RECIPE.settings, ["radius", "luminosity", "transit_probability"]);
    const lightScatter = 0.4 * Math.LN10 * 0.05;
    const found = fromInputs(
      one.error("transit_probability") / one.value("transit_probability"),
      RADIUS_SCATTER,
      0.5 * lightScatter,
    );
    const expected = (seen.transit_probability ?? 0) / one.value("transit_probability");
    expect(Math.abs(found / expected - 1)).toBeLessThan(0.15);
    const asIfIndependent = Math.hypot(
      (seen.radius ?? 0) / one.value("radius"),
      (0.5 * (seen.luminosity ?? 0)) / one.value("luminosity"),
    );
    expect(expected).toBeLessThan(0.5 * asIfIndependent);
  });

  test("density through M Ks is surer than mass and radius on their own would make it", () => {
    const one = derived({ ...PRACTICE_STARS.A, ks_mag_err: 0.1 }, PRACTICE_RECIPE.settings);
    const relative = (key: string) => one.error(key) / one.value(key);
    expect(relative("density")).toBeLessThan(Math.hypot(relative("mass"), 3 * relative("radius")));
  });
});

/** What one given value adds to an error, against what a small change of it does to the value. */
const shares = (given: Given, input: string, sigma: number, key: string, recipe: RecipeSettings) => {
  const error = (own: number): number => derived({ ...given, [`${input}_err`]: own }, recipe).error(key);
  const value = (step: number): number =>
    derived({ ...given, [input]: (given[input] ?? 0) + step }, recipe).value(key);
  const step = sigma / 1000;
  return {
    propagated: Math.sqrt(error(sigma) ** 2 - error(0) ** 2),
    moved: (Math.abs(value(step) - value(-step)) / (2 * step)) * sigma,
  };
};

describe("a magnitude that enters twice is one source", () => {
  /** A G dwarf at 20 pc with all its errors. */
  const star: Given = {
    parallax: 50,
    parallax_err: 0.05,
    g_mag: 8.2,
    g_mag_err: 0.01,
    ks_mag: 6.7,
    ks_mag_err: 0.02,
    logg: 4.4,
    logg_err: 0.05,
    feh: 0,
    feh_err: 0.05,
  };
  const recipe: RecipeSettings = { ...DEFAULT_RECIPE.settings, sunlikeColours: ["g-ks"] };

  test.each([
    ["g_mag", "luminosity"],
    ["g_mag", "radius"],
    ["g_mag", "density"],
    ["ks_mag", "teff"],
    ["ks_mag", "hz_inner"],
  ])("%s in the colour and in the absolute magnitude: %s", (input, key) => {
    expect(derived(star, recipe).method("teff")).toBe("sunlike-g-ks");
    const { propagated, moved } = shares(star, input, 0.03, key, recipe);
    expect(propagated / moved).toBeCloseTo(1, 3);
  });

  test("Ks in the colour and in M Ks pulls temperature and radius in opposite ways", () => {
    /** K7V of the mean sequence at 20 pc. */
    const cool: Given = { ...star, g_mag: 9.075, ks_mag: 6.315 };
    const byRadius: RecipeSettings = { ...recipe, luminosity: ["radius-and-temperature"] };
    const { propagated, moved } = shares(cool, "ks_mag", 0.03, "luminosity", byRadius);
    expect(derived(cool, byRadius).method("radius")).toBe("abs-ks-feh");
    expect(propagated / moved).toBeCloseTo(1, 3);
  });

  test("BP − RP of the bolometric correction owes nothing to V − J of the temperature", () => {
    const dwarf: Given = { ...PRACTICE_STARS.A, v_mag: 12.1, j_mag: 8.1, v_mag_err: 0.02, j_mag_err: 0.02 };
    const cool: Given = {
      ...dwarf,
      bp_mag: 12.6,
      bp_mag_err: 0.1,
      rp_mag: 9.9,
      rp_mag_err: 0,
      ks_mag_err: 0.02,
    };
    const byVJ: RecipeSettings = { ...DEFAULT_RECIPE.settings, teff: ["cool-colour"], coolColours: ["v-j"] };
    const { propagated, moved } = shares(cool, "v_mag", 0.1, "hz_outer", byVJ);
    expect(derived(cool, byVJ).method("luminosity")).toBe("correction-ks");
    expect(propagated / moved).toBeCloseTo(1, 3);
  });
});

describe("the error of a colour excess", () => {
  /** A G dwarf whose extract gives the excess. */
  const star: Given = {
    parallax: 5,
    parallax_err: 0.02,
    g_mag: 13.2,
    g_mag_err: 0,
    bp_mag: 13.65,
    bp_mag_err: 0,
    rp_mag: 12.6,
    rp_mag_err: 0,
    ks_mag: 11.6,
    ks_mag_err: 0,
    ebv: 0.15,
    logg: 4.4,
    logg_err: 0.05,
    feh: 0,
    feh_err: 0.05,
  };
  const recipe: RecipeSettings = { ...DEFAULT_RECIPE.settings, extinction: { rule: "column" } };

  test.each(["abs_ks", "teff", "luminosity", "radius"])(
    "moves %s as the law has it at the star's colour",
    (key) => {
      const { propagated, moved } = shares(star, "ebv", 0.02, key, recipe);
      expect(propagated / moved).toBeCloseTo(1, 3);
    },
  );

  test("is not lost where the excess itself is 0", () => {
    const clear = { ...star, ebv: 0 };
    const { propagated } = shares(clear, "ebv", 0.02, "teff", recipe);
    const reddened = shares({ ...star, ebv: 1e-6 }, "ebv", 0.02, "teff", recipe);
    expect(propagated / reddened.propagated).toBeCloseTo(1, 3);
  });

  test("goes with the distance where the excess does", () => {
    const byDistance: RecipeSettings = {
      ...DEFAULT_RECIPE.settings,
      extinction: { rule: "by-distance", ebvPerKpc: 0.7 },
    };
    for (const key of ["abs_ks", "teff", "luminosity"]) {
      const { propagated, moved } = shares({ ...star, parallax_err: 0 }, "parallax", 0.1, key, byDistance);
      expect(propagated / moved).toBeCloseTo(1, 3);
    }
  });
});

describe("values without errors", () => {
  test("stand, with no error of their own", () => {
    const star = derived(PRACTICE_STARS.A, PRACTICE_RECIPE.settings);
    expect(star.value("luminosity")).toBeCloseTo(0.01269, 5);
    expect(star.error("luminosity")).toBeNaN();
    expect(star.reason("luminosity")).toBeUndefined();
    expect(star.error("radius")).toBeGreaterThan(0);
  });

  test("an error below zero is none", () => {
    const star = derived({ ...PRACTICE_STARS.A, ks_mag_err: -0.02 }, PRACTICE_RECIPE.settings);
    expect(star.error("abs_ks")).toBeNaN();
    expect(star.value("radius")).toBeCloseTo(0.3344, 4);
  });
});
