import { describe, expect, test } from "vitest";
import { drawStar } from "#server/workings/draws.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE, type RecipeSettings } from "#shared/science/recipes.ts";
import {
  type Given,
  PRACTICE_CAMPAIGN,
  PRACTICE_CARD,
  PRACTICE_STARS,
} from "#tests/unit/derive/practice-stars.ts";
import { assessed, derived } from "#tests/unit/derive/support.ts";

const DRAWS = 8_000;
const options = { draws: DRAWS, seed: 1, card: PRACTICE_CARD, campaign: PRACTICE_CAMPAIGN };

/** Every input with an error, small enough to stay linear. */
const SURE: Given = {
  ...PRACTICE_STARS.A,
  ks_mag_err: 0.02,
  parallax_err: 0.1,
  teff_given_err: 50,
  card_mag_err: 0.01,
};

/** A star like the Sun at 20 pc. */
const SUNLIKE: Given = {
  parallax: 50,
  parallax_err: 0.1,
  g_mag: 6.155 + 5 * Math.log10(2) - 0.011,
  g_mag_err: 0.01,
  bp_mag: 6.5 + 1.5,
  bp_mag_err: 0.01,
  rp_mag: 5.68 + 1.5,
  rp_mag_err: 0.01,
  ks_mag: 6.2,
  ks_mag_err: 0.02,
  logg: 4.44,
  logg_err: 0.05,
  feh: 0,
  feh_err: 0.05,
};

const halfWidth = (interval: { p16: number; p84: number } | null | undefined): number =>
  interval ? (interval.p84 - interval.p16) / 2 : Number.NaN;

describe("draws and first-order errors agree where the relations are near linear", () => {
  const cases: readonly [string, Given, RecipeSettings][] = [
    ["a cool dwarf by the practice recipe", SURE, PRACTICE_RECIPE.settings],
    [
      "a cool dwarf by the default recipe",
      { ...SURE, bp_mag: 11.6, bp_mag_err: 0.01, rp_mag: 9.2, rp_mag_err: 0.01 },
      DEFAULT_RECIPE.settings,
    ],
    ["a star like the Sun by the default recipe", SUNLIKE, DEFAULT_RECIPE.settings],
  ];

  test.each(cases)("%s", (_, given, recipe) => {
    const one = derived(given, recipe);
    const intervals = drawStar(given, recipe, options);
    expect(Object.keys(intervals)).toContain("earth_period");
    for (const [key, interval] of Object.entries(intervals)) {
      if (key === "r_min") continue;
      const ratio = halfWidth(interval) / one.error(key);
      // 8 000 draws know a width to one percent; the rest is curvature.
      expect([key, ratio > 0.9 && ratio < 1.1]).toEqual([key, true]);
      expect([key, Math.abs((interval?.p50 ?? 0) - one.value(key)) < 0.15 * one.error(key)]).toEqual([
        key,
        true,
      ]);
    }
  });

  test("the smallest planet too, whose parts share their inputs", () => {
    // One and a half periods: the number of transits, which moves in steps, is the same in every draw.
    const campaign = {
      ...PRACTICE_CAMPAIGN,
      leastTransits: 1,
      lengthDays: (1.5 * 24.55) / PRACTICE_CAMPAIGN.duty,
    };
    const one = assessed(SURE, campaign);
    const interval = drawStar(SURE, PRACTICE_RECIPE.settings, { ...options, campaign }).r_min;
    expect(halfWidth(interval) / one.rMinError).toBeGreaterThan(0.9);
    expect(halfWidth(interval) / one.rMinError).toBeLessThan(1.1);
  });
});

test("the same seed draws the same digits, another seed others", () => {
  const of = (seed: number) => drawStar(SURE, PRACTICE_RECIPE.settings, { ...options, draws: 500, seed });
  expect(of(7)).toEqual(of(7));
  expect(of(8)).not.toEqual(of(7));
});

test("an input without an error leaves no interval of what needs it", () => {
  const intervals = drawStar(PRACTICE_STARS.A, PRACTICE_RECIPE.settings, { ...options, draws: 500 });
  expect(intervals.radius).toBeDefined();
  expect(intervals.luminosity).toBeUndefined();
});

test("draws that leave the range of a relation are counted and not bent back into it", () => {
  // M_Ks 4.65 ± 0.1: about a third of the draws are too bright for the relation.
  const edge: Given = { ...SURE, ks_mag: 4.65 - 5 + 5 * Math.log10(1000 / 60), ks_mag_err: 0.1 };
  expect(drawStar(edge, PRACTICE_RECIPE.settings, options).radius).toBeNull();
  const inside: Given = { ...edge, ks_mag: (edge.ks_mag ?? 0) + 0.08 };
  const share = drawStar(inside, PRACTICE_RECIPE.settings, options).radius?.blankShare ?? 0;
  expect(share).toBeGreaterThan(0.05);
  expect(share).toBeLessThan(0.16);
});

test("a distance by the volume prior is drawn from its own distribution", () => {
  const recipe: RecipeSettings = {
    ...DEFAULT_RECIPE.settings,
    distance: { ...DEFAULT_RECIPE.settings.distance, order: ["inversion", "volume-prior"] },
  };
  const interval = drawStar({ parallax: 10, parallax_err: 2 }, recipe, options).distance;
  // Computed by integration of the posterior: 99.285, 129.936 and 211.312 pc.
  expect(interval?.p16).toBeCloseTo(99.3, -1);
  expect((interval?.p50 ?? 0) / 129.936).toBeCloseTo(1, 1);
  expect((interval?.p84 ?? 0) / 211.312).toBeCloseTo(1, 1);
});
