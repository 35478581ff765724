import { PHOTON_BANDS } from "#shared/science/passbands.ts";
import { abMagnitude, WIDE_BAND_ZERO_POINTS } from "#shared/science/photometric-systems.ts";

const { vega, ab } = WIDE_BAND_ZERO_POINTS;

/** By how much AB magnitudes of a band are larger than those on the scale of Vega: 1.84 mag in Ks. */
const OFFSETS: Readonly<Record<string, number>> = {
  g_mag: ab.G.value - vega.G.value,
  bp_mag: ab.BP.value - vega.BP.value,
  rp_mag: ab.RP.value - vega.RP.value,
  v_mag: abMagnitude(PHOTON_BANDS.V.vegaJansky),
  j_mag: abMagnitude(PHOTON_BANDS.J.vegaJansky),
  h_mag: abMagnitude(PHOTON_BANDS.H.vegaJansky),
  ks_mag: abMagnitude(PHOTON_BANDS.Ks.vegaJansky),
};

/**
 * AB magnitude less the one on the scale of Vega, mag, of a catalogue's band; NaN for a band whose zero points are not known,
 * the instrument's own above all. Of G, BP and RP from their zero points (Riello et al. 2021, A&A 649, A3), of the others from
 * Vega's flux in the band; authors differ by 0.00 to 0.03 mag.
 */
export const vegaOffset = (key: string): number => OFFSETS[key] ?? Number.NaN;
