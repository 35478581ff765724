import { expect, test } from "vitest";
import { absoluteMagnitude, distanceFromParallax } from "#shared/science/distance.ts";
import { at, referenceRows } from "./table.ts";

/** Both divide: the rounding of a few operations is all that may differ. */
const RELATIVE = 1e-14;

test("distances and distance moduli are those of astropy.coordinates.Distance", () => {
  for (const { input, expected } of referenceRows("distances")) {
    const distance = distanceFromParallax(at(input, 0), 0, 0.1, 0);
    expect(Math.abs(distance / at(expected, 0) - 1)).toBeLessThan(RELATIVE);
    expect(-absoluteMagnitude(0, distance, 0)).toBeCloseTo(at(expected, 1), 12);
  }
});
