/**
 * Light share: `F_target / F_total`, the fraction of the light in the aperture that is the target's own. Papers also use
 * the opposite ratio, `F_others / F_target`; the two are converted below.
 */

/** Light share of a star with one neighbour Δm magnitudes fainter in the aperture: `1 / (1 + 10^(−0.4 Δm))`. */
export const lightShareOfPair = (deltaMag: number): number => 1 / (1 + 10 ** (-0.4 * deltaMag));

/** Factor by which a planet's radius exceeds what the diluted depth suggests: `1 / √share`. */
export const radiusFactor = (lightShare: number): number =>
  lightShare > 0 && lightShare <= 1 ? 1 / Math.sqrt(lightShare) : Number.NaN;
