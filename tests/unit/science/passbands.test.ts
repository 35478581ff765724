import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { photonNoisePpm } from "#shared/science/ccd.ts";
import { electronRate, PHOTON_BANDS } from "#shared/science/passbands.ts";
import {
  AB_JANSKY,
  abMagnitude,
  abPhotonRate,
  BESSELL_1998,
  janskyOfAb,
  magnitudeOfFLambda,
  magnitudeOfFNu,
  photonBandOf,
  photonRateOf,
  SLOAN_TO_AB,
  WIDE_BAND_ZERO_POINTS,
  wideBandFlux,
  wideBandMagnitude,
} from "#shared/science/photometric-systems.ts";

const bands = Object.entries(PHOTON_BANDS);
const HC = 1.98644585715e-8;
const C_ANGSTROM = 2.99792458e18;

describe("synthetic bands", () => {
  test("there are sixteen", () => {
    expect(bands).toHaveLength(16);
  });

  /** Computed from transmission curves and the spectrum of Vega: photons s⁻¹ cm⁻² in the band at magnitude 0. */
  test.each([
    ["U", 4.32e5],
    ["B", 1.41e6],
    ["V", 8.396e5],
    ["R", 9.433e5],
    ["I", 5.726e5],
    ["J", 3.112e5],
    ["H", 2.318e5],
    ["Ks", 1.195e5],
    ["G", 3.558e6],
    ["BP", 2.744e6],
    ["RP", 1.392e6],
    ["sloanU", 3.759e5],
    ["sloanG", 1.502e6],
    ["sloanR", 8.644e5],
    ["sloanI", 5.466e5],
    ["sloanZ", 4.255e5],
  ] as const)("%s: photon rate times width make the rate in the band within 3 %%", (key, rate) => {
    const { photonRate, widthAngstrom } = PHOTON_BANDS[key];
    expect(Math.abs((photonRate * widthAngstrom) / rate - 1)).toBeLessThan(0.03);
  });

  test.each(bands)("%s: fluxes and photon rates agree through pivot wavelength and hc", (_, band) => {
    const { pivotAngstrom, vegaFlux, vegaJansky, photonRate, photonRateAb } = band;
    const byFrequency = (vegaFlux * pivotAngstrom ** 2) / C_ANGSTROM / 1e-23;
    expect(byFrequency / vegaJansky).toBeCloseTo(1, 3);
    // Photons count as energy over the mean photon energy, so that the pivot serves within a few per cent.
    expect((vegaFlux * pivotAngstrom) / HC / photonRate).toBeCloseTo(1, 1);
    expect(abPhotonRate(pivotAngstrom) / photonRateAb).toBeCloseTo(1, 3);
  });

  test("a magnitude of Vega and one of AB differ by Vega's flux over 3631 Jy", () => {
    for (const [, band] of bands) {
      const ratio = electronRate(12, band, 1, 0, 1, 0, "vega") / electronRate(12, band, 1, 0, 1, 0, "ab");
      expect(ratio / (band.vegaJansky / AB_JANSKY)).toBeCloseTo(1, 2);
    }
  });

  test("no AB rate, no electrons", () => {
    const band = { label: "", photonRate: 1000, widthAngstrom: 800 };
    expect(electronRate(10, band, 1, 0, 1, 0)).toBeGreaterThan(0);
    expect(electronRate(10, band, 1, 0, 1, 0, "ab")).toBeNaN();
  });
});

describe("standard bands", () => {
  /** Bessell, Castelli & Plez 1998, A&A 333, 231, Table A2; photon rates computed from f_λ. */
  test.each([
    ["U", 769.2],
    ["B", 1393.5],
    ["V", 996.2],
    ["R", 702.5],
    ["I", 452.3],
    ["J", 193.3],
    ["H", 93.4],
    ["K", 43.7],
    ["Kp", 47.8],
    ["L", 12.3],
    ["L*", 9.4],
  ] as const)("%s: %d photons, and an A0 star has magnitude 0", (key, rate) => {
    const band = BESSELL_1998[key];
    expect(photonRateOf(band)).toBeCloseTo(rate, 1);
    expect(Math.abs(magnitudeOfFLambda(band, band.fLambda * 1e-11))).toBeLessThan(0.01);
    expect(Math.abs(magnitudeOfFNu(band, band.fNu * 1e-20))).toBeLessThan(0.01);
  });

  test("fluxes by wavelength and by frequency agree within 4.3 % (computed)", () => {
    for (const { fNu, fLambda, wavelengthUm } of Object.values(BESSELL_1998)) {
      const byWavelength = (fNu * 1e-20 * C_ANGSTROM) / (wavelengthUm * 1e4) ** 2;
      expect(Math.abs(byWavelength / (fLambda * 1e-11) - 1)).toBeLessThan(0.043);
    }
  });

  test("the modern bands are theirs within 5 %", () => {
    const pairs = [
      ["B", "B"],
      ["V", "V"],
      ["R", "R"],
      ["I", "I"],
      ["J", "J"],
      ["H", "H"],
    ] as const;
    for (const [modern, old] of pairs)
      expect(PHOTON_BANDS[modern].photonRate / photonRateOf(BESSELL_1998[old])).toBeCloseTo(1, 1);
  });
});

describe("AB and the wide bands", () => {
  test("3631 Jy is AB magnitude 0: 5.479870e6 photons per unit of ln λ", () => {
    expect(abMagnitude(3631)).toBeCloseTo(0, 12);
    expect(janskyOfAb(5)).toBeCloseTo(36.31, 10);
    expect(abPhotonRate(1)).toBeCloseTo(5.47987e6, 0);
  });

  /** Riello et al. 2021, A&A 649, A3; the differences computed. */
  test.each([
    ["G", 0.113678],
    ["BP", 0.015413],
    ["RP", 0.356088],
  ] as const)("%s: AB less Vega is %d mag", (band, difference) => {
    expect(WIDE_BAND_ZERO_POINTS.ab[band].value - WIDE_BAND_ZERO_POINTS.vega[band].value).toBeCloseTo(
      difference,
      6,
    );
  });

  test("G = 10 is 1.883418e6 electrons per second (computed), and the magnitude of its flux is 10", () => {
    expect(wideBandFlux(10, "G", "vega")).toBeCloseTo(1.883418e6, 0);
    expect(wideBandMagnitude(wideBandFlux(10, "RP", "ab"), "RP", "ab")).toBeCloseTo(10, 12);
  });

  test("an area of 0.7278 m² and the rate in G make a throughput of 0.73 (computed)", () => {
    expect(wideBandFlux(0, "G", "vega") / (3.558e6 * 7278)).toBeCloseTo(0.73, 2);
  });

  test("Sloan magnitudes differ from AB in u and z alone", () => {
    expect(SLOAN_TO_AB).toEqual({ sloanU: -0.04, sloanG: 0, sloanR: 0, sloanI: 0, sloanZ: 0.02 });
  });
});

describe("photons alone", () => {
  const band = photonBandOf("V", BESSELL_1998.V, 880);

  test("less light through an obstruction and through air", () => {
    const full = electronRate(10, band, 0.5, 0, 0.5, 0);
    expect(electronRate(10, band, 0.5, 0.3, 0.5, 0) / full).toBeCloseTo(0.91, 12);
    expect(electronRate(10, band, 0.5, 0, 0.5, 0.2) / full).toBeCloseTo(10 ** -0.08, 12);
  });

  /** Computed: V = 10, 880 Å, throughput 0.5: aperture, electrons per second, ppm in the times below. */
  const SECONDS = [60, 120, 600, 1800, 3600, 6.5 * 3600, 13 * 3600] as const;
  test.each([
    [0.1, 3442.62, [2200.29, 1555.84, 695.79, 401.72, 284.06, 111.42, 78.78]],
    [0.2, 13770.5, [1100.15, 777.92, 347.9, 200.86, 142.03, 55.71, 39.39]],
    [0.5, 86065.4, [440.06, 311.17, 139.16, 80.34, 56.81, 22.28, 15.76]],
    [1, 344262, [220.03, 155.58, 69.58, 40.17, 28.41, 11.14, 7.88]],
    [2, 1.37705e6, [110.01, 77.79, 34.79, 20.09, 14.2, 5.57, 3.94]],
  ])("%d m: %d electrons per second", (aperture, rate, noises) => {
    const electrons = electronRate(10, band, aperture, 0, 0.5, 0);
    expect(electrons / rate).toBeCloseTo(1, 5);
    for (const [i, ppm] of noises.entries())
      expect(Math.abs(photonNoisePpm(electrons * (SECONDS[i] ?? 0)) - ppm)).toBeLessThan(0.0075);
  });

  test("the noise goes as 10^(0.2 m) / (D √t)", () => {
    const inputs = [
      fc.double({ min: 5, max: 18, noNaN: true }),
      fc.double({ min: 0.05, max: 8, noNaN: true }),
      fc.double({ min: 1, max: 1e5, noNaN: true }),
    ] as const;
    fc.assert(
      fc.property(...inputs, (magnitude, aperture, seconds) => {
        const ppm = photonNoisePpm(electronRate(magnitude, band, aperture, 0, 0.5, 0) * seconds);
        const scaled =
          (2200.29 * 10 ** (0.2 * (magnitude - 10))) / ((aperture / 0.1) * Math.sqrt(seconds / 60));
        expect(ppm / scaled).toBeCloseTo(1, 4);
      }),
    );
  });
});
