import fc from "fast-check";
import { expect, test } from "vitest";
import { wrapDegrees } from "#shared/science/angles.ts";

test("every angle has its place within 0 ≤ angle < 360", () => {
  expect(wrapDegrees(360)).toBe(0);
  expect(wrapDegrees(-90)).toBe(270);
  expect(wrapDegrees(-360)).toBe(0);
  expect(wrapDegrees(1082.5)).toBe(2.5);
  expect(wrapDegrees(-1e-20)).toBe(0);
  expect(wrapDegrees(Number.NaN)).toBeNaN();
  fc.assert(
    fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (angle) => {
      const wrapped = wrapDegrees(angle);
      expect(wrapped >= 0 && wrapped < 360).toBe(true);
      expect(Math.cos((wrapped * Math.PI) / 180)).toBeCloseTo(Math.cos((angle * Math.PI) / 180), 8);
    }),
  );
});
