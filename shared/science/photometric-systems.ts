import type { MagnitudeSystem, PhotonBand } from "./passbands.ts";

/** Zero points of photometric systems, as their papers print them. */

/** Planck's constant times the speed of light, erg Å: exact in the SI. */
const HC_ERG_ANGSTROM = 1.986445857148928e-8;
/** Planck's constant, erg s: exact in the SI. */
const PLANCK_ERG_S = 6.62607015e-27;

/** A band of an A0 star of magnitude 0: fluxes and the zero points to which they belong. */
export interface StandardBand {
  /** Effective wavelength, μm. */
  readonly wavelengthUm: number;
  /** 1e-20 erg s⁻¹ cm⁻² Hz⁻¹. */
  readonly fNu: number;
  /** 1e-11 erg s⁻¹ cm⁻² Å⁻¹. */
  readonly fLambda: number;
  readonly zeroPointNu: number;
  readonly zeroPointLambda: number;
}

const standard = (
  wavelengthUm: number,
  fNu: number,
  fLambda: number,
  zeroPointNu: number,
  zeroPointLambda: number,
): StandardBand => ({ wavelengthUm, fNu, fLambda, zeroPointNu, zeroPointLambda });

/**
 * Johnson-Cousins-Glass system. Bessell, Castelli & Plez 1998, A&A 333, 231, Table A2. Its two rows of zero points have each
 * other's label in print; here they are assigned as the fluxes ask. Fluxes by wavelength and by frequency agree within 1 to
 * 4 %: photon rates are taken from those by wavelength.
 */
export const BESSELL_1998 = {
  U: standard(0.366, 1.79, 417.5, 0.77, -0.152),
  B: standard(0.438, 4.063, 632, -0.12, -0.602),
  V: standard(0.545, 3.636, 363.1, 0, 0),
  R: standard(0.641, 3.064, 217.7, 0.186, 0.555),
  I: standard(0.798, 2.416, 112.6, 0.444, 1.271),
  J: standard(1.22, 1.589, 31.47, 0.899, 2.655),
  H: standard(1.63, 1.021, 11.38, 1.379, 3.76),
  K: standard(2.19, 0.64, 3.961, 1.886, 4.906),
  Kp: standard(2.12, 0.676, 4.479, 1.826, 4.78),
  L: standard(3.45, 0.285, 0.708, 2.765, 6.775),
  "L*": standard(3.8, 0.238, 0.489, 2.961, 7.177),
} as const satisfies Record<string, StandardBand>;

/** Photon rate at magnitude 0, photons s⁻¹ cm⁻² Å⁻¹: `f_λ λ / hc`. */
export const photonRateOf = (band: StandardBand): number =>
  (band.fLambda * 1e-11 * band.wavelengthUm * 1e4) / HC_ERG_ANGSTROM;

/** A standard band as a photon band, with the width that its filter is given, Å. */
export const photonBandOf = (label: string, band: StandardBand, widthAngstrom: number): PhotonBand => ({
  label,
  photonRate: photonRateOf(band),
  widthAngstrom,
});

/** Magnitude of a flux by frequency, erg s⁻¹ cm⁻² Hz⁻¹: `−2.5 log f_ν − 48.598 − zp`. */
export const magnitudeOfFNu = (band: StandardBand, fNu: number): number =>
  -2.5 * Math.log10(fNu) - 48.598 - band.zeroPointNu;

/** Magnitude of a flux by wavelength, erg s⁻¹ cm⁻² Å⁻¹: `−2.5 log f_λ − 21.100 − zp`. */
export const magnitudeOfFLambda = (band: StandardBand, fLambda: number): number =>
  -2.5 * Math.log10(fLambda) - 21.1 - band.zeroPointLambda;

/** Flux of AB magnitude 0, Jy. */
export const AB_JANSKY = 3631;

/** AB magnitude of a flux in Jy. Oke & Gunn 1983, ApJ 266, 713 (from memory). */
export const abMagnitude = (jansky: number): number => -2.5 * Math.log10(jansky / AB_JANSKY);

/** Flux, Jy, of an AB magnitude: the inverse of {@link abMagnitude}. */
export const janskyOfAb = (magnitude: number): number => AB_JANSKY * 10 ** (-0.4 * magnitude);

/** Photon rate at AB magnitude 0 at a wavelength, photons s⁻¹ cm⁻² Å⁻¹: `f_ν / (h λ)`, 5.47987e6 / λ. */
export const abPhotonRate = (wavelengthAngstrom: number): number =>
  (AB_JANSKY * 1e-23) / (PLANCK_ERG_S * wavelengthAngstrom);

/** Offset from Sloan magnitudes to AB: `m_AB = m + offset`; u −0.04, z +0.02, the others about 0. */
export const SLOAN_TO_AB = { sloanU: -0.04, sloanG: 0, sloanR: 0, sloanI: 0, sloanZ: 0.02 } as const;

interface ZeroPoint {
  /** mag, of one electron per second. */
  readonly value: number;
  readonly error: number;
}

type WideBand = "G" | "BP" | "RP";

/**
 * Zero points of G, BP and RP of the third release: `m = ZP − 2.5 log(flux in electrons per second)`. Riello et al. 2021,
 * A&A 649, A3; the error of RP (AB) is from memory.
 */
export const WIDE_BAND_ZERO_POINTS: Readonly<Record<MagnitudeSystem, Readonly<Record<WideBand, ZeroPoint>>>> =
  {
    vega: {
      G: { value: 25.6873668671, error: 0.0027553202 },
      BP: { value: 25.3385422158, error: 0.00279017 },
      RP: { value: 24.7478955012, error: 0.0037793818 },
    },
    ab: {
      G: { value: 25.8010446445, error: 0.0027590522 },
      BP: { value: 25.3539555559, error: 0.0023065687 },
      RP: { value: 25.1039837393, error: 0.0015800349 },
    },
  };

/** Magnitude of a flux in electrons per second in G, BP or RP. */
export const wideBandMagnitude = (flux: number, band: WideBand, system: MagnitudeSystem): number =>
  WIDE_BAND_ZERO_POINTS[system][band].value - 2.5 * Math.log10(flux);

/** Electrons per second of a magnitude in G, BP or RP: the inverse of {@link wideBandMagnitude}. */
export const wideBandFlux = (magnitude: number, band: WideBand, system: MagnitudeSystem): number =>
  10 ** (0.4 * (WIDE_BAND_ZERO_POINTS[system][band].value - magnitude));
