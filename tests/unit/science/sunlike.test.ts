import { describe, expect, test } from "vitest";
import { luminosityFromMagnitude, radiusFromLuminosity } from "#shared/science/luminosity.ts";
import {
  bolometricCorrectionG,
  bolometricCorrectionGSlope,
  massFromSpectrum,
  SPECTRAL_MASS_FEH_SLOPE,
  spectralMassLoggSlope,
  spectralMassTeffSlope,
  sunlikeTeff,
  sunlikeTeffFehSlope,
  sunlikeTeffLoggSlope,
  sunlikeTeffSlope,
} from "#shared/science/sunlike.ts";
import { slopeOf } from "./slope.ts";

describe("temperature from BP − RP, log g and [Fe/H]", () => {
  /** Computed from the coefficients of Casagrande et al. 2021, MNRAS 507, 2684 (third release). */
  test.each([
    [0.5, 4.3, 0, 6855.9],
    [0.7, 4.3, 0, 6130.1],
    [0.82, 4.44, 0, 5761.6],
    [0.82, 4.44, -0.5, 5730.2],
    [0.82, 4.44, 0.3, 5780.4],
    [1.0, 4.5, 0, 5262.7],
    [1.3, 4.6, 0, 4608.5],
    [1.5, 4.6, 0, 4285.5],
    [2.0, 4.7, 0, 3837.7],
  ])("%d, %d, %d gives %d K", (colour, logg, feh, teff) => {
    expect(sunlikeTeff(colour, logg, feh)).toBeCloseTo(teff, 1);
  });

  test("colours, gravities and metallicities outside are refused", () => {
    expect(sunlikeTeff(0.19, 4.4, 0)).toBeNaN();
    expect(sunlikeTeff(2.01, 4.4, 0)).toBeNaN();
    expect(sunlikeTeff(0.8, 3.2, 0)).toBeNaN();
    expect(sunlikeTeff(0.8, 5.1, 0)).toBeNaN();
    expect(sunlikeTeff(0.8, 4.4, 0.61)).toBeNaN();
    expect(sunlikeTeff(0.8, 4.4, -4.1)).toBeNaN();
    expect(sunlikeTeff(Number.NaN, 4.4, 0)).toBeNaN();
  });

  test("the slopes are those of the relation", () => {
    const [x, g, m] = [0.93, 4.42, -0.3];
    expect(sunlikeTeffSlope(x, g, m)).toBeCloseTo(
      slopeOf((v) => sunlikeTeff(v, g, m), x),
      2,
    );
    expect(sunlikeTeffLoggSlope(x, m)).toBeCloseTo(
      slopeOf((v) => sunlikeTeff(x, v, m), g),
      2,
    );
    expect(sunlikeTeffFehSlope(x, g)).toBeCloseTo(
      slopeOf((v) => sunlikeTeff(x, g, v), m),
      2,
    );
  });
});

describe("bolometric correction to G", () => {
  /** Computed from Andrae et al. 2018, A&A 616, A8, Table 4; the argument is Teff − 5772 K. */
  test.each([
    [3300, -1.0622],
    [3500, -0.8768],
    [4000, -0.498],
    [4500, -0.2108],
    [5000, -0.0473],
    [5772, 0.06],
    [6500, 0.0828],
    [8000, 0.0189],
  ])("%d K gives %d", (teff, correction) => {
    expect(bolometricCorrectionG(teff)).toBeCloseTo(correction, 4);
  });

  test("the cool branch reaches −0.4944 at 4000 K, and both ends are refused beyond", () => {
    expect(bolometricCorrectionG(3999.999)).toBeCloseTo(-0.4944, 4);
    for (const teff of [3299, 8001, Number.NaN]) expect(bolometricCorrectionG(teff)).toBeNaN();
  });

  test("the slopes are those of both branches", () => {
    for (const teff of [3600, 5200])
      expect(bolometricCorrectionGSlope(teff)).toBeCloseTo(slopeOf(bolometricCorrectionG, teff, 0.01), 7);
  });

  test("the Sun: M_G 4.68 and 5772 K give one solar luminosity and radius", () => {
    const luminosity = luminosityFromMagnitude(4.68, bolometricCorrectionG(5772));
    expect(luminosity).toBeCloseTo(1, 3);
    expect(radiusFromLuminosity(luminosity, 5772)).toBeCloseTo(1, 3);
  });
});

describe("mass from Teff, log g and [Fe/H]", () => {
  /** Computed from Torres, Andersen & Giménez 2010, A&A Rev. 18, 67, Table 4; the Sun comes out 5 % heavy. */
  test.each([
    [5772, 4.438, 0, 1.0492],
    [6065, 4.361, 0, 1.1506],
    [5040, 4.587, -0.03, 0.8228],
    [6550, 4.3, 0, 1.3076],
    [5290, 4.55, 0, 0.8989],
    [6000, 4.0, 0, 1.2921],
  ])("%d K, %d, %d gives %d", (teff, logg, feh, mass) => {
    expect(massFromSpectrum(teff, logg, feh)).toBeCloseTo(mass, 4);
  });

  test("below 0.6 solar masses and for giants it is refused", () => {
    expect(massFromSpectrum(3500, 4.8, 0)).toBeNaN();
    expect(massFromSpectrum(4500, 2.5, 0)).toBeNaN();
    expect(massFromSpectrum(Number.NaN, 4.4, 0)).toBeNaN();
  });

  test("the slopes are those of its logarithm", () => {
    const [t, g, m] = [5600, 4.4, 0.1];
    const log = (teff: number, logg: number, feh: number) => Math.log(massFromSpectrum(teff, logg, feh));
    expect(spectralMassTeffSlope(t)).toBeCloseTo(
      slopeOf((v) => log(v, g, m), t, 0.1),
      8,
    );
    expect(spectralMassLoggSlope(g)).toBeCloseTo(
      slopeOf((v) => log(t, v, m), g),
      6,
    );
    expect(SPECTRAL_MASS_FEH_SLOPE).toBeCloseTo(
      slopeOf((v) => log(t, g, v), m),
      6,
    );
  });
});
