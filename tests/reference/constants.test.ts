import { expect, test } from "vitest";
import {
  AU_M,
  BOLTZMANN_CONSTANT,
  EARTH_GM,
  EARTH_RADIUS_M,
  GRAVITATIONAL_CONSTANT,
  JUPITER_GM,
  JUPITER_RADIUS_M,
  PARSEC_M,
  PLANCK_CONSTANT,
  SOLAR_GM,
  SOLAR_LUMINOSITY_W,
  SOLAR_MBOL,
  SOLAR_RADIUS_M,
  SPEED_OF_LIGHT,
  STEFAN_BOLTZMANN,
  ZERO_LUMINOSITY_W,
} from "#shared/science/constants.ts";
import { at, referenceRows } from "./table.ts";

const ours = [
  ["nominal solar radius", SOLAR_RADIUS_M],
  ["nominal solar mass parameter", SOLAR_GM],
  ["nominal solar luminosity", SOLAR_LUMINOSITY_W],
  ["nominal radius of the Earth", EARTH_RADIUS_M],
  ["nominal mass parameter of the Earth", EARTH_GM],
  ["nominal radius of Jupiter", JUPITER_RADIUS_M],
  ["nominal mass parameter of Jupiter", JUPITER_GM],
  ["astronomical unit", AU_M],
  ["parsec", PARSEC_M],
  ["luminosity of magnitude 0", ZERO_LUMINOSITY_W],
  ["speed of light", SPEED_OF_LIGHT],
  ["Planck constant", PLANCK_CONSTANT],
  ["Boltzmann constant", BOLTZMANN_CONSTANT],
  ["Stefan–Boltzmann constant", STEFAN_BOLTZMANN],
  ["gravitational constant", GRAVITATIONAL_CONSTANT],
] as const;

/** All are given or exact; computed ones may differ in the rounding of their last digit. */
const RELATIVE = 1e-15;

test.each(ours.map(([name, value], index) => ({ name, value, index })))(
  "the $name is that of astropy.constants",
  ({ value, index }) => {
    const [row] = referenceRows("constants");
    expect(Math.abs(value / at(row?.expected ?? [], index) - 1)).toBeLessThan(RELATIVE);
  },
);

test("the bolometric magnitude of the Sun in use is the one of the resolutions, rounded", () => {
  const [row] = referenceRows("constants");
  expect(Math.abs(SOLAR_MBOL - at(row?.expected ?? [], ours.length))).toBeLessThan(5e-6);
});
