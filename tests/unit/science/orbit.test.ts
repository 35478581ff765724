import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { AU_PER_SOLAR_RADIUS, GAUSSIAN_YEAR_D } from "#shared/science/constants.ts";
import {
  axisFromPeriod,
  densityFromScaledAxis,
  distanceAtAnomaly,
  eccentricAnomaly,
  meanAnomaly,
  periodFromAxis,
  scaledAxis,
  scaledAxisFromDensity,
  skySeparation,
  trueAnomaly,
} from "#shared/science/orbit.ts";

const eccentricities = fc.double({ min: 0, max: 0.97, noNaN: true });
const angles = fc.double({ min: -179, max: 179, noNaN: true });

describe("period and axis", () => {
  test("a planet in 3.5 days at a Sun stands at 9.701000 radii, by mass and by density (computed)", () => {
    expect(scaledAxis(axisFromPeriod(3.5, 1), 1)).toBeCloseTo(9.701, 5);
    expect(scaledAxisFromDensity(3.5, 1)).toBeCloseTo(9.701, 5);
  });

  test("one au, one solar mass: the Gaussian year, not 365.25 days", () => {
    expect(periodFromAxis(1, 1)).toBeCloseTo(365.256898384, 8);
    expect(axisFromPeriod(365.25, 1)).toBeCloseTo(0.99998741, 8);
    expect(scaledAxisFromDensity(GAUSSIAN_YEAR_D, 1)).toBeCloseTo(AU_PER_SOLAR_RADIUS, 9);
  });

  test("density and scaled axis invert each other, whatever mass and radius make the density", () => {
    const inputs = [
      fc.double({ min: 0.2, max: 1000, noNaN: true }),
      fc.double({ min: 0.1, max: 2, noNaN: true }),
      fc.double({ min: 0.1, max: 3, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (period, mass, radius) => {
        const density = mass / radius ** 3;
        const a = scaledAxisFromDensity(period, density);
        expect(a / scaledAxis(axisFromPeriod(period, mass), radius)).toBeCloseTo(1, 10);
        expect(densityFromScaledAxis(period, a) / density).toBeCloseTo(1, 10);
      }),
    );
  });
});

describe("distance and separation", () => {
  test("periastron a (1 − e), apastron a (1 + e), and the semi-latus rectum between", () => {
    expect(distanceAtAnomaly(20, 0.3, 0)).toBeCloseTo(14, 12);
    expect(distanceAtAnomaly(20, 0.3, 180)).toBeCloseTo(26, 12);
    expect(distanceAtAnomaly(20, 0.3, 90)).toBeCloseTo(20 * 0.91, 12);
    for (const e of [-0.1, 1, Number.NaN]) expect(distanceAtAnomaly(20, e, 0)).toBeNaN();
  });

  test("at conjunction the planet stands r cos i from the star, a quarter of an orbit later r", () => {
    expect(skySeparation(20, 40, 50, 89)).toBeCloseTo(20 * Math.cos((89 * Math.PI) / 180), 12);
    expect(skySeparation(20, 40, 140, 89)).toBeCloseTo(20, 12);
    expect(skySeparation(20, 40, 50, 90)).toBeCloseTo(0, 6);
  });

  test("the separation is never more than the distance, nor less than r cos i", () => {
    fc.assert(
      fc.property(angles, angles, fc.double({ min: 0, max: 90, noNaN: true }), (omega, f, i) => {
        const z = skySeparation(1, omega, f, i);
        expect(z).toBeLessThanOrEqual(1);
        expect(z).toBeGreaterThanOrEqual(Math.cos((i * Math.PI) / 180) - 1e-12);
      }),
    );
  });
});

describe("Kepler's equation", () => {
  test("its root satisfies it, at every eccentricity", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -20, max: 20, noNaN: true }),
        fc.double({ min: 0, max: 0.995, noNaN: true }),
        (mean, e) => {
          const anomaly = eccentricAnomaly(mean, e);
          expect(anomaly - e * Math.sin(anomaly)).toBeCloseTo(mean, 10);
        },
      ),
    );
  });

  test("true and mean anomaly invert each other and are one on a circular orbit", () => {
    fc.assert(
      fc.property(angles, eccentricities, (f, e) => {
        expect(trueAnomaly(meanAnomaly(f, e), e)).toBeCloseTo(f, 7);
        expect(meanAnomaly(f, 0)).toBeCloseTo(f, 10);
      }),
    );
  });

  test("the planet hurries through periastron: a quarter of the period after it, it is past 90°", () => {
    expect(trueAnomaly(90, 0.3)).toBeGreaterThan(90);
    expect(trueAnomaly(180, 0.3)).toBeCloseTo(180, 9);
    for (const e of [-0.1, 1, Number.NaN]) {
      expect(trueAnomaly(90, e)).toBeNaN();
      expect(meanAnomaly(90, e)).toBeNaN();
    }
  });
});
