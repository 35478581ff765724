import { describe, expect, test } from "vitest";
import { recipeBody, recipeSettings } from "#shared/api/recipes.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type RecipeSettings } from "#shared/science/recipes.ts";

const { settings } = DEFAULT_RECIPE;

/** What is wrong with the settings so changed, by path. */
const wrongWith = (change: { readonly [K in keyof RecipeSettings]?: unknown }): Record<string, string> => {
  const parsed = recipeSettings.safeParse({ ...settings, ...change });
  if (parsed.success) return {};
  return Object.fromEntries(parsed.error.issues.map(({ path, message }) => [path.join("."), message]));
};

describe("settings of a recipe", () => {
  test.each([DEFAULT_RECIPE, PRACTICE_RECIPE])("$name holds", (recipe) => {
    expect(recipeSettings.parse(recipe.settings)).toEqual(recipe.settings);
  });

  test("ranges stay inside the published ones and the right way round", () => {
    const { ranges } = settings;
    const wrong = (change: Partial<typeof ranges>) => wrongWith({ ranges: { ...ranges, ...change } });
    // Mann et al. 2015, ApJ 804, 64: the radius holds for M_Ks 4.6 to 9.8.
    expect(wrong({ brightestAbsKs: 4.6, faintestAbsKs: 9.8 })).toEqual({});
    expect(wrong({ brightestAbsKs: 4.5 })).toEqual({
      "ranges.brightestAbsKs": "The brightest M_Ks lies between 4.6 and 9.8 mag.",
    });
    expect(wrong({ faintestAbsKs: 9.9 })).toHaveProperty(["ranges.faintestAbsKs"]);
    expect(wrong({ brightestAbsKs: 8, faintestAbsKs: 8 })).toEqual({
      "ranges.faintestAbsKs": "The faintest M_Ks must be a larger magnitude than the brightest.",
    });
  });

  test.each(["teff", "sunlikeColours", "coolColours", "radius", "mass", "luminosity"] as const)(
    "the order of %s has something in it, and nothing twice or unknown",
    (key) => {
      expect(wrongWith({ [key]: [] })[key]).toMatch(/^At least one /);
      expect(wrongWith({ [key]: [settings[key][0], settings[key][0]] })[key]).toMatch(/once\.$/);
      expect(Object.keys(wrongWith({ [key]: ["guess"] }))).toEqual([`${key}.0`]);
    },
  );

  test("the inner limit is an inner one, the outer an outer one", () => {
    const swapped = { inner: "maximum-greenhouse", outer: "runaway-greenhouse" };
    expect(wrongWith({ habitableZone: swapped })).toEqual({
      "habitableZone.inner": "The inner limit is that of recent Venus or of a runaway greenhouse.",
      "habitableZone.outer": "The outer limit is that of the maximum greenhouse or of early Mars.",
    });
    expect(wrongWith({ habitableZone: { inner: "recent-venus", outer: "early-mars" } })).toEqual({});
  });

  test.each([
    ["distance", { ...settings.distance, fractionLimit: 0.51 }, "distance.fractionLimit"],
    ["distance", { ...settings.distance, zeroPointMas: Number.NaN }, "distance.zeroPointMas"],
    ["eccentricity", { prior: "fixed", e: 0.96 }, "eccentricity.e"],
    ["eccentricity", { prior: "beta", alpha: 0.867, beta: 1 }, "eccentricity.beta"],
    ["extinction", { rule: "constant", ebv: -0.01 }, "extinction.ebv"],
    ["extinction", { rule: "constant", ebv: 5.1 }, "extinction.ebv"],
    ["extinction", { rule: "by-distance" }, "extinction.ebvPerKpc"],
    ["assumed", { ...settings.assumed, logg: 3.9 }, "assumed.logg"],
    ["astrometricQuality", { limit: 0, byRelease: [] }, "astrometricQuality.limit"],
    [
      "astrometricQuality",
      { limit: 1.4, byRelease: [{ release: " ", limit: 1.4 }] },
      "astrometricQuality.byRelease.0.release",
    ],
    [
      "astrometricQuality",
      {
        limit: 1.4,
        byRelease: [
          { release: "Invented 1", limit: 1.4 },
          { release: "Invented 1", limit: 2 },
        ],
      },
      "astrometricQuality.byRelease",
    ],
  ])("%s %j is refused at the setting", (key, value, path) => {
    expect(Object.keys(wrongWith({ [key]: value }))).toEqual([path]);
  });

  test("nothing that no relation reads is taken along", () => {
    expect(recipeSettings.safeParse({ ...settings, colour: "red" }).success).toBe(false);
  });
});

test("a recipe is made with settings of its own or as a copy, not both and not neither", () => {
  const fits = (more: object) => recipeBody.safeParse({ name: "Mine", ...more }).success;
  expect([fits({ settings }), fits({ copyOf: "1" }), fits({ settings, copyOf: "1" }), fits({})]).toEqual([
    true,
    true,
    false,
    false,
  ]);
});
