import fc from "fast-check";
import { evaluate } from "mathjs/number";
import { describe, expect, test } from "vitest";
import { STELLAR_DEFINITIONS } from "#server/derive/quantities.ts";
import { explain, type Subject } from "#server/workings/explain.ts";
import type { Working } from "#shared/api/workings.ts";
import { columnsOf } from "#shared/catalogue/columns.ts";
import type { DetectorCard } from "#shared/science/cards.ts";
import {
  DEFAULT_RECIPE,
  PRACTICE_RECIPE,
  type RecipeSettings,
  SUNLIKE_COLOURS,
} from "#shared/science/recipes.ts";
import {
  DETECTOR,
  type Given,
  PRACTICE_CAMPAIGN,
  PRACTICE_CARD,
  PRACTICE_STARS,
} from "#tests/unit/derive/practice-stars.ts";
import { assessed, derived } from "#tests/unit/derive/support.ts";

/** With every source of noise that a card can state. */
const FULL: DetectorCard = {
  ...DETECTOR,
  gain: 1.5,
  digitisation: 0.289,
  comparisonStars: 4,
  jitterPpm: 120,
  redNoisePpm: 80,
};
const OSBORN: DetectorCard = { ...FULL, scintillationLaw: "osborn", magnitudeSystem: "ab" };
const SPACE: DetectorCard = { ...FULL, siteAltitudeM: null };

const TRAPEZOID = { ...PRACTICE_CAMPAIGN, statistic: "trapezoid" } as const;
const DEFAULT = DEFAULT_RECIPE.settings;

/** Recipes that between them take every relation. */
const RECIPES: readonly RecipeSettings[] = [
  PRACTICE_RECIPE.settings,
  DEFAULT,
  { ...DEFAULT, radius: ["spectrum"], statistic: "trapezoid", eccentricity: { prior: "fixed", e: 0.4 } },
  { ...DEFAULT, extinction: { rule: "column" }, coolColours: ["v-j"], luminosity: ["correction-g"] },
  { ...DEFAULT, extinction: { rule: "by-distance", ebvPerKpc: 0.7 }, radius: ["light-and-temperature"] },
  {
    ...DEFAULT,
    distance: { ...DEFAULT.distance, order: ["inversion", "volume-prior"], zeroPointMas: -0.017 },
    extinction: { rule: "constant", ebv: 0.05 },
    habitableZone: { inner: "recent-venus", outer: "early-mars" },
    eccentricity: { prior: "beta", alpha: 0.867, beta: 3.03 },
  },
  ...SUNLIKE_COLOURS.map((colour): RecipeSettings => ({ ...DEFAULT, sunlikeColours: [colour] })),
];

const CARDS = [PRACTICE_CARD, FULL, OSBORN, SPACE];
const DERIVED_KEYS = columnsOf("stellar", "instrument").flatMap((c) => (c.key === "flags" ? [] : [c.key]));

const scopeOf = (working: Working): Record<string, number> =>
  Object.fromEntries(
    [...working.inputs, ...working.constants].flatMap(({ symbol, value }): [string, number][] =>
      value === null ? [] : [[symbol, value]],
    ),
  );

/** The value as the explanation alone gives it, once by its symbols and once by its numbers. */
const redone = (working: Working): number[] =>
  [evaluate(working.formula, scopeOf(working)), evaluate(working.substituted)].map(Number);

const expectRedone = (working: Working): void => {
  if (working.value === null || working.formula === "") return;
  const { value, isRoot } = working;
  if (isRoot) {
    // A root: the left side is as good as zero beside its largest term.
    const scope = { ...scopeOf(working), [working.symbol]: value };
    const size = value ** 2;
    expect(Math.abs(Number(evaluate(working.formula, scope))) / size).toBeLessThan(1e-6);
    return;
  }
  for (const again of redone(working)) {
    const isSame = again === value || Math.abs(again / value - 1) < 1e-9;
    expect([working.key, working.substituted, again, isSame]).toEqual([
      working.key,
      working.substituted,
      again,
      true,
    ]);
  }
};

describe("an explanation gives the number that it explains", () => {
  const maybe = (min: number, max: number) =>
    fc.option(fc.double({ min, max, noNaN: true }), { nil: undefined, freq: 8 });
  /** Nearby stars of every kind; colours follow from one number, so that relations hold often. */
  const star = fc
    .record({
      colour: fc.double({ min: 0.3, max: 4, noNaN: true }),
      parallax: maybe(1, 100),
      parallax_err: maybe(0.01, 2),
      logg: maybe(3.4, 5),
      feh: maybe(-0.8, 0.7),
      teff_given: fc.option(fc.double({ min: 2600, max: 7300, noNaN: true }), { nil: undefined, freq: 2 }),
      distance_given: fc.option(fc.double({ min: 5, max: 200, noNaN: true }), { nil: undefined, freq: 2 }),
      ebv: maybe(0, 0.3),
      light_share: maybe(0.5, 1),
      card_mag: fc.double({ min: 8, max: 14, noNaN: true }),
      abs_g: fc.double({ min: -0.3, max: 0.3, noNaN: true }),
    })
    .map(({ colour, abs_g, ...rest }): Given => {
      const absolute = 2.5 + 3.4 * colour + abs_g;
      const g = absolute - 5 + 5 * Math.log10(1000 / (rest.parallax ?? 20));
      const given: Record<string, number | undefined> = {
        ...rest,
        g_mag: g,
        bp_mag: g + 0.45 * colour,
        rp_mag: g - 0.55 * colour,
        v_mag: g + 0.3 * colour,
        j_mag: g - 1.1 * colour,
        h_mag: g - 1.5 * colour,
        ks_mag: g - 1.65 * colour,
        ks_mag_err: 0.02,
        g_mag_err: 0.01,
        bp_mag_err: 0.01,
        rp_mag_err: 0.01,
        card_mag_err: 0.01,
      };
      return Object.fromEntries(Object.entries(given).filter(([, value]) => value !== undefined)) as Given;
    });

  const seen = new Set<string>();

  test("whatever the star, the recipe, the card and the campaign", () => {
    const subject = fc.record({
      given: star,
      recipe: fc.constantFrom(...RECIPES),
      card: fc.constantFrom(...CARDS),
      campaign: fc.constantFrom(PRACTICE_CAMPAIGN, TRAPEZOID),
    });
    fc.assert(
      fc.property(subject, fc.constantFrom(...DERIVED_KEYS), (of, key) => {
        for (const working of explain(of, key)) {
          expectRedone(working);
          if (working.value !== null && working.formula !== "") seen.add(`${working.key} ${working.method}`);
        }
      }),
      { numRuns: 1500, seed: 20_261_201 },
    );
  });

  test("and every relation was among them", () => {
    for (const key of [...Object.keys(STELLAR_DEFINITIONS), "noise_1h", "transits", "r_min", "signal_hours"])
      expect([key, [...seen].some((name) => name.startsWith(`${key} `))]).toEqual([key, true]);
    for (const words of [
      "Mann et al. 2015), 55 K",
      "Torres",
      "prior",
      "BP − J",
      "G − RP",
      "as given",
      "[Fe/H]",
    ])
      expect([words, [...seen].some((name) => name.includes(words))]).toEqual([words, true]);
  });
});

describe("an explanation", () => {
  const subject: Subject = {
    given: { ...PRACTICE_STARS.A, ks_mag_err: 0.02, parallax_err: 0.05 },
    recipe: PRACTICE_RECIPE.settings,
    card: PRACTICE_CARD,
    campaign: PRACTICE_CAMPAIGN,
  };

  test("has the value and error that the catalogue has", () => {
    const star = derived(subject.given, subject.recipe);
    for (const key of ["radius", "mass", "luminosity", "hz_inner", "transit_probability"]) {
      const [working] = explain(subject, key);
      expect(working?.value).toBe(star.value(key));
      expect(working?.error ?? Number.NaN).toBe(star.error(key));
    }
    expect(explain(subject, "r_min")[0]?.value).toBe(assessed(subject.given).rMin);
  });

  test("goes down to what was given, each step once", () => {
    const keys = explain(subject, "r_min").map((working) => working.key);
    expect(new Set(keys).size).toBe(keys.length);
    expect(keys).toEqual(
      expect.arrayContaining([
        "r_min",
        "radius",
        "abs_ks",
        "distance",
        "noise_1h",
        "transits",
        "earth_period",
        "mass",
      ]),
    );
  });

  test("names the coefficients, the range and the source of the relation", () => {
    const [working] = explain(subject, "radius");
    expect(working?.formula).toBe("1.9515 - 0.352 * M_Ks + 0.0168 * M_Ks^2");
    expect(working?.ranges).toEqual([
      { symbol: "M_Ks", from: 4.6, to: 9.8, value: working?.inputs[0]?.value, holds: true },
    ]);
    expect(working?.reference).toContain("Mann et al. 2015, ApJ 804, 64");
    expect(working?.scatter).toBe("2.89 %");
  });

  test("of a blank says why, and which range was missed", () => {
    const giant = { ...subject, given: { ...subject.given, ks_mag: -0.2 } };
    const [working] = explain(giant, "radius");
    expect(working?.value).toBeNull();
    expect(working?.blank?.sentence).toContain("4.6 to 9.8");
    expect(working?.ranges[0]?.holds).toBe(false);
  });

  test("splits the error into what each source contributes, in quadrature", () => {
    const [working] = explain(subject, "radius");
    const parts = working?.errorParts.map((part) => part.size ?? Number.NaN) ?? [];
    expect(working?.errorParts.map((part) => part.source)).toEqual([
      "distance",
      "Ks magnitude",
      "scatter of the radius relation",
    ]);
    expect(Math.hypot(...parts)).toBeCloseTo((working?.error ?? 0) / (working?.value ?? 1), 12);
  });

  test("splits the error of the smallest planet, the noise of an uncertain magnitude included", () => {
    const given = { ...subject.given, teff_given_err: 60, card_mag_err: 0.3 };
    const [working] = explain({ ...subject, given }, "r_min");
    const parts = working?.errorParts.map((part) => part.size ?? Number.NaN) ?? [];
    expect(parts).toHaveLength(2);
    expect(Math.hypot(...parts)).toBeCloseTo((working?.error ?? 0) / (working?.value ?? 1), 12);
    const [exact] = explain({ ...subject, given: { ...given, card_mag_err: 0 } }, "r_min");
    expect(exact?.errorParts).toHaveLength(1);
  });

  test("of a trapezoid holds for a planet so large that it grazes on the mean chord", () => {
    for (const snrLimit of [7.1, 3000]) {
      const campaign = { ...TRAPEZOID, snrLimit };
      for (const working of explain({ ...subject, recipe: DEFAULT, campaign }, "r_min"))
        expectRedone(working);
    }
  });

  test("marks what was assumed", () => {
    const sunlike: Given = { parallax: 50, parallax_err: 0.1, g_mag: 6.4, bp_mag: 6.8, rp_mag: 5.95 };
    const teff = explain({ ...subject, given: sunlike, recipe: DEFAULT }, "teff")[0];
    expect(teff?.inputs.find((input) => input.symbol === "logg")?.origin).toBe("assumed");
  });

  test("of a quantity that there is not is empty", () => {
    expect(explain(subject, "designation")).toEqual([]);
    expect(explain({ ...subject, card: null }, "noise_1h")).toEqual([]);
  });
});
