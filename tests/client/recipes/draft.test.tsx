import { describe, expect, test } from "vitest";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type RecipeSettings } from "#shared/science/recipes.ts";
import { recipeDifferences, settingLines } from "#src/features/settings/recipe-differences.ts";
import {
  applies,
  draftOfRecipe,
  type RecipeDraft,
  recipeDraftSchema,
  wrongAmongChanged,
} from "#src/features/settings/recipe-draft.ts";
import { moved } from "#src/features/settings/recipe-order.tsx";

const opened = draftOfRecipe(DEFAULT_RECIPE);

const messagesOf = (change: Partial<RecipeDraft>): Record<string, string> => {
  const parsed = recipeDraftSchema.safeParse({ ...opened, ...change });
  return Object.fromEntries(
    (parsed.error?.issues ?? []).map(({ path, message }) => [path.join("."), message]),
  );
};

const EVERYTHING: RecipeSettings = {
  ...DEFAULT_RECIPE.settings,
  astrometricQuality: { limit: 1.4, byRelease: [{ release: "Invented 1", limit: 1.25 }] },
  extinction: { rule: "by-distance", ebvPerKpc: 0.7 },
  eccentricity: { prior: "beta", alpha: 0.867, beta: 3.03 },
  habitableZone: { inner: "recent-venus", outer: "early-mars" },
};

describe("a recipe as it is typed", () => {
  test.each([
    ["the default", DEFAULT_RECIPE.settings],
    ["the practice one", PRACTICE_RECIPE.settings],
    ["one with everything", EVERYTHING],
  ])("gives back the recipe it was made from: %s", (_, settings) => {
    const recipe = { name: "Ours", note: "As published.", settings };
    expect(recipeDraftSchema.parse(draftOfRecipe(recipe))).toEqual(recipe);
  });

  test("reads numbers with spaces between thousands and a true minus", () => {
    const read = recipeDraftSchema.parse({ ...opened, zeroPointMas: "−0.02", coolestSunlikeK: "4 100" });
    expect(read.settings.distance.zeroPointMas).toBe(-0.02);
    expect(read.settings.ranges.coolestSunlikeK).toBe(4100);
  });

  test("says beside each field what is wrong with it", () => {
    expect(
      messagesOf({
        name: " ",
        fractionLimit: "",
        loggError: "0,3",
        feh: "solar",
        faintestAbsKs: "10.4",
        teff: [],
        releases: [{ key: "a", release: "", limit: "x" }],
      }),
    ).toEqual({
      name: "Give it a name.",
      fractionLimit: "It is blank. Enter a number.",
      loggError: "“0,3”: use a point for decimals here (0.3).",
      feh: "“solar” is not a number. Enter it in figures.",
      faintestAbsKs: "The faintest M_Ks lies between 4.6 and 9.8 mag.",
      teff: "At least one way to a temperature is needed.",
      "releases.0.release": "Name the release.",
      "releases.0.limit": "“x” is not a number. Enter it in figures.",
    });
  });

  test("asks only for what applies", () => {
    expect(applies(opened, "ebv")).toBe(false);
    expect(messagesOf({ ebv: "much" })).toEqual({});
    expect(messagesOf({ ebv: "much", extinctionRule: "constant" })).toHaveProperty("ebv");
    const constant = recipeDraftSchema.parse({ ...opened, extinctionRule: "constant", ebv: "0.2" });
    expect(constant.settings.extinction).toEqual({ rule: "constant", ebv: 0.2 });
  });

  test("is checked while it is typed, but only where something was changed", () => {
    const broken = { ...opened, e: "2", prior: "fixed", ebv: "9" };
    expect(wrongAmongChanged(broken, opened)).toEqual({ e: "An eccentricity lies between 0 and 0.95." });
    expect(wrongAmongChanged(broken, broken)).toEqual({});
  });
});

describe("recipes side by side", () => {
  const lines = (groups: ReturnType<typeof settingLines>) => groups.flatMap((group) => group.lines);

  test("are told apart by what differs alone", () => {
    const found = lines(recipeDifferences([DEFAULT_RECIPE, PRACTICE_RECIPE]));
    expect(found.find(({ key }) => key === "usesFeh")?.values).toEqual(["Where it is given", "Never"]);
    expect(found.find(({ key }) => key === "distanceOrder")?.values).toEqual([
      "1. Distance as given; 2. Inverse of the parallax",
      "Inverse of the parallax",
    ]);
    expect(found.map(({ key }) => key)).not.toContain("ruweLimit");
    expect(recipeDifferences([DEFAULT_RECIPE, DEFAULT_RECIPE])).toEqual([]);
  });

  test("show every setting that applies to one of them, in words", () => {
    const alone = lines(settingLines([DEFAULT_RECIPE]));
    expect(alone.map(({ key }) => key)).not.toContain("ebvPerKpc");
    const beside = lines(settingLines([DEFAULT_RECIPE, { settings: EVERYTHING }]));
    expect(beside.find(({ key }) => key === "ebvPerKpc")?.values).toEqual([null, "0.7 mag/kpc"]);
    expect(beside.find(({ key }) => key === "releases")?.values).toEqual(["none", "Invented 1: 1.25"]);
  });
});

test("a part of an order moves by one place and never over an end", () => {
  expect(moved(["a", "b", "c"], "c", "up")).toEqual(["a", "c", "b"]);
  expect(moved(["a", "b", "c"], "a", "down")).toEqual(["b", "a", "c"]);
  expect(moved(["a", "b", "c"], "a", "up")).toEqual(["a", "b", "c"]);
  expect(moved(["a", "b", "c"], "c", "down")).toEqual(["a", "b", "c"]);
});
