import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { assessStar, newAssessment } from "#server/assess/assess.ts";
import { assessColumns, assessedKeys } from "#server/assess/columns.ts";
import { DEFAULT_RECIPE, PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { DETECTOR, type Given, PRACTICE_CAMPAIGN, PRACTICE_CARD, PRACTICE_STARS } from "./practice-stars.ts";
import { assessed, derived } from "./support.ts";

const A: Given = PRACTICE_STARS.A;
const withoutMagnitude: Given = Object.fromEntries(Object.entries(A).filter(([key]) => key !== "card_mag"));

describe("noise", () => {
  test("needs a magnitude in the card's passband, and only that", () => {
    const star = assessed(withoutMagnitude);
    expect([star.noise1h, star.noiseReason]).toEqual([Number.NaN, "needs-card-magnitude"]);
    expect([star.rMin, star.rMinReason]).toEqual([Number.NaN, "needs-card-magnitude"]);
    expect(star.transits).toBe(6);
    const alone = assessed({ card_mag: 10.2 });
    expect(alone.noise1h.toFixed(1)).toBe("102.8");
    expect(alone.rMinReason).toBe("needs-radius");
    expect(alone.transitsReason).toBe("needs-orbit");
  });

  test("outside the limits of the card it is blank, with the side named, and nothing is extrapolated", () => {
    expect(assessed({ ...A, card_mag: 6.99 }).noiseReason).toBe("too-bright");
    expect(assessed({ ...A, card_mag: 14.51 }).noiseReason).toBe("too-faint");
    expect(assessed({ ...A, card_mag: 14.51 }).rMinReason).toBe("too-faint");
    expect(assessed({ ...A, card_mag: 7 }).noiseReason).toBeUndefined();
  });

  test("a star that fills a pixel of the detector is too bright inside the card's own limit", () => {
    const bright = assessed({ ...A, card_mag: 7 }, PRACTICE_CAMPAIGN, DETECTOR);
    expect([bright.noise1h, bright.noiseReason]).toEqual([Number.NaN, "too-bright"]);
    const fit = assessed({ ...A, card_mag: 11 }, PRACTICE_CAMPAIGN, DETECTOR);
    expect(fit.noiseReason).toBeUndefined();
    expect(fit.noise1h).toBeGreaterThan(200);
    expect(fit.rMin).toBeGreaterThan(0);
  });
});

describe("smallest planet", () => {
  test("has an error where radius and orbit have one, and the magnitude adds to it", () => {
    expect(assessed(A).rMinError).toBeNaN();
    const sure = { ...A, teff_given_err: 50 };
    const seen = assessed(sure);
    // With L = R² T⁴ the smallest planet goes as R★^(5/8): 2.9 % of scatter become 1.8 %, and temperature and mass add little.
    expect(seen.rMinError / seen.rMin).toBeGreaterThan(0.018);
    expect(seen.rMinError / seen.rMin).toBeLessThan(0.021);
    const dim = assessed({ ...sure, card_mag_err: 0.2 });
    // Photon noise grows by 9 % in 0.2 mag, R_min by half of that.
    const alone = Math.sqrt((dim.rMinError / dim.rMin) ** 2 - (seen.rMinError / seen.rMin) ** 2);
    expect(alone).toBeGreaterThan(0.04);
    expect(alone).toBeLessThan(0.05);
  });

  test("without a light share the star counts as alone", () => {
    expect(assessed(A).rMin).toBe(assessed({ ...A, light_share: 1 }).rMin);
    expect(assessed({ ...A, light_share: 0.5 }).rMin / assessed(A).rMin).toBeCloseTo(Math.SQRT2, 9);
  });

  test.each([0, -0.2, 1.01])("a light share of %d is none", (share) => {
    const star = assessed({ ...A, light_share: share });
    expect([star.rMin, star.rMinReason]).toEqual([Number.NaN, "outside-light-share"]);
  });

  test("no transit at all is too few, even where the campaign asks for none", () => {
    const campaign = { ...PRACTICE_CAMPAIGN, lengthDays: 20, leastTransits: 0 };
    const star = assessed(A, campaign);
    expect([star.transits, star.rMin, star.rMinReason]).toEqual([0, Number.NaN, "too-few-transits"]);
  });

  test("a trapezoid asks for a little more than a box, by either rule of the duration", () => {
    const trapezoid = { ...PRACTICE_CAMPAIGN, statistic: "trapezoid" } as const;
    for (const recipe of [PRACTICE_RECIPE.settings, DEFAULT_RECIPE.settings]) {
      const box = assessed(A, PRACTICE_CAMPAIGN, PRACTICE_CARD, recipe).rMin;
      const ratio = assessed(A, trapezoid, PRACTICE_CARD, recipe).rMin / box;
      expect(ratio).toBeGreaterThan(1);
      expect(ratio).toBeLessThan(1.01);
    }
  });
});

test("each blank has a reason and each value has none, whatever the star", () => {
  const maybe = (min: number, max: number) =>
    fc.oneof(fc.constant(Number.NaN), fc.double({ min, max, noNaN: true }));
  const star = fc.record({
    magnitude: maybe(-5, 30),
    radius: maybe(0.05, 30),
    magnitudeError: maybe(0, 0.5),
    reachError: maybe(0, 5),
    earthDistance: maybe(0.001, 50),
    earthPeriod: maybe(0, 1e5),
    duration: maybe(0, 100),
    lightShare: maybe(-0.5, 1.5),
  });
  const campaign = fc.record({
    lengthDays: fc.double({ min: 0.1, max: 4000, noNaN: true }),
    duty: fc.double({ min: 0.01, max: 1, noNaN: true }),
    leastTransits: fc.integer({ min: 1, max: 5 }),
    snrLimit: fc.constant(7.1),
    statistic: fc.constantFrom("boxcar" as const),
  });
  fc.assert(
    fc.property(star, campaign, fc.constantFrom(PRACTICE_CARD, DETECTOR), (s, c, card) => {
      const out = assessStar(s, card, c, DEFAULT_RECIPE.settings, newAssessment());
      expect(Number.isNaN(out.noise1h)).toBe(out.noiseBlank !== 0);
      expect(Number.isNaN(out.transits)).toBe(out.transitsBlank !== 0);
      expect(Number.isNaN(out.rMin)).toBe(out.rMinBlank !== 0);
      if (out.rMinBlank === 0) expect(out.rMin).toBeGreaterThan(0);
      else expect(out.rMinError).toBeNaN();
    }),
    { numRuns: 500 },
  );
});

test("a block gives what its stars give one by one", () => {
  const stars = Object.values(PRACTICE_STARS);
  const values = stars.map((star) => derived(star, PRACTICE_RECIPE.settings));
  const columns = Object.fromEntries(
    assessedKeys(PRACTICE_CARD).map((key) => [
      key,
      Float64Array.from(stars, (star, i) =>
        key in star
          ? ((star as Given)[key] ?? Number.NaN)
          : (values[i]?.columns.values[key]?.[0] ?? Number.NaN),
      ),
    ]),
  );
  const out = assessColumns(
    columns,
    stars.length,
    PRACTICE_CARD,
    PRACTICE_CAMPAIGN,
    PRACTICE_RECIPE.settings,
  );
  expect([...out.transits]).toEqual([6, 20, 2]);
  expect([...out.r_min]).toEqual(stars.map((star) => assessed(star).rMin));
  expect([...out.r_min_err]).toEqual(stars.map((star) => assessed(star).rMinError));
});
