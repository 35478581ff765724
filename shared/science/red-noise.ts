/**
 * Noise that neighbouring points share, and so does not average down within a transit.
 *
 * Pont, Zucker & Queloz 2006, MNRAS 373, 231. Typical from the ground 1 to 3 mmag, in space 10 to 50 ppm (from memory). Any
 * unit, as long as it is one.
 */

/**
 * Error of a depth from equal transits: `√((σ_w²/n + σ_r²) / N)`.
 *
 * @param white σ_w, noise of one point
 * @param red σ_r, noise that the points of one transit share
 * @param points n, points in a transit
 * @param transits N
 * @example depthError(1000, 50, 100) // 111.803
 */
export const depthError = (white: number, red: number, points: number, transits = 1): number =>
  Math.sqrt(((white * white) / points + red * red) / transits);

/**
 * Signal-to-noise ratio of transits with different numbers of points:
 * `S² = d² n² / Σ n_k² (σ_w²/n_k + σ_r²)`, n = Σ n_k.
 *
 * @param depth d, in the unit of the noise
 * @param points n_k, points in each transit
 */
export const redSignalToNoise = (
  depth: number,
  white: number,
  red: number,
  points: ArrayLike<number>,
): number => {
  let [sum, variance] = [0, 0];
  for (let i = 0; i < points.length; i++) {
    const n = points[i] ?? 0;
    sum += n;
    variance += n * (white * white + n * red * red);
  }
  return (depth * sum) / Math.sqrt(variance);
};

/**
 * Noise over a duration when part of it is red: `√((σ² − σ_r²)/T + σ_r²)`, σ the noise of one hour, T in hours.
 *
 * @param hourly noise of one hour, the red part included
 * @returns NaN where the red part exceeds the whole
 */
export const noiseOverHours = (hourly: number, red: number, hours: number): number =>
  red <= hourly ? Math.sqrt((hourly * hourly - red * red) / hours + red * red) : Number.NaN;
