/**
 * First-order errors of quantities made of others, for independent errors. `relative` errors are fractions; all others are
 * in the unit of the quantity.
 */
import { massScatter } from "./cool-dwarf-mass-scatter.ts";
import { logMassSlope, RADIUS_SCATTER, radiusFromAbsKs, radiusSlope } from "./cool-dwarfs.ts";

/** Relative error of `L = R² T⁴`: `√(4 s_R² + 16 s_T²)`. */
export const luminosityError = (relativeRadius: number, relativeTeff: number): number =>
  Math.sqrt(4 * relativeRadius ** 2 + 16 * relativeTeff ** 2);

/** Relative error of `R = √L / T²`: `√(s_L² / 4 + 4 s_T²)`. */
export const radiusError = (relativeLuminosity: number, relativeTeff: number): number =>
  Math.sqrt(relativeLuminosity ** 2 / 4 + 4 * relativeTeff ** 2);

/** Error of log g, dex: `√(s_M² + 4 s_R²) / ln 10`. Not for M and R that come from one magnitude. */
export const loggError = (relativeMass: number, relativeRadius: number): number =>
  Math.sqrt(relativeMass ** 2 + 4 * relativeRadius ** 2) / Math.LN10;

/** Relative error of the density `M / R³`: `√(s_M² + 9 s_R²)`. Not for M and R that come from one magnitude. */
export const densityError = (relativeMass: number, relativeRadius: number): number =>
  Math.sqrt(relativeMass ** 2 + 9 * relativeRadius ** 2);

/** Error of a relation y(x): `√((y′ σ_x)² + σ_int²)`, with the slope at x and the scatter of the relation. */
export const relationError = (slope: number, inputError: number, scatter: number): number =>
  Math.sqrt((slope * inputError) ** 2 + scatter ** 2);

/** Relative error of a distance of equal insolation, `√(L / S)`, at a limit that is itself exact: `s_L / 2`. */
export const insolationDistanceError = (relativeLuminosity: number): number => relativeLuminosity / 2;

/** Relative error of a transit probability `R★ / a`. */
export const transitProbabilityError = (relativeRadius: number, relativeAxis: number): number =>
  Math.sqrt(relativeRadius ** 2 + relativeAxis ** 2);

/** Relative error of a depth `(R_p / R★)²`: `2 √(s_Rp² + s_R²)`. */
export const depthError = (relativePlanet: number, relativeRadius: number): number =>
  2 * Math.sqrt(relativePlanet ** 2 + relativeRadius ** 2);

/** Relative error of the smallest detectable planet, `∝ R★ √σ_T`: `√(s_R² + s_σ² / 4)`. */
export const leastPlanetError = (relativeRadius: number, relativeNoise: number): number =>
  Math.sqrt(relativeRadius ** 2 + relativeNoise ** 2 / 4);

/** `p d ln M / dM_Ks + q d ln R / dM_Ks` times the error of M_Ks, and the scatters of both relations beside it. */
const errorThroughAbsKs = (absKs: number, absKsError: number, p: number, q: number): number => {
  const slope = p * logMassSlope(absKs) + (q * radiusSlope(absKs)) / radiusFromAbsKs(absKs);
  return Math.sqrt((slope * absKsError) ** 2 + (p * massScatter(absKs)) ** 2 + (q * RADIUS_SCATTER) ** 2);
};

/**
 * Error of log g, dex, of a cool dwarf whose mass and radius both come from M_Ks without [Fe/H]. They rise together, so that
 * the magnitude's error acts once, through both.
 *
 * @param absKs 4.6 to 9.8
 * @returns NaN outside
 */
export const loggErrorFromAbsKs = (absKs: number, absKsError: number): number =>
  errorThroughAbsKs(absKs, absKsError, 1, -2) / Math.LN10;

/** Relative error of its density, in the same way. */
export const densityErrorFromAbsKs = (absKs: number, absKsError: number): number =>
  errorThroughAbsKs(absKs, absKsError, 1, -3);
