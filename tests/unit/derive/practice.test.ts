import { describe, expect, test } from "vitest";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { flagsIn } from "#shared/catalogue/flags.ts";
import { lightShareOfPair } from "#shared/science/light-share.ts";
import { PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { PRACTICE_CAMPAIGN, PRACTICE_STARS } from "./practice-stars.ts";
import { assessed, derived } from "./support.ts";

/** The printed figures of the practice stars: text, so that the digits printed are the digits compared. */
const PRINTED = {
  A: {
    abs_ks: "6.803",
    radius: "0.3344",
    mass: "0.3162",
    luminosity: "0.01269",
    hz_inner: "0.1169",
    hz_outer: "0.2287",
    hz_inner_period: "25.96",
    hz_outer_period: "71.05",
    earth_distance: "0.1126",
    earth_period: "24.55",
    transit_probability: "1.38",
    transit_duration: "2.59",
    earth_depth: "752",
    transits: "6",
    noise1h: "102.8",
    rMin: "0.496",
  },
  B: {
    abs_ks: "8.981",
    radius: "0.1452",
    mass: "0.1182",
    luminosity: "0.00144",
    hz_inner: "0.0395",
    hz_outer: "0.0788",
    hz_inner_period: "8.35",
    hz_outer_period: "23.50",
    earth_distance: "0.0379",
    earth_period: "7.85",
    transit_probability: "1.78",
    transit_duration: "1.07",
    earth_depth: "3985",
    transits: "20",
    noise1h: "294.1",
    rMin: "0.337",
  },
  C: {
    abs_ks: "4.777",
    radius: "0.6533",
    mass: "0.6294",
    luminosity: "0.06825",
    hz_inner: "0.2701",
    hz_outer: "0.5207",
    hz_inner_period: "64.63",
    hz_outer_period: "173.01",
    earth_distance: "0.2612",
    earth_period: "61.48",
    transit_probability: "1.16",
    transit_duration: "5.46",
    earth_depth: "197",
    transits: "2",
    noise1h: "64.7",
    rMin: "0.840",
  },
} as const;

const decimalsOf = (printed: string): number => printed.split(".")[1]?.length ?? 0;

const figuresOf = (name: keyof typeof PRINTED): Record<string, string> => {
  const star = derived(PRACTICE_STARS[name], PRACTICE_RECIPE.settings);
  const seen = assessed(PRACTICE_STARS[name]);
  const found: Record<string, number> = {
    transits: seen.transits,
    noise1h: seen.noise1h,
    rMin: seen.rMin,
    transit_probability: 100 * star.value("transit_probability"),
  };
  return Object.fromEntries(
    Object.entries(PRINTED[name]).map(([key, printed]) => [
      key,
      (found[key] ?? star.value(key)).toFixed(decimalsOf(printed)),
    ]),
  );
};

describe("practice stars", () => {
  test.each(["A", "B", "C"] as const)("star %s has the printed figures", (name) => {
    expect(figuresOf(name)).toEqual(PRINTED[name]);
  });

  test("star A has a radius of 0.334 ± 0.010 solar radii", () => {
    const star = derived(PRACTICE_STARS.A, PRACTICE_RECIPE.settings);
    expect(star.value("radius").toFixed(3)).toBe("0.334");
    expect(star.error("radius").toFixed(3)).toBe("0.010");
  });

  test("a neighbour 1.5 mag fainter in the aperture makes 0.496 into 0.555 and sets the flag", () => {
    const blended = { ...PRACTICE_STARS.A, light_share: lightShareOfPair(1.5) };
    expect(blended.light_share.toFixed(4)).toBe("0.7992");
    expect(assessed(blended).rMin.toFixed(3)).toBe("0.555");
    expect(assessed(blended).transits).toBe(6);
    const star = derived(blended, PRACTICE_RECIPE.settings);
    expect(flagsIn(star.flagBits).map((flag) => flag.word)).toEqual(["shared light"]);
    expect(star.flags).toBe(1);
  });

  test("90 days leave 3, 10 and 1 transits; fewer than the campaign asks for is blank with a reason", () => {
    const short = { ...PRACTICE_CAMPAIGN, lengthDays: 90, leastTransits: 2 };
    const [a, b, c] = [PRACTICE_STARS.A, PRACTICE_STARS.B, PRACTICE_STARS.C].map((s) => assessed(s, short));
    expect([a?.transits, a?.rMin.toFixed(3)]).toEqual([3, "0.590"]);
    expect([b?.transits, b?.rMin.toFixed(3)]).toEqual([10, "0.400"]);
    expect([c?.transits, c?.rMin, c?.rMinReason]).toEqual([1, Number.NaN, "too-few-transits"]);
  });

  test("a giant has no value from the dwarf relations, and says why", () => {
    const giant = derived(
      { ks_mag: 7.7, ks_mag_err: 0.02, parallax: 1.585, parallax_err: 0.02, teff_given: 4200 },
      PRACTICE_RECIPE.settings,
    );
    expect(giant.value("abs_ks").toFixed(1)).toBe("-1.3");
    for (const key of ["radius", "mass", "luminosity", "hz_inner", "earth_period", "transit_probability"])
      expect([key, giant.value(key), giant.reason(key)]).toEqual([key, Number.NaN, expect.any(String)]);
    expect(giant.reason("radius")).toBe("outside-radius-relation");
    expect(blankReason(8).sentence).toContain("4.6 to 9.8");
  });
});
