import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  AU_PER_YEAR_KM_S,
  MOVED,
  MOVED_LENGTH,
  moveStar,
  positionErrorAfter,
} from "#shared/science/proper-motion.ts";
import { separation } from "#shared/science/separation.ts";
import { arcsecBetween, latitudes, longitudes, written } from "./positions.ts";

type Star = readonly [ra: number, dec: number, parallax: number, motionRa: number, motionDec: number];

const moved = (star: Star, radialVelocity: number, years: number): number[] =>
  written(MOVED_LENGTH, (target) => moveStar(target, ...star, radialVelocity, years));

/** Barnard's star: Gaia DR3, epoch 2016.0. */
const BARNARD: Star = [
  269.44850252543836, 4.739420051112412, 546.975939730948, -801.5509783684709, 10362.394206546573,
];
/** HIP 87937: Hipparcos catalogue, epoch 1991.25. */
const BARNARD_1991: Star = [269.45402305, 4.66828815, 549.01, -797.84, 10326.93];
/** Gaia DR3, epoch 2016.0; the digits are from memory. */
const PROXIMA: Star = [
  217.39232147200883, -62.67607511676666, 768.0665391873573, -3781.741008265163, 769.4650146478623,
];

/** Expects the first elements that are given, each to half a unit of its last digit. */
const expectElements = (elements: number[], expected: number[], digits: number[]) => {
  for (const [index, value] of expected.entries())
    expect(elements[index], `element ${index}`).toBeCloseTo(value, digits[index]);
};

describe("Barnard's star with its radial velocity", () => {
  /** Computed with an independent implementation of ESA 1997, SP-1200, vol. 1, 1.5.5, for −110.47 km/s. */
  test.each([
    [2000, [269.4520734281, 4.6934104585, 546.435475, -799.914744, 10341.930338, -110.54251]],
    [1991.25, [269.4540230826, 4.6682874013, 546.14021, -799.021828, 10330.759116]],
    [2030, [269.4453717968, 4.7797531314]],
    [2100, [269.4296309375, 4.9824691828, 549.825093, -810.215393, 10470.60651, -110.08576]],
  ])("is in %d where the formula of the Hipparcos catalogue puts it", (year, expected) => {
    expectElements(moved(BARNARD, -110.47, year - 2016), expected, [9, 9, 5, 5, 5, 4]);
  });

  test("from its place in 1991.25", () => {
    // Computed as above, for −110.6 km/s.
    expectElements(moved(BARNARD_1991, -110.6, 8.75), [269.4520762736, 4.6934019689], [9, 9]);
    expectElements(moved(BARNARD_1991, -110.6, 24.75), [269.4485106127, 4.7393950243], [9, 9]);
  });
});

describe("without a radial velocity", () => {
  test("Barnard's star is in 2000 where the large name services print it", () => {
    // Position of J2000 printed by a name service from the same Gaia DR3 row: 269.45207695861876, 4.693364966576667.
    const elements = moved(BARNARD, Number.NaN, -16);
    expectElements(elements, [269.45207695861876, 4.693364966576667], [11, 11]);
    // Computed.
    expectElements(elements.slice(2), [546.975762, -801.497303, 10362.391583], [5, 5, 5]);
    expect(elements[MOVED.radialVelocity]).toBeNaN();
    expectElements(moved(BARNARD, Number.NaN, 84), [269.4297289329, 4.9812075479], [9, 9]);
  });

  test("its Hipparcos row comes to 17 57 48.4986 +04 41 36.198 in J2000", () => {
    // Printed in the tests of a published telescope pointing library; the degrees are computed.
    const [ra = 0, dec = 0] = moved(BARNARD_1991, 0, 8.75);
    expect((ra / 15 - 17) * 3600 - 57 * 60).toBeCloseTo(48.4986, 3);
    expect((dec - 4) * 3600 - 41 * 60).toBeCloseTo(36.198, 3);
    expectElements([ra, dec], [269.452077331, 4.693388323], [8, 8]);
  });

  test("the perspective acceleration that is left out is 164 mas in 16 years and 4.6″ in 84", () => {
    // Computed: 164.26 and 4555.5 mas.
    for (const [years, mas] of [
      [-16, 164.26],
      [84, 4555.5],
    ] as const) {
      const [ra1 = 0, dec1 = 0] = moved(BARNARD, -110.47, years);
      const [ra2 = 0, dec2 = 0] = moved(BARNARD, Number.NaN, years);
      expect(Math.abs(3.6e6 * separation(ra1, dec1, ra2, dec2) - mas)).toBeLessThan(0.06);
    }
  });

  test("or with a parallax that is not positive, the star crosses the line of sight alone", () => {
    const without = moved(BARNARD, Number.NaN, -16);
    for (const parallax of [-3, 0, Number.NaN]) {
      const [ra, dec, , motionRa, motionDec, radialVelocity] = moved(
        [BARNARD[0], BARNARD[1], parallax, BARNARD[3], BARNARD[4]],
        -110.47,
        -16,
      );
      expect([ra, dec, motionRa, motionDec]).toEqual([without[0], without[1], without[3], without[4]]);
      expect(radialVelocity).toBeNaN();
    }
  });
});

describe("what is left out is small beside what a straight line in α and δ leaves out", () => {
  test("the straight line is 164 mas off in 16 years and 4.6″ in 84", () => {
    // Computed: 164.33 and 4551.2 mas.
    for (const [years, mas] of [
      [-16, 164.33],
      [84, 4551.2],
    ] as const) {
      const [ra = 0, dec = 0] = moved(BARNARD, -110.47, years);
      const straightRa = BARNARD[0] + (BARNARD[3] * years) / 3.6e6 / Math.cos((BARNARD[1] * Math.PI) / 180);
      const straightDec = BARNARD[1] + (BARNARD[4] * years) / 3.6e6;
      expect(Math.abs(3.6e6 * separation(ra, dec, straightRa, straightDec) - mas)).toBeLessThan(0.06);
    }
  });

  test("light-time is 0.03 mas in 16 years", () => {
    // Computed with SOFA's starpm: 269.4520734275, 4.6934104669, parallax 546.435309.
    const [ra = 0, dec = 0, parallax] = moved(BARNARD, -110.47, -16);
    expect(3.6e6 * separation(ra, dec, 269.4520734275, 4.6934104669)).toBeCloseTo(0.03, 2);
    expect(parallax).toBeCloseTo(546.435309, 3);
  });
});

test("Proxima in 2000", () => {
  // Computed, from digits that are from memory.
  expectElements(
    moved(PROXIMA, -21.942726, -16),
    [217.428932124, -62.6794892488, 767.854746, -3780.091644, 766.894912],
    [9, 9, 5, 5, 5],
  );
});

test("the test star of SOFA's starpm comes within 0.03 mas of the printed place", () => {
  // SOFA test suite, t_starpm; it counts light-time, which is left out here. Its motion in α is without cos δ.
  const degrees = 180 / Math.PI;
  const mas = degrees * 3.6e6;
  const dec = -1.093989828 * degrees;
  const motionRa = -1.78323516e-5 * Math.cos(-1.093989828) * mas;
  const star: Star = [0.01686756 * degrees, dec, 747.23, motionRa, 2.336024047e-6 * mas];
  const elements = moved(star, -21.6, (53_736 - 50_083) / 365.25);
  const [ra = 0, newDec = 0] = elements;
  expect(
    3.6e6 * separation(ra, newDec, 0.01668919069414256 * degrees, -1.093966454217128 * degrees),
  ).toBeLessThan(0.03);
  expect(elements[MOVED.parallax]).toBeCloseTo(747.3533835317719, 3);
  expect(elements[MOVED.radialVelocity]).toBeCloseTo(-21.59905170476418, 4);
});

test("one au a year is 4.740470463533 km/s", () => {
  // Computed from the au and the Julian year, both exact.
  expect(AU_PER_YEAR_KM_S).toBeCloseTo(4.740470463533, 12);
});

describe("any star", () => {
  const stars = fc.tuple(
    longitudes,
    latitudes,
    fc.double({ min: 0.1, max: 800, noNaN: true }),
    fc.double({ min: -11_000, max: 11_000, noNaN: true }),
    fc.double({ min: -11_000, max: 11_000, noNaN: true }),
  );
  const velocities = fc.double({ min: -600, max: 600, noNaN: true });
  const spans = fc.double({ min: -200, max: 200, noNaN: true });

  test("moved there and back stands where it stood, and moves as it did", () => {
    fc.assert(
      fc.property(stars, velocities, spans, (star, velocity, years) => {
        const [ra = 0, dec = 0, parallax = 0, motionRa = 0, motionDec = 0, radial = 0] = moved(
          star,
          velocity,
          years,
        );
        const back = moved([ra, dec, parallax, motionRa, motionDec], radial, -years);
        expect(3.6e6 * separation(star[0], star[1], back[0] ?? 0, back[1] ?? 0)).toBeLessThan(1e-5);
        expect(back[MOVED.parallax]).toBeCloseTo(star[2], 8);
        // At the poles the directions of east and north turn with the last digit of the place: the size is what stays.
        expect(Math.hypot(back[3] ?? 0, back[4] ?? 0)).toBeCloseTo(Math.hypot(star[3], star[4]), 5);
        expect(back[MOVED.radialVelocity]).toBeCloseTo(velocity, 5);
      }),
    );
  });

  test("stays put in no time", () => {
    fc.assert(
      fc.property(stars, velocities, (star, velocity) => {
        const [ra = 0, dec = 0] = moved(star, velocity, 0);
        expect(3.6e6 * separation(star[0], star[1], ra, dec)).toBeLessThan(1e-6);
      }),
    );
  });

  test("without a proper motion or a position has no place at another time", () => {
    for (const element of [0, 1, 3, 4]) {
      const star = BARNARD.with(element, Number.NaN) as unknown as Star;
      const [ra, dec, , motionRa, motionDec] = moved(star, -110, 0);
      expect([ra, dec, motionRa, motionDec]).toEqual(new Array(4).fill(Number.NaN));
    }
    expect(moved([10, 90.1, 10, 1, 1], 0, 1)[MOVED.dec]).toBeNaN();
  });

  test("passes over the pole and over 0h", () => {
    // 3600 mas/yr for 1000 years are a degree of straight way, and so the arctangent of that on the sky.
    const overPole = moved([10, 89.5, 1, 0, 3600], 0, 1000);
    expect(arcsecBetween(overPole[0] ?? 0, 190)).toBeCloseTo(0, 6);
    expect(overPole[1]).toBeCloseTo(180 - 89.5 - (Math.atan(Math.PI / 180) * 180) / Math.PI, 9);
    const overZero = moved([359.9999, 0, 1, 3600, 0], 0, 1);
    expect(overZero[0]).toBeCloseTo(0.0009, 9);
  });
});

describe("the error of a position", () => {
  test("grows with the time and the error of the motion", () => {
    // Computed: √(60² + (15.5 × 3)²) and so on.
    expect(positionErrorAfter(60, 3, 0, 15.5)).toBeCloseTo(75.91, 2);
    expect(positionErrorAfter(0.02, 0.02, 0, 16)).toBeCloseTo(0.3206, 4);
    expect(positionErrorAfter(0.02, 0.5, 0, -16)).toBeCloseTo(8, 3);
  });

  test("a correlation makes it smaller on one side of the epoch and larger on the other", () => {
    expect(positionErrorAfter(3, 1, 1, 2)).toBeCloseTo(5, 12);
    expect(positionErrorAfter(3, 1, 1, -3)).toBe(0);
    expect(positionErrorAfter(3, 1, -0.5, 2) ** 2).toBeCloseTo(9 - 6 + 4, 12);
  });

  test("is missing when an error is, or is no error", () => {
    expect(positionErrorAfter(Number.NaN, 1, 0, 1)).toBeNaN();
    expect(positionErrorAfter(1, Number.NaN, 0, 1)).toBeNaN();
    expect(positionErrorAfter(-1, 1, 0, 1)).toBeNaN();
    expect(positionErrorAfter(1, 1, 1.1, 1)).toBeNaN();
  });
});
