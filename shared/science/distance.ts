/**
 * Distance by inversion, pc: `1000 / (parallax − zeroPoint)`.
 *
 * @param parallaxMas parallax as measured, mas
 * @param parallaxErrorMas its error, mas
 * @param fractionLimit largest error over parallax for which the inverse is a fair distance. At 0.1 the bias is 1 %
 *   (Lutz & Kelker 1973, PASP 85, 573; Luri et al. 2018, A&A 616, A9)
 * @param zeroPointMas offset of the release's parallaxes, mas, subtracted; normally negative, 0 unless chosen
 * @returns pc; NaN for a parallax that is not positive, has no error or is less certain than the limit
 * @example distanceFromParallax(60, 0.05, 0.1, 0) // 16.666666666666668
 */
export const distanceFromParallax = (
  parallaxMas: number,
  parallaxErrorMas: number,
  fractionLimit: number,
  zeroPointMas: number,
): number => {
  const parallax = parallaxMas - zeroPointMas;
  if (!(parallax > 0) || !(parallaxErrorMas <= fractionLimit * parallax)) return Number.NaN;
  return 1000 / parallax;
};

/**
 * Bias of an inverted parallax, relative, to second order in f = σ/ϖ: the mean of `1/ϖ` is too large by `f² + 3 f⁴`.
 *
 * @param fraction error over parallax, well below 1
 * @see Lutz & Kelker 1973, PASP 85, 573; Luri et al. 2018, A&A 616, A9
 * @example inversionBias(0.1) // 0.0103
 */
export const inversionBias = (fraction: number): number => fraction ** 2 + 3 * fraction ** 4;

/**
 * Absolute magnitude `m + 5 − 5 log10(d)`.
 *
 * @param magnitude apparent magnitude, mag
 * @param distancePc pc
 * @param extinctionMag extinction in the same band, mag
 */
export const absoluteMagnitude = (magnitude: number, distancePc: number, extinctionMag: number): number =>
  magnitude + 5 - 5 * Math.log10(distancePc) - extinctionMag;

/**
 * Error of an absolute magnitude, mag: the photometric error, the relative error of the distance and the error of the
 * extinction in quadrature, `σ² = σ_m² + (5 s_d / ln 10)² + σ_A²`.
 */
export const absoluteMagnitudeError = (
  magnitudeError: number,
  relativeDistanceError: number,
  extinctionError = 0,
): number =>
  Math.sqrt(magnitudeError ** 2 + ((5 * relativeDistanceError) / Math.LN10) ** 2 + extinctionError ** 2);
