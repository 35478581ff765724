/** Zero point of magnitudes: the spectrum of Vega, or a flat f_ν of 3631 Jy. */
export type MagnitudeSystem = "vega" | "ab";

/** Photons of a star of magnitude 0 in a band. */
export interface PhotonBand {
  readonly label: string;
  /** Photon rate at magnitude 0 (Vega), photons s⁻¹ cm⁻² Å⁻¹. */
  readonly photonRate: number;
  /** The same at magnitude 0 (AB); absent where it is not known. */
  readonly photonRateAb?: number;
  /** Effective photon-response width, Å: the integral of the photon response over its peak. */
  readonly widthAngstrom: number;
}

/** A band with what else its transmission curve and the spectrum of Vega give. */
export interface SyntheticBand extends PhotonBand {
  readonly photonRateAb: number;
  /** Pivot wavelength, Å. */
  readonly pivotAngstrom: number;
  /** Full width at half maximum, Å. */
  readonly fwhmAngstrom: number;
  /** Flux of Vega, erg s⁻¹ cm⁻² Å⁻¹. */
  readonly vegaFlux: number;
  /** Flux of Vega, Jy. */
  readonly vegaJansky: number;
}

const band = (
  label: string,
  pivotAngstrom: number,
  widthAngstrom: number,
  fwhmAngstrom: number,
  vegaFlux: number,
  vegaJansky: number,
  photonRate: number,
  photonRateAb: number,
): SyntheticBand => ({
  label,
  pivotAngstrom,
  widthAngstrom,
  fwhmAngstrom,
  vegaFlux,
  vegaJansky,
  photonRate,
  photonRateAb,
});

/**
 * Synthetic photometry: pivot and effective width, full width at half maximum, Vega's flux by wavelength and by frequency,
 * photon rates at magnitude 0 (Vega and AB). Computed from public transmission curves and the spectrum of Vega of the CALSPEC
 * library (alpha_lyr_stis_011); zero points of different authors differ by 0.00 to 0.03 mag.
 */
export const PHOTON_BANDS = {
  U: band("U (Johnson)", 3634.7, 555, 542, 4.1834e-9, 1843.5, 765.5, 1507.7),
  B: band("B (Johnson)", 4296.7, 1033, 1030, 6.2393e-9, 3842.2, 1349.6, 1275.4),
  V: band("V (Johnson)", 5469.9, 836, 790, 3.6338e-9, 3626.5, 1000.6, 1001.8),
  R: band("R (Cousins), red", 6471.2, 1319, 1232, 2.195e-9, 3066, 715.1, 846.8),
  I: band("I (Cousins)", 7872.6, 1219, 1267, 1.1948e-9, 2470.2, 473.5, 696.1),
  J: band("J", 12390.8, 1628, 2140, 3.1122e-10, 1593.8, 194.1, 442.3),
  H: band("H", 16494.9, 2509, 2470, 1.1353e-10, 1030.4, 94.3, 332.2),
  Ks: band("Ks", 21638.1, 2621, 2710, 4.279e-11, 668.28, 46.6, 253.3),
  G: band("G, broad optical", 6246.8, 4412, 4535, 2.4948e-9, 3247.3, 784.5, 877.2),
  BP: band("BP", 5048.6, 2626, 3202, 4.0351e-9, 3430.7, 1025.5, 1085.4),
  RP: band("RP", 7740.9, 2762, 2825, 1.2936e-9, 2585.6, 504.1, 707.9),
  sloanU: band("u (Sloan)", 3556.5, 558, 575, 3.6725e-9, 1549.5, 657.5, 1540.8),
  sloanG: band("g (Sloan)", 4702.5, 1158, 1250, 5.4297e-9, 4005.1, 1285.4, 1165.3),
  sloanR: band("r (Sloan)", 6175.6, 1111, 1125, 2.5033e-9, 3184.5, 778.2, 887.3),
  sloanI: band("i (Sloan)", 7490, 1045, 1200, 1.3981e-9, 2616.3, 527.2, 731.6),
  sloanZ: band("z (Sloan)", 8946.7, 1125, 950, 8.44e-10, 2253.5, 380.1, 612.5),
} as const satisfies Record<string, SyntheticBand>;

export type PhotonBandKey = keyof typeof PHOTON_BANDS;

/**
 * Electrons per second from a star: `N₀ 10^(−0.4 (m + k X)) W (π/4) D² (1 − ε²) η`.
 *
 * @param magnitude in the band and system
 * @param band see {@link PHOTON_BANDS}
 * @param apertureM diameter D, m
 * @param obstruction ε, diameter ratio
 * @param throughput η, optics × filter peak × quantum efficiency
 * @param extinctionMag k X, mag
 * @returns NaN for AB magnitudes in a band whose AB rate is not known
 */
export const electronRate = (
  magnitude: number,
  band: PhotonBand,
  apertureM: number,
  obstruction: number,
  throughput: number,
  extinctionMag: number,
  system: MagnitudeSystem = "vega",
): number =>
  (system === "ab" ? (band.photonRateAb ?? Number.NaN) : band.photonRate) *
  10 ** (-0.4 * (magnitude + extinctionMag)) *
  band.widthAngstrom *
  (Math.PI / 4) *
  (100 * apertureM) ** 2 *
  (1 - obstruction * obstruction) *
  throughput;
