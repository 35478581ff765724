import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { absoluteMagnitude, absoluteMagnitudeError, distanceFromParallax } from "#shared/science/distance.ts";

describe("distance from parallax", () => {
  test("is the inverse, with the zero point taken off", () => {
    expect(distanceFromParallax(50, 0.5, 0.1, 0)).toBe(20);
    // Lindegren et al. 2021: −0.017 mas makes 1 mas 1.67 % nearer.
    expect(distanceFromParallax(1, 0.02, 0.1, -0.017) / 1000 - 1).toBeCloseTo(-0.0167, 4);
    expect(distanceFromParallax(20, 0.02, 0.1, -0.017) / 50 - 1).toBeCloseTo(-0.00085, 5);
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
