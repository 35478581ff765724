/**
 * Light share: `F_target / F_total`, the fraction of the light in the aperture that is the target's own. Papers also use
 * the opposite ratio, `F_others / F_target`; the two are converted below.
 */

const isShare = (lightShare: number): boolean => lightShare > 0 && lightShare <= 1;

/** Light share of a star with one neighbour Δm magnitudes fainter in the aperture: `1 / (1 + 10^(−0.4 Δm))`. */
export const lightShareOfPair = (deltaMag: number): number => 1 / (1 + 10 ** (-0.4 * deltaMag));

/** Light share of a star with several neighbours in the aperture: `1 / (1 + Σ 10^(−0.4 Δm))`; 1 with none. */
export const lightShareOfMany = (deltaMags: ArrayLike<number>): number => {
  let others = 0;
  for (let i = 0; i < deltaMags.length; i++) others += 10 ** (-0.4 * (deltaMags[i] ?? Number.NaN));
  return 1 / (1 + others);
};

/** Light share from the light of the others over the target's own, 0 or more. */
export const lightShareFromOthers = (othersOverTarget: number): number =>
  othersOverTarget >= 0 ? 1 / (1 + othersOverTarget) : Number.NaN;

/** Light of the others over the target's own: the inverse of {@link lightShareFromOthers}. */
export const othersFromLightShare = (lightShare: number): number =>
  isShare(lightShare) ? 1 / lightShare - 1 : Number.NaN;

/** Factor by which a planet's radius exceeds what the diluted depth suggests: `1 / √share`. */
export const radiusFactor = (lightShare: number): number =>
  isShare(lightShare) ? 1 / Math.sqrt(lightShare) : Number.NaN;

/**
 * Depth before dilution: `depth / share`. Where another star in the aperture is transited, take that star's share.
 *
 * @see Ciardi et al. 2015, ApJ 805, 16
 */
export const undilutedDepth = (depth: number, lightShare: number): number =>
  isShare(lightShare) ? depth / lightShare : Number.NaN;
