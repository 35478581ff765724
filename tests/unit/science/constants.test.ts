import { describe, expect, test } from "vitest";
import {
  AU_M,
  AU_PER_SOLAR_RADIUS,
  EARTH_GM,
  EARTH_POLAR_RADIUS_M,
  EARTH_RADII_PER_SOLAR,
  EARTH_RADIUS_M,
  GAUSSIAN_YEAR_D,
  GRAVITATIONAL_CONSTANT,
  JUPITER_GM,
  JUPITER_POLAR_RADIUS_M,
  JUPITER_RADIUS_M,
  PARSEC_M,
  SOLAR_DENSITY,
  SOLAR_GM,
  SOLAR_IRRADIANCE,
  SOLAR_LOGG,
  SOLAR_LUMINOSITY_W,
  SOLAR_MBOL,
  SOLAR_RADIUS_M,
  SOLAR_TEFF_K,
  STEFAN_BOLTZMANN,
  ZERO_FLUX,
  ZERO_LUMINOSITY_W,
} from "#shared/science/constants.ts";

const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("constants", () => {
  /** Computed from the nominal values of IAU 2015 Resolutions B2 and B3, the au of IAU 2012 B2 and G of CODATA 2018. */
  test.each([
    ["parsec, m", PARSEC_M, 3.085677581491367e16, 1e-15],
    ["mass of the Sun, kg", SOLAR_GM / GRAVITATIONAL_CONSTANT, 1.988409870698051e30, 1e-14],
    ["mass of the Earth, kg", EARTH_GM / GRAVITATIONAL_CONSTANT, 5.972167867791379e24, 1e-14],
    ["mass of Jupiter, kg", JUPITER_GM / GRAVITATIONAL_CONSTANT, 1.898124597336051e27, 1e-14],
    ["Earths in the Sun, by mass", SOLAR_GM / EARTH_GM, 332946.07832807, 1e-13],
    ["Jupiters in the Sun, by mass", SOLAR_GM / JUPITER_GM, 1047.56551466, 1e-11],
    ["luminosity of the Sun over that of its surface", blackSun() / SOLAR_LUMINOSITY_W, 0.99999762, 1e-8],
    ["irradiance at 1 au", SOLAR_LUMINOSITY_W / (4 * Math.PI * AU_M ** 2), 1361.16647, 1e-8],
    ["log g of the Sun", SOLAR_LOGG, 4.438067627, 1e-9],
    ["density of the Sun, g/cm³", SOLAR_DENSITY, 1.40977982, 1e-8],
    [
      "bolometric magnitude of the Sun",
      -2.5 * Math.log10(SOLAR_LUMINOSITY_W / ZERO_LUMINOSITY_W),
      4.739995934,
      1e-9,
    ],
    ["au in solar radii", AU_PER_SOLAR_RADIUS, 215.03215567, 1e-10],
    ["solar radius in au", 1 / AU_PER_SOLAR_RADIUS, 0.004650467261, 1e-11],
    ["Earth on the Sun, radius", 1 / EARTH_RADII_PER_SOLAR, 0.0091678884577, 1e-11],
    ["Earth on the Sun, ppm", 1e6 / EARTH_RADII_PER_SOLAR ** 2, 84.0501788, 1e-8],
    ["Jupiter on the Sun, radius", JUPITER_RADIUS_M / SOLAR_RADIUS_M, 0.102762685, 1e-8],
    ["Jupiter on the Sun, ppm", 1e6 * (JUPITER_RADIUS_M / SOLAR_RADIUS_M) ** 2, 10560.16944, 1e-9],
    ["Jupiter on the Earth, radius", JUPITER_RADIUS_M / EARTH_RADIUS_M, 11.20898073, 1e-9],
    ["period at 1 au, days", GAUSSIAN_YEAR_D, 365.256898384, 1e-11],
  ])("%s", (_, found, expected, tolerance) => {
    expect(relative(found, expected)).toBeLessThan(tolerance);
  });

  test("the Stefan–Boltzmann constant comes out as CODATA prints it", () => {
    expect(relative(STEFAN_BOLTZMANN, 5.670374419184429e-8)).toBeLessThan(1e-15);
  });

  test("the flux of magnitude 0 comes out as IAU 2015 B2 prints it", () => {
    expect(relative(ZERO_FLUX, 2.518021002e-8)).toBeLessThan(1e-9);
  });

  test("the rounded values in use are those of the resolutions", () => {
    expect(SOLAR_MBOL).toBeCloseTo(2.5 * Math.log10(ZERO_LUMINOSITY_W / SOLAR_LUMINOSITY_W), 4);
    expect(relative(SOLAR_IRRADIANCE, SOLAR_LUMINOSITY_W / (4 * Math.PI * AU_M ** 2))).toBeLessThan(2e-4);
  });

  test("both planets are flattened as they are: the Earth by 1/299, Jupiter by 1/15", () => {
    // From memory: flattening of the Earth 1/298.3, of Jupiter 0.0649.
    expect(1 - EARTH_POLAR_RADIUS_M / EARTH_RADIUS_M).toBeCloseTo(1 / 298.3, 4);
    expect(1 - JUPITER_POLAR_RADIUS_M / JUPITER_RADIUS_M).toBeCloseTo(0.0649, 4);
  });
});

/** `4 π R² σ T⁴` of the nominal Sun, W. */
function blackSun(): number {
  return 4 * Math.PI * SOLAR_RADIUS_M ** 2 * STEFAN_BOLTZMANN * SOLAR_TEFF_K ** 4;
}
