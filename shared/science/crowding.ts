/**
 * Radius to which the wings of a star's image reach: it grows as `10^(0.2 Δm)`, as the light of the wings falls with the
 * square of the distance (common practice, no source).
 *
 * @param radius that of a star of the target's brightness, in any unit; common practice, no source: 3 to 10 pixels
 * @param brighterByMag Δm, magnitudes by which the star is brighter than the target
 */
export const wingRadius = (radius: number, brighterByMag: number): number =>
  radius * 10 ** (0.2 * brighterByMag);
