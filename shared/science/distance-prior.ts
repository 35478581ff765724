/**
 * Distance from a parallax too uncertain to be inverted: the posterior under a prior of exponentially decreasing volume
 * density, `P(r) ∝ r² exp(−r / L) exp(−(ϖ − 1/r)² / 2σ²)` with ϖ and σ in arcseconds, r and L in pc.
 *
 * Bailer-Jones 2015, PASP 127, 994. Above σ/ϖ of about 0.25 the posterior has two peaks and its mode may carry almost no
 * probability: show the interval beside it.
 */

const MAS_PER_ARCSEC = 1000;
/** Length scale of a sample that reaches across the Galaxy, pc (Astraatmadja & Bailer-Jones 2016, ApJ 833, 119; from memory). */
export const GALACTIC_SCALE_LENGTH_PC = 1350;

const isUsable = (parallaxMas: number, parallaxErrorMas: number, scaleLengthPc: number): boolean =>
  Number.isFinite(parallaxMas) && parallaxErrorMas > 0 && scaleLengthPc > 0 && Number.isFinite(scaleLengthPc);

/** Natural logarithm of the posterior, without its constant, at that distance in pc. */
export const logDistancePosterior = (
  distancePc: number,
  parallaxMas: number,
  parallaxErrorMas: number,
  scaleLengthPc: number,
): number => {
  const deviation = (parallaxMas - MAS_PER_ARCSEC / distancePc) / parallaxErrorMas;
  return 2 * Math.log(distancePc) - distancePc / scaleLengthPc - (deviation * deviation) / 2;
};

/** The cubic of the modes with its sign: negative where the posterior rises. Lengths in units of 1/σ. */
const cubic = (r: number, fraction: number, scaleLength: number): number =>
  r * (r * (r / scaleLength - 2) + fraction) - 1;

/** The crossing between a point where the cubic is negative and one where it is not, to the last digit. */
const bisect = (below: number, above: number, fraction: number, scaleLength: number): number => {
  let [low, high] = [below, above];
  for (;;) {
    const middle = (low + high) / 2;
    if (middle <= low || middle >= high) return high;
    if (cubic(middle, fraction, scaleLength) < 0) low = middle;
    else high = middle;
  }
};

/**
 * Most probable distance, pc: a root of `r³/L − 2r² + (ϖ/σ²) r − 1/σ² = 0`. Of three roots the smallest counts where the
 * parallax is positive; a negative parallax has one positive root only. It tends to 1/ϖ for a sharp parallax and to 2 L
 * for none.
 *
 * @param parallaxMas parallax less its zero point, mas; any sign
 * @param parallaxErrorMas mas, above 0
 * @param scaleLengthPc L, pc, above 0
 * @returns NaN for arguments outside these
 * @see Bailer-Jones 2015, PASP 127, 994, eq. 19
 * @example modeOfDistance(2, 1, 1350) // 1500
 */
export const modeOfDistance = (
  parallaxMas: number,
  parallaxErrorMas: number,
  scaleLengthPc: number,
): number => {
  if (!isUsable(parallaxMas, parallaxErrorMas, scaleLengthPc)) return Number.NaN;
  const unit = MAS_PER_ARCSEC / parallaxErrorMas;
  const fraction = parallaxMas / parallaxErrorMas;
  const scaleLength = scaleLengthPc / unit;
  const discriminant = 16 - (12 * fraction) / scaleLength;
  // With a turning point above zero, the smallest root lies before it: there the cubic has come up from −1.
  const turn = discriminant > 0 ? ((4 - Math.sqrt(discriminant)) * scaleLength) / 6 : Number.NaN;
  if (turn > 0 && cubic(turn, fraction, scaleLength) >= 0)
    return unit * bisect(0, turn, fraction, scaleLength);
  let above = 2 * scaleLength;
  while (cubic(above, fraction, scaleLength) < 0) above *= 2;
  return unit * bisect(0, above, fraction, scaleLength);
};

/** Widths of the parallax beyond which the posterior counts as nothing. */
const REACH = 9;
const STEPS = 4000;

/** Distances between which all but some 1e-15 of the posterior lies, pc. */
const bounds = (parallaxMas: number, errorMas: number, scaleLengthPc: number): [number, number] => {
  const nearest = MAS_PER_ARCSEC / (Math.max(parallaxMas, 0) + REACH * errorMas);
  const least = parallaxMas - REACH * errorMas;
  const byPrior = 40 * scaleLengthPc + 10 * modeOfDistance(parallaxMas, errorMas, scaleLengthPc);
  return [nearest, least > 0 ? Math.min(MAS_PER_ARCSEC / least, byPrior) : byPrior];
};

/**
 * Quantiles of the posterior, pc, by integration on a grid even in log r; good to about 1 part in 10⁵. Not for hot loops.
 *
 * @param parallaxMas parallax less its zero point, mas; any sign
 * @param parallaxErrorMas mas, above 0
 * @param scaleLengthPc L, pc, above 0
 * @param levels probabilities, each above 0 and below 1, in rising order
 * @returns one distance per level; NaN for arguments outside these
 * @see Bailer-Jones 2015, PASP 127, 994
 * @example quantilesOfDistance(10, 1, 1350, [0.16, 0.5, 0.84]) // 94.3, 104.3 and 116.7 pc
 */
export const quantilesOfDistance = (
  parallaxMas: number,
  parallaxErrorMas: number,
  scaleLengthPc: number,
  levels: readonly number[],
): number[] => {
  if (!isUsable(parallaxMas, parallaxErrorMas, scaleLengthPc)) return levels.map(() => Number.NaN);
  const [nearest, farthest] = bounds(parallaxMas, parallaxErrorMas, scaleLengthPc);
  const step = Math.log(farthest / nearest) / STEPS;
  const distances = Float64Array.from({ length: STEPS + 1 }, (_, i) => nearest * Math.exp(i * step));
  const logs = distances.map(
    (r) => logDistancePosterior(r, parallaxMas, parallaxErrorMas, scaleLengthPc) + Math.log(r),
  );
  const highest = logs.reduce((most, log) => Math.max(most, log), Number.NEGATIVE_INFINITY);
  const shares = cumulate(logs.map((log) => Math.exp(log - highest)));
  return levels.map((level) => (level > 0 && level < 1 ? interpolate(shares, distances, level) : Number.NaN));
};

/** Running share of the whole, by the trapezium rule. */
const cumulate = (density: Float64Array): Float64Array => {
  const sums = new Float64Array(density.length);
  for (let i = 1; i < density.length; i++)
    sums[i] = (sums[i - 1] as number) + ((density[i - 1] as number) + (density[i] as number)) / 2;
  const whole = sums[sums.length - 1] as number;
  return sums.map((sum) => sum / whole);
};

const interpolate = (shares: Float64Array, distances: Float64Array, level: number): number => {
  const after = shares.findIndex((share) => share >= level);
  const [low, high] = [shares[after - 1] as number, shares[after] as number];
  const [near, far] = [distances[after - 1] as number, distances[after] as number];
  return near + ((level - low) / (high - low)) * (far - near);
};
