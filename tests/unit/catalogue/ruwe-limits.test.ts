import { expect, test } from "vitest";
import { ruweLimits } from "#server/catalogue/ruwe-limits.ts";

const byRelease = [
  { release: "Invented 1", limit: 1.25 },
  { release: "Invented 2", limit: 2 },
];

test("each star takes the limit of its release as it is spelt; others are left to the general one", () => {
  const limits = ruweLimits(["Invented 2", null, "Invented 1", "invented 1", "Invented 3"], {
    limit: 1.4,
    byRelease,
  });
  expect(limits).toEqual(Float64Array.of(2, Number.NaN, 1.25, Number.NaN, Number.NaN));
});

test("there is nothing to hand on where one limit serves all releases", () => {
  expect(ruweLimits(["Invented 1"], { limit: 1.4, byRelease: [] })).toBeNull();
});
