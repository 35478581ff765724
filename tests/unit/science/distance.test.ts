import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  absoluteMagnitude,
  absoluteMagnitudeError,
  distanceFromParallax,
  inversionBias,
} from "#shared/science/distance.ts";
import { normalDeviates, spreadOf } from "./random.ts";

describe("distance from parallax", () => {
  test("is the inverse, with the zero point taken off", () => {
    expect(distanceFromParallax(50, 0.5, 0.1, 0)).toBe(20);
  });

  /** Computed: what a zero point of −0.017 mas (Lindegren et al. 2021, A&A 649, A4; the value from memory) does. */
  test.each([
    [1, -0.0167],
    [5, -0.0034],
    [20, -0.00085],
    [100, -0.00017],
  ])("the zero point makes %d mas nearer by a share of %d", (parallax, share) => {
    expect(distanceFromParallax(parallax, 0.02, 0.1, -0.017) * (parallax / 1000) - 1).toBeCloseTo(share, 4);
  });

  test("its bias is 1 % at a tenth and 4 % at a fifth, as drawing shows", () => {
    // Luri et al. 2018, A&A 616, A9: the leading term; the next adds 0.03 % and 0.5 %.
    expect(inversionBias(0.1)).toBeCloseTo(0.01, 3);
    expect(inversionBias(0.2)).toBeCloseTo(0.04, 2);
    const normal = normalDeviates(7);
    const { mean } = spreadOf(100_000, () => 1 / (1 + 0.1 * normal()));
    expect(mean - 1).toBeCloseTo(inversionBias(0.1), 3);
  });

  test("holds up to a tenth of the parallax and no further", () => {
    expect(distanceFromParallax(10, 1, 0.1, 0)).toBe(100);
    expect(distanceFromParallax(10, 1.001, 0.1, 0)).toBeNaN();
  });

  test("a parallax that is not positive, or has no error, gives none", () => {
    fc.assert(
      fc.property(fc.double({ max: 0, noNaN: true }), fc.double({ noNaN: true }), (parallax, error) => {
        expect(distanceFromParallax(parallax, error, 0.1, 0)).toBeNaN();
      }),
    );
    expect(distanceFromParallax(10, Number.NaN, 0.1, 0)).toBeNaN();
    expect(distanceFromParallax(Number.NaN, 0.1, 0.1, 0)).toBeNaN();
  });
});

describe("absolute magnitude", () => {
  test("Ks 8.00 ± 0.02 at 50 ± 0.5 mas is 6.494850 ± 0.02952 (Monte Carlo 0.02953)", () => {
    expect(absoluteMagnitude(8, 20, 0)).toBeCloseTo(6.49485, 6);
    expect(absoluteMagnitudeError(0.02, 0.01)).toBeCloseTo(0.02952, 5);
  });

  test("0.01 mag of extinction makes it 0.01 mag brighter", () => {
    expect(absoluteMagnitude(8, 20, 0) - absoluteMagnitude(8, 20, 0.01)).toBeCloseTo(0.01, 12);
  });
});
