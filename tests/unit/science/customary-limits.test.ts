import { expect, test } from "vitest";
import { wingRadius } from "#shared/science/crowding.ts";
import { CUSTOMARY_LIMITS, moonClass } from "#shared/science/customary-limits.ts";

test("moonlight has three classes", () => {
  // Classes in common use for planning: dark up to 0.25, grey to 0.65, bright from there.
  expect([0, 0.25, 0.26, 0.64, 0.65, 1].map(moonClass)).toEqual([
    "dark",
    "dark",
    "grey",
    "grey",
    "bright",
    "bright",
  ]);
  expect(moonClass(1.1)).toBeNull();
  expect(moonClass(Number.NaN)).toBeNull();
});

test("twilights are 6° apart by definition", () => {
  expect(CUSTOMARY_LIMITS.twilight).toEqual({ civil: -6, nautical: -12, astronomical: -18 });
});

test("the wings of a star five magnitudes brighter reach ten times as far", () => {
  // Common practice, no source.
  expect(wingRadius(3, 5)).toBeCloseTo(30, 12);
  expect(wingRadius(3, 0)).toBe(3);
});
