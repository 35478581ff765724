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

/** Widths of the parallax beyond which the posterior counts as nothing, and steps of the grid. */
const REACH = 9;
const STEPS = 1000;
/** Running integral of the posterior along the grid, filled anew by every call: it serves many stars. */
const INTEGRAL = new Float64Array(STEPS + 1);

/** Distance below which the posterior is nothing, pc. */
const nearestDistance = (parallaxMas: number, errorMas: number): number =>
  MAS_PER_ARCSEC / (Math.max(parallaxMas, 0) + REACH * errorMas);

/** Distance beyond which it is nothing, pc. */
const farthestDistance = (parallaxMas: number, errorMas: number, scaleLengthPc: number): number => {
  const byPrior = 40 * scaleLengthPc + 10 * modeOfDistance(parallaxMas, errorMas, scaleLengthPc);
  const least = parallaxMas - REACH * errorMas;
  return least > 0 ? Math.min(MAS_PER_ARCSEC / least, byPrior) : byPrior;
};

/** Fills the running integral over log r, by the trapezium rule, from `nearest` on in steps of that ratio. */
const integrate = (
  nearest: number,
  ratio: number,
  parallaxMas: number,
  errorMas: number,
  scaleLengthPc: number,
): void => {
  let highest = Number.NEGATIVE_INFINITY;
  for (let i = 0, r = nearest; i <= STEPS; i++, r *= ratio) {
    const log = logDistancePosterior(r, parallaxMas, errorMas, scaleLengthPc) + Math.log(r);
    INTEGRAL[i] = log;
    if (log > highest) highest = log;
  }
  let sum = 0;
  let before = 0;
  for (let i = 0; i <= STEPS; i++) {
    const density = Math.exp((INTEGRAL[i] as number) - highest);
    sum += (before + density) / 2;
    before = density;
    INTEGRAL[i] = sum;
  }
};

/** Distance below which that share of the integral lies, even in log r between two steps. */
const distanceAtShare = (share: number, nearest: number, ratio: number): number => {
  if (!(share > 0 && share < 1)) return Number.NaN;
  const wanted = share * (INTEGRAL[STEPS] as number);
  let [low, high] = [0, STEPS];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((INTEGRAL[middle] as number) < wanted) low = middle;
    else high = middle;
  }
  const below = INTEGRAL[low] as number;
  return nearest * ratio ** (low + (wanted - below) / ((INTEGRAL[high] as number) - below));
};

/**
 * Quantiles of the posterior, pc, by integration on a grid even in log r; good to a thousandth of the interval.
 *
 * @param parallaxMas parallax less its zero point, mas; any sign
 * @param parallaxErrorMas mas, above 0
 * @param scaleLengthPc L, pc, above 0
 * @param levels probabilities, each above 0 and below 1
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
  const nearest = nearestDistance(parallaxMas, parallaxErrorMas);
  const farthest = farthestDistance(parallaxMas, parallaxErrorMas, scaleLengthPc);
  const ratio = (farthest / nearest) ** (1 / STEPS);
  integrate(nearest, ratio, parallaxMas, parallaxErrorMas, scaleLengthPc);
  return levels.map((level) => distanceAtShare(level, nearest, ratio));
};
