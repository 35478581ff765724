import { lowerGamma, normalTail } from "./special-functions.ts";

/**
 * Probability that a search finds a planet whose transits together have a given statistic. The curve of Christiansen et al.
 * 2016, ApJ 828, 99, is not among them: that efficiency depends on the period too and is no function of the statistic alone.
 */
export type DetectionModel =
  /** What ideal noise gives: `[1 + erf((s − T) / √2)] / 2`, one half at the threshold. */
  | "error-function"
  /** From 0 at 6 to 1 at 16: Fressin et al. 2013, ApJ 766, 81. */
  | "ramp"
  /** `F(s − 4.1 − (T − 7.1); 4.65, 0.98)`: Christiansen et al. 2015, ApJ 810, 95; Burke et al. 2015, ApJ 809, 8. */
  | "gamma"
  /** The same for F, G and K dwarfs, shape 4.35, scale 1.05; from memory. */
  | "gamma-fgk"
  /** `0.940 F(s; 30.87, 0.271)`: Christiansen 2017, KSCI-19110; from memory. */
  | "final"
  /** `c F(s; a, b)` by the number of transits, 3 or more: Hsu et al. 2019, AJ 158, 109; which row has which number is our reading. */
  | "final-by-transits";

/** Statistic at which a planet counts as found, unless said otherwise. */
const CUSTOMARY_THRESHOLD = 7.1;

/** Gamma distribution of the statistic: 0 for x ≤ 0. */
const gammaCurve = (x: number, shape: number, scale: number): number => lowerGamma(shape, x / scale);

/** Least number of transits, shape, scale and ceiling. */
const BY_TRANSITS: readonly (readonly [least: number, shape: number, scale: number, ceiling: number])[] = [
  [37, 27.8185, 0.32432, 0.945075],
  [19, 32.6448, 0.268898, 0.889724],
  [10, 31.6342, 0.279425, 0.886144],
  [7, 30.1906, 0.294688, 0.875042],
  [6, 30.9919, 0.286979, 0.859865],
  [5, 31.5196, 0.282741, 0.833673],
  [4, 32.886, 0.269577, 0.768366],
  [3, 33.3884, 0.264472, 0.699093],
];

const byTransits = (statistic: number, transits: number): number => {
  for (const [least, shape, scale, ceiling] of BY_TRANSITS)
    if (transits >= least) return ceiling * gammaCurve(statistic, shape, scale);
  return Number.NaN;
};

const ramp = (statistic: number): number => Math.min(1, Math.max(0, (statistic - 6) / 10));

/**
 * Probability of a detection, 0 to 1.
 *
 * @param statistic signal over noise of all transits together
 * @param threshold T, statistic at which a planet counts as found; moves the first, third and fourth model alone
 * @param transits number of transits; counts in the last model alone
 * @returns NaN for a blank statistic, and in the last model for fewer than 3 transits
 * @example detectionProbability("gamma", 7.1) // 0.247394
 */
export const detectionProbability = (
  model: DetectionModel,
  statistic: number,
  threshold: number = CUSTOMARY_THRESHOLD,
  transits = Number.NaN,
): number => {
  const beyond = statistic - 4.1 - (threshold - CUSTOMARY_THRESHOLD);
  switch (model) {
    case "error-function":
      return normalTail(threshold - statistic);
    case "ramp":
      return ramp(statistic);
    case "gamma":
      return gammaCurve(beyond, 4.65, 0.98);
    case "gamma-fgk":
      return gammaCurve(beyond, 4.35, 1.05);
    case "final":
      return 0.94 * gammaCurve(statistic, 30.87, 0.271);
    case "final-by-transits":
      return byTransits(statistic, transits);
  }
};
