/** Light of a neighbour over the target's own, when it is Δm magnitudes fainter: `10^(−0.4 Δm)`. */
export const neighbourLight = (deltaMag: number): number => 10 ** (-0.4 * deltaMag);

/**
 * Radius to which the wings of a bright star's image reach: it grows as `10^(0.2 Δm)`, as the wings fall with the square of
 * the distance (common practice, no source).
 *
 * @param radius radius for a star of the target's brightness, in any unit; @param brighterByMag Δm, magnitudes brighter
 */
export const wingRadius = (radius: number, brighterByMag: number): number =>
  radius * 10 ** (0.2 * brighterByMag);
