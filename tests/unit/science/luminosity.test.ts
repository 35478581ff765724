import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { SOLAR_LOGG, SOLAR_MBOL } from "#shared/science/constants.ts";
import {
  bolometricMagnitude,
  densityFromMassRadius,
  loggFromMassRadius,
  luminosityFromFlux,
  luminosityFromMagnitude,
  luminosityFromRadius,
  radiusFromLuminosity,
} from "#shared/science/luminosity.ts";
import { scaledAxisFromDensity } from "#shared/science/orbit.ts";

const positive = fc.double({ min: 1e-4, max: 100, noNaN: true });
const teff = fc.double({ min: 2000, max: 12_000, noNaN: true });

describe("luminosity and radius", () => {
  test("are inverse to each other", () => {
    fc.assert(
      fc.property(positive, teff, (radius, t) => {
        expect(radiusFromLuminosity(luminosityFromRadius(radius, t), t) / radius).toBeCloseTo(1, 12);
      }),
    );
  });

  test("published pairs: Proxima Centauri and TRAPPIST-1", () => {
    // Anglada-Escudé et al. 2016, Nature 536, 437: L 0.00155, 3050 K, R about 0.14; computed 0.1410.
    expect(radiusFromLuminosity(0.00155, 3050)).toBeCloseTo(0.141, 4);
    // Agol et al. 2021, from memory: L 5.53e-4, 2566 K, R 0.1192; computed 0.1190.
    expect(radiusFromLuminosity(5.53e-4, 2566)).toBeCloseTo(0.119, 4);
  });

  test("five magnitudes brighter is a hundred times the light", () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 15, noNaN: true }), (magnitude) => {
        const ratio = luminosityFromMagnitude(magnitude - 5, 0) / luminosityFromMagnitude(magnitude, 0);
        expect(ratio).toBeCloseTo(100, 9);
      }),
    );
    expect(luminosityFromMagnitude(SOLAR_MBOL, 0)).toBe(1);
  });

  test("flux and magnitude tell the same light", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-16, max: 1e-8, noNaN: true }), positive, (flux, distance) => {
        const absolute = bolometricMagnitude(flux) + 5 - 5 * Math.log10(distance);
        // 4.74 is 4.739996 rounded.
        expect(luminosityFromFlux(flux, distance) / luminosityFromMagnitude(absolute, 0)).toBeCloseTo(1, 5);
      }),
    );
    // IAU 2015 B2: the zero point of apparent bolometric magnitudes.
    expect(bolometricMagnitude(2.518021002e-8)).toBeCloseTo(0, 9);
  });
});

describe("gravity and density", () => {
  test("the Sun", () => {
    expect(loggFromMassRadius(1, 1)).toBe(SOLAR_LOGG);
    expect(densityFromMassRadius(1, 1)).toBe(1);
    // Computed: the density of the Sun and a Gaussian year put a planet at 215.032156 solar radii.
    expect(scaledAxisFromDensity(365.2568984, 1)).toBeCloseTo(215.032156, 6);
    expect(scaledAxisFromDensity(1, 1)).toBeCloseTo(4.208278, 5);
  });

  test("twice the mass is 0.301 dex of gravity and twice the density, twice the radius a quarter and an eighth", () => {
    fc.assert(
      fc.property(positive, positive, (mass, radius) => {
        const logg = loggFromMassRadius(mass, radius);
        expect(loggFromMassRadius(2 * mass, radius) - logg).toBeCloseTo(Math.log10(2), 12);
        expect(logg - loggFromMassRadius(mass, 2 * radius)).toBeCloseTo(Math.log10(4), 12);
        const density = densityFromMassRadius(mass, radius);
        expect(densityFromMassRadius(2 * mass, radius) / density).toBeCloseTo(2, 12);
        expect(densityFromMassRadius(mass, 2 * radius) / density).toBeCloseTo(1 / 8, 12);
      }),
    );
  });

  test("a star without mass or radius has neither", () => {
    expect(loggFromMassRadius(Number.NaN, 1)).toBeNaN();
    expect(densityFromMassRadius(1, Number.NaN)).toBeNaN();
  });
});
