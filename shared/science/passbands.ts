/**
 * Photon rates of a star of magnitude 0 (Vega), photons s⁻¹ cm⁻² Å⁻¹, and the effective photon-response width of the
 * band, Å. Computed from public transmission curves and the spectrum of Vega of the CALSPEC library (alpha_lyr_stis_011).
 */
export interface PhotonBand {
  readonly label: string;
  readonly photonRate: number;
  readonly widthAngstrom: number;
}

export const PHOTON_BANDS = {
  B: { label: "B (Johnson)", photonRate: 1349.6, widthAngstrom: 1033 },
  V: { label: "V (Johnson)", photonRate: 1000.6, widthAngstrom: 836 },
  R: { label: "R (Cousins), red", photonRate: 715.1, widthAngstrom: 1319 },
  I: { label: "I (Cousins)", photonRate: 473.5, widthAngstrom: 1219 },
  J: { label: "J", photonRate: 194.1, widthAngstrom: 1628 },
  H: { label: "H", photonRate: 94.3, widthAngstrom: 2509 },
  Ks: { label: "Ks", photonRate: 46.6, widthAngstrom: 2621 },
  G: { label: "G, broad optical", photonRate: 784.5, widthAngstrom: 4412 },
  BP: { label: "BP", photonRate: 1025.5, widthAngstrom: 2626 },
  RP: { label: "RP", photonRate: 504.1, widthAngstrom: 2762 },
} as const satisfies Record<string, PhotonBand>;

export type PhotonBandKey = keyof typeof PHOTON_BANDS;

/**
 * Electrons per second from a star: `N₀ 10^(−0.4 (m + k X)) W (π/4) D² (1 − ε²) η`.
 *
 * @param magnitude in the band, Vega
 * @param band see {@link PHOTON_BANDS}
 * @param apertureM diameter D, m
 * @param obstruction ε, diameter ratio
 * @param throughput η, optics × filter peak × quantum efficiency
 * @param extinctionMag k X, mag
 */
export const electronRate = (
  magnitude: number,
  band: PhotonBand,
  apertureM: number,
  obstruction: number,
  throughput: number,
  extinctionMag: number,
): number =>
  band.photonRate *
  10 ** (-0.4 * (magnitude + extinctionMag)) *
  band.widthAngstrom *
  (Math.PI / 4) *
  (100 * apertureM) ** 2 *
  (1 - obstruction * obstruction) *
  throughput;
