import fc from "fast-check";
import { expect, test } from "vitest";
import { AU_PER_SOLAR_RADIUS, SOLAR_TEFF_K } from "#shared/science/constants.ts";
import { distanceAtInsolation } from "#shared/science/habitable-zone.ts";
import { equilibriumTemperature, insolationAtDistance, meanInsolation } from "#shared/science/insolation.ts";

test("the Earth's equilibrium temperature: 278.330 K black, 254.586 K with an albedo of 0.3 (computed)", () => {
  expect(equilibriumTemperature(SOLAR_TEFF_K, AU_PER_SOLAR_RADIUS, 0)).toBeCloseTo(278.33, 3);
  expect(equilibriumTemperature(SOLAR_TEFF_K, AU_PER_SOLAR_RADIUS, 0.3)).toBeCloseTo(254.586, 3);
});

test("an eccentric orbit receives more on the whole, and is as warm as that makes it", () => {
  expect(meanInsolation(1, 1, 0.6)).toBeCloseTo(1.25, 12);
  const warmer = equilibriumTemperature(5000, 30, 0.2, 0.6) / equilibriumTemperature(5000, 30, 0.2);
  expect(warmer ** 4).toBeCloseTo(1.25, 12);
});

test("an orbit inside the star, an albedo above 1 and an open orbit have no temperature", () => {
  expect(equilibriumTemperature(5000, 1, 0)).toBeNaN();
  expect(equilibriumTemperature(5000, 1.5, 0, 0.5)).toBeNaN();
  expect(equilibriumTemperature(5000, 30, 1.1)).toBeNaN();
  expect(equilibriumTemperature(5000, 30, 0, 1)).toBeNaN();
  expect(meanInsolation(1, 1, 1)).toBeNaN();
});

test("insolation and distance invert each other, and light falls with the square of the distance", () => {
  const positive = fc.double({ min: 1e-3, max: 1e3, noNaN: true });
  fc.assert(
    fc.property(positive, positive, (luminosity, distance) => {
      const light = insolationAtDistance(luminosity, distance);
      expect(distanceAtInsolation(luminosity, light) / distance).toBeCloseTo(1, 12);
      expect(insolationAtDistance(luminosity, 2 * distance) / light).toBeCloseTo(0.25, 12);
    }),
  );
});
