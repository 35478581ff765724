import { test } from "vitest";
import { positionAngle, separation } from "#shared/science/separation.ts";
import { at, expectWithin } from "./table.ts";

const RADIANS = Math.PI / 180;

test("separations are those of SkyCoord.separation: the same formula, to rounding", () => {
  expectWithin(
    "pairs",
    (row, answer) => Math.abs(separation(at(row, 0), at(row, 1), at(row, 2), at(row, 3)) - at(answer, 0)),
    1e-12,
  );
});

test("position angles are those of SkyCoord.position_angle", () => {
  // As a distance across the direction, as the angle itself means nothing at separations of 0 and 180°.
  expectWithin(
    "pairs",
    (row, answer) => {
      const difference = positionAngle(at(row, 0), at(row, 1), at(row, 2), at(row, 3)) - at(answer, 1);
      return (
        Math.hypot(Math.sin(difference * RADIANS), 1 - Math.cos(difference * RADIANS)) *
        Math.sin(at(answer, 0) * RADIANS)
      );
    },
    1e-13,
  );
});
