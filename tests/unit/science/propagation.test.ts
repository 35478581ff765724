import { describe, expect, test } from "vitest";
import { SOLAR_DENSITY } from "#shared/science/constants.ts";
import { massFromAbsKs, radiusFromAbsKs } from "#shared/science/cool-dwarfs.ts";
import { absoluteMagnitude, absoluteMagnitudeError } from "#shared/science/distance.ts";
import {
  densityFromMassRadius,
  loggFromMassRadius,
  luminosityFromRadius,
  radiusFromLuminosity,
} from "#shared/science/luminosity.ts";
import {
  densityError,
  densityErrorFromAbsKs,
  depthError,
  insolationDistanceError,
  leastPlanetError,
  loggError,
  loggErrorFromAbsKs,
  luminosityError,
  radiusError,
  relationError,
  transitProbabilityError,
} from "#shared/science/propagation.ts";
import { normalDeviates, spreadOf } from "./random.ts";

const DRAWS = 100_000;

/** Linear errors and what drawing gives (computed): R 0.40 ± 0.012, T 3500 ± 80 K, M 0.40 ± 0.01. */
describe("first-order errors agree with drawing", () => {
  const [radius, radiusSigma, teff, teffSigma, mass, massSigma] = [0.4, 0.012, 3500, 80, 0.4, 0.01];

  test("luminosity: 0.021631512, 10.94 % by slopes and 10.95 % drawn", () => {
    const value = luminosityFromRadius(radius, teff);
    expect(value).toBeCloseTo(0.021631512, 9);
    expect(luminosityError(radiusSigma / radius, teffSigma / teff)).toBeCloseTo(0.1094, 4);
    const normal = normalDeviates(1);
    const { mean, deviation } = spreadOf(DRAWS, () =>
      luminosityFromRadius(radius + radiusSigma * normal(), teff + teffSigma * normal()),
    );
    expect(deviation / mean).toBeCloseTo(0.1095, 3);
  });

  test("log g: 4.836008 ± 0.02823 by slopes and 0.02826 drawn", () => {
    expect(loggFromMassRadius(mass, radius)).toBeCloseTo(4.836008, 6);
    expect(loggError(massSigma / mass, radiusSigma / radius)).toBeCloseTo(0.02823, 5);
    const normal = normalDeviates(2);
    const { deviation } = spreadOf(DRAWS, () =>
      loggFromMassRadius(mass + massSigma * normal(), radius + radiusSigma * normal()),
    );
    expect(deviation).toBeCloseTo(0.02826, 3);
  });

  test("density: 6.25 times solar or 8.8111 g/cm³, 9.34 % by slopes and 9.41 % drawn", () => {
    const value = densityFromMassRadius(mass, radius);
    expect(value).toBeCloseTo(6.25, 12);
    expect(value * SOLAR_DENSITY).toBeCloseTo(8.8111, 4);
    expect(densityError(massSigma / mass, radiusSigma / radius)).toBeCloseTo(0.0934, 4);
    const normal = normalDeviates(3);
    const { mean, deviation } = spreadOf(DRAWS, () =>
      densityFromMassRadius(mass + massSigma * normal(), radius + radiusSigma * normal()),
    );
    expect(deviation / mean).toBeCloseTo(0.0941, 3);
  });

  test("M Ks: 6.494850 ± 0.02952 by slopes and 0.02953 drawn, for Ks 8.00 ± 0.02 and 50 ± 0.5 mas", () => {
    expect(absoluteMagnitudeError(0.02, 0.01)).toBeCloseTo(0.02952, 5);
    const normal = normalDeviates(4);
    const { mean, deviation } = spreadOf(DRAWS, () =>
      absoluteMagnitude(8 + 0.02 * normal(), 1000 / (50 + 0.5 * normal()), 0),
    );
    expect(mean).toBeCloseTo(6.49485, 3);
    expect(deviation).toBeCloseTo(0.02953, 3);
  });

  test("radius from light and temperature", () => {
    const normal = normalDeviates(5);
    const { deviation } = spreadOf(DRAWS, () =>
      radiusFromLuminosity(1 + 0.02 * normal(), 5772 + 40 * normal()),
    );
    expect(radiusError(0.02, 40 / 5772) / deviation).toBeCloseTo(1, 2);
    expect(radiusError(0.06, 0.02)).toBeCloseTo(0.05, 12);
  });
});

test("the error of an extinction adds in quadrature", () => {
  expect(absoluteMagnitudeError(0.02, 0.01, 0.01) ** 2 - absoluteMagnitudeError(0.02, 0.01) ** 2).toBeCloseTo(
    1e-4,
    12,
  );
});

describe("mass and radius from one magnitude", () => {
  test("the magnitude's error acts once, through both: drawing agrees", () => {
    const normal = normalDeviates(6);
    const draw = (of: (mass: number, radius: number) => number) => () => {
      const absKs = 7 + 0.05 * normal();
      return of(
        massFromAbsKs(absKs) * (1 + 0.02 * normal()),
        radiusFromAbsKs(absKs) * (1 + 0.0289 * normal()),
      );
    };
    expect(loggErrorFromAbsKs(7, 0.05)).toBeCloseTo(spreadOf(DRAWS, draw(loggFromMassRadius)).deviation, 3);
    const density = spreadOf(DRAWS, draw(densityFromMassRadius));
    expect(densityErrorFromAbsKs(7, 0.05)).toBeCloseTo(density.deviation / density.mean, 2);
  });

  test("it is smaller than for independent errors, as mass and radius rise together", () => {
    const [massShare, radiusShare] = [0.5, 0.45];
    expect(loggErrorFromAbsKs(7, 0.3)).toBeLessThan(loggError(massShare * 0.3, radiusShare * 0.3));
  });

  test("outside the range of the relations there is none", () => {
    for (const absKs of [4.5, 9.9, Number.NaN]) {
      expect(loggErrorFromAbsKs(absKs, 0.02)).toBeNaN();
      expect(densityErrorFromAbsKs(absKs, 0.02)).toBeNaN();
    }
  });
});

test("the other rules are those of powers and quadrature", () => {
  expect(relationError(-0.2, 0.05, 0.03)).toBeCloseTo(Math.hypot(0.01, 0.03), 12);
  expect(insolationDistanceError(0.1)).toBeCloseTo(0.05, 12);
  expect(transitProbabilityError(0.03, 0.04)).toBeCloseTo(0.05, 12);
  expect(depthError(0.03, 0.04)).toBeCloseTo(0.1, 12);
  expect(leastPlanetError(0.03, 0.08)).toBeCloseTo(0.05, 12);
});
