import { expect, test } from "vitest";
import { MOVED, MOVED_LENGTH, moveStar } from "#shared/science/proper-motion.ts";
import { separation } from "#shared/science/separation.ts";
import { at, expectWithin } from "./table.ts";

const MAS_PER_RADIAN = (180 / Math.PI) * 3.6e6;
/** Speed of light, au in a Julian year. */
const LIGHT_AU_YEAR = 63_241.077;

const moved = new Float64Array(MOVED_LENGTH);

const move = (row: readonly number[]): Float64Array => {
  moveStar(moved, at(row, 0), at(row, 1), at(row, 2), at(row, 3), at(row, 4), at(row, 5), at(row, 6));
  return moved;
};

/**
 * What the change of the light's travel time adds, mas, which astropy counts and the formula of the Hipparcos catalogue does
 * not: the star's radial velocity changes by μ² d t, and its apparent motion with it; `μ³ t² d / c`.
 */
const lightTime = (row: readonly number[]): number => {
  const motion = Math.hypot(at(row, 3), at(row, 4)) / MAS_PER_RADIAN;
  const distance = MAS_PER_RADIAN / at(row, 2);
  return ((motion ** 3 * at(row, 6) ** 2 * distance) / LIGHT_AU_YEAR) * MAS_PER_RADIAN;
};

test("places are those of SkyCoord.apply_space_motion, to 0.1 mas and the light-time", () => {
  expectWithin(
    "motions",
    (input, expected) => {
      const star = move(input);
      return 3.6e6 * separation(at([...star], 0), at([...star], 1), at(expected, 0), at(expected, 1));
    },
    (input) => 0.1 + lightTime(input),
  );
});

test("parallaxes are the same to 1 µas, motions to 0.1 mas a year, velocities to 0.02 km/s", () => {
  // Light-time again, and the relativistic Doppler effect in the velocities: at 100 km/s v²/2c is 0.017 km/s.
  expectWithin("motions", (input, expected) => Math.abs(at([...move(input)], 2) - at(expected, 2)), 1e-3);
  expectWithin(
    "motions",
    (input, expected) => {
      const star = [...move(input)];
      return Math.hypot(at(star, 3) - at(expected, 3), at(star, 4) - at(expected, 4));
    },
    0.1,
  );
  expectWithin(
    "motions",
    (input, expected) => Math.abs(at([...move(input)], MOVED.radialVelocity) - at(expected, 5)),
    0.02,
  );
});

test("an unknown radial velocity gives the place of a star that does not recede", () => {
  expectWithin(
    "motions",
    (input) => {
      const [ra, dec] = move(input.with(5, Number.NaN));
      const [otherRa, otherDec] = move(input.with(5, 0));
      return separation(ra ?? 0, dec ?? 0, otherRa ?? 0, otherDec ?? 0);
    },
    0,
  );
  expect(move([10, 10, 10, 10, 10, Number.NaN, 10])[MOVED.radialVelocity]).toBeNaN();
});
