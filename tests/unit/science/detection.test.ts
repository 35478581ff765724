import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { CampaignSettings, FormulaCard } from "#shared/science/cards.ts";
import { detectableRadius, smallestPlanet, transitsInCampaign } from "#shared/science/detection.ts";
import {
  lightShareFromOthers,
  lightShareOfMany,
  lightShareOfPair,
  othersFromLightShare,
  radiusFactor,
  undilutedDepth,
} from "#shared/science/light-share.ts";
import { reachByPeriod } from "#shared/science/reach.ts";
import { PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { transitDuration } from "#shared/science/transit.ts";

const CAMPAIGN: CampaignSettings = {
  lengthDays: 180,
  duty: 0.9,
  leastTransits: 2,
  snrLimit: 7.1,
  statistic: "boxcar",
};

describe("smallest planet", () => {
  /** Computed: radius of the star, noise on the transit's time scale, transits, light share, Earth radii. */
  test.each([
    [1, 50, 4, 1, 1.453215],
    [1, 50, 4, 0.8, 1.624744],
    [1, 14.0905, 4, 1, 0.77145],
    [0.5, 100, 10, 1, 0.817203],
    [0.12, 1000, 30, 1, 0.47126],
  ])("R★ %d, %d ppm, %d transits, share %d: %d Earth radii", (radius, noise, transits, share, expected) => {
    expect(smallestPlanet(radius, 7.1, noise, transits, 1, share)).toBeCloseTo(expected, 5);
  });

  test("limb darkening deepens a transit, and so finds a smaller planet", () => {
    expect(smallestPlanet(1, 7.1, 50, 4, 1, 1, 1.18)).toBeCloseTo(1.337793, 5);
    expect(smallestPlanet(0.12, 7.1, 1000, 30, 1, 0.7, 1.15618)).toBeCloseTo(0.52384, 5);
  });

  test("an Earth in 13.09548 hours at 20 ppm in 6.5 hours, four times: a statistic of 11.930", () => {
    const noise1h = 20 * Math.sqrt(6.5);
    expect(smallestPlanet(1, 11.93, noise1h, 4, 13.09548, 1)).toBeCloseTo(1, 4);
  });

  test("a trapezoid weighs (T14 + 2 T23) / 3 and so asks for a slightly larger planet", () => {
    const [radius, noise, transits, period, a] = [0.3344, 102.8, 6, 24.55, 72.4];
    const hours = transitDuration(24 * period, a, 0, 0);
    const of = (statistic: CampaignSettings["statistic"]) =>
      detectableRadius(
        { ...CAMPAIGN, statistic },
        PRACTICE_RECIPE.settings,
        radius,
        noise,
        Number.NaN,
        transits,
        period,
        a,
        hours,
      );
    const k = of("boxcar") / (109.0764 * radius);
    // T14 and T23 of a central transit are (1 ± k) times the point's, so the mean is (1 − k/3): its fourth root.
    expect(of("trapezoid") / of("boxcar")).toBeCloseTo((1 - k / 3) ** -0.25, 5);
  });
});

describe("transits in a campaign", () => {
  test("whole ones only", () => {
    expect(transitsInCampaign(CAMPAIGN, 24.55)).toBe(6);
    expect(transitsInCampaign(CAMPAIGN, 163)).toBe(0);
    expect(transitsInCampaign(CAMPAIGN, Number.NaN)).toBeNaN();
  });

  test("decimal settings that fit exactly count, whatever binary makes of them", () => {
    expect(100 * 0.29).toBeLessThan(29);
    expect(transitsInCampaign({ ...CAMPAIGN, lengthDays: 100, duty: 0.29 }, 29)).toBe(1);
  });
});

describe("light share", () => {
  /** 1 / (1 + 10^(−1.6)) is 0.975497, which prints as 0.975. */
  test.each([
    [0, "0.500", "1.414"],
    [1, "0.715", "1.182"],
    [1.5, "0.799", "1.119"],
    [2, "0.863", "1.076"],
    [3, "0.941", "1.031"],
    [4, "0.975", "1.012"],
  ])("a neighbour %d mag fainter leaves %s, a factor of %s", (delta, share, factor) => {
    expect(lightShareOfPair(delta).toFixed(3)).toBe(share);
    expect(radiusFactor(lightShareOfPair(delta)).toFixed(3)).toBe(factor);
  });

  test("a share outside 0 to 1 has no factor", () => {
    for (const share of [0, -0.1, 1.01, Number.NaN]) {
      expect(radiusFactor(share)).toBeNaN();
      expect(undilutedDepth(100, share)).toBeNaN();
      expect(othersFromLightShare(share)).toBeNaN();
    }
    expect(lightShareFromOthers(-0.1)).toBeNaN();
  });

  test("several neighbours add their light", () => {
    expect(lightShareOfMany([])).toBe(1);
    expect(lightShareOfMany([1.5])).toBeCloseTo(lightShareOfPair(1.5), 12);
    expect(lightShareOfMany([0, 0, 0])).toBeCloseTo(0.25, 12);
    expect(lightShareOfMany([1, Number.NaN])).toBeNaN();
  });

  test("depth grows as the square of the radius factor; both ratios convert into each other", () => {
    const share = fc.double({ min: 0.01, max: 1, noNaN: true });
    fc.assert(
      fc.property(share, (s) => {
        expect(undilutedDepth(100, s)).toBeCloseTo(100 * radiusFactor(s) ** 2, 8);
        expect(lightShareFromOthers(othersFromLightShare(s))).toBeCloseTo(s, 12);
      }),
    );
    // A transit on the fainter of two stars, 2 mag apart: its own share counts, and the depth is 7.3 times as seen (computed).
    expect(undilutedDepth(1, lightShareOfPair(-2))).toBeCloseTo(7.31, 2);
  });
});

describe("reach by period", () => {
  const card: FormulaCard = {
    model: "formula",
    passband: "card_mag",
    referenceMagnitude: 10,
    photonPpm: 90,
    backgroundPpm: 12,
    floorPpm: 25,
    brightLimit: 7,
    faintLimit: 14.5,
  };
  const star = { magnitude: 10.2, radius: 0.3344, earthDistance: 0.1126, earthPeriod: 24.55, lightShare: 1 };
  const reach = (periods: number[], campaign = CAMPAIGN) =>
    reachByPeriod(star, card, campaign, PRACTICE_RECIPE.settings, periods).map((point) => point.rMin);

  test("passes through the star's own value", () => {
    expect(reach([24.55])[0]?.toFixed(3)).toBe("0.496");
  });

  test("steps up where a transit is lost, and ends where too few fit", () => {
    const [before, after] = reach([162 / 6 - 0.001, 162 / 6 + 0.001]);
    expect((after ?? 0) / (before ?? 0)).toBeCloseTo((6 / 5) ** 0.25, 4);
    expect(reach([80.9, 81.1])).toEqual([expect.any(Number), null]);
    expect(reach([81.1], { ...CAMPAIGN, leastTransits: 1 })).toEqual([expect.any(Number)]);
  });

  test("an orbit inside the star and a star outside the card's limits are blank", () => {
    expect(reach([0.001])).toEqual([null]);
    expect(
      reachByPeriod({ ...star, magnitude: 3 }, card, CAMPAIGN, PRACTICE_RECIPE.settings, [10]).map(
        (p) => p.rMin,
      ),
    ).toEqual([null]);
  });
});

test("more time, more transits, less noise and a purer light never ask for a larger planet", () => {
  const positive = fc.double({ min: 0.1, max: 100, noNaN: true });
  const share = fc.double({ min: 0.05, max: 1, noNaN: true });
  fc.assert(
    fc.property(positive, positive, fc.integer({ min: 1, max: 100 }), share, (noise, hours, transits, s) => {
      const least = smallestPlanet(0.5, 7.1, noise, transits, hours, s);
      expect(smallestPlanet(0.5, 7.1, noise, transits + 1, hours, s)).toBeLessThan(least);
      expect(smallestPlanet(0.5, 7.1, noise, transits, hours * 1.1, s)).toBeLessThan(least);
      expect(smallestPlanet(0.5, 7.1, noise * 1.1, transits, hours, s)).toBeGreaterThan(least);
      expect(smallestPlanet(0.5, 7.1, noise, transits, hours, s / 2)).toBeGreaterThan(least);
    }),
  );
});
