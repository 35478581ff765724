import { ARCSEC_PER_DEGREE, RADIANS_PER_DEGREE } from "./angles.ts";

const RADIANS_PER_ARCSEC = RADIANS_PER_DEGREE / ARCSEC_PER_DEGREE;

/**
 * Logarithm (base e) of the factor by which two positions speak for one source rather than for two: `B = 2 / (σ₁² + σ₂²)
 * exp(−ψ² / (2 (σ₁² + σ₂²)))`, all in radians. The logarithm, as B itself overflows nothing but is beyond 1e17 for errors
 * of a milliarcsecond.
 *
 * @param error1 σ₁, error along one axis at the common epoch, arcsec; @param error2 σ₂
 * @param separationArcsec ψ, arcsec
 * @returns NaN unless an error is positive, none is negative and the separation is not; small angles are assumed
 * @see Budavári & Szalay 2008, ApJ 679, 301, eq. 16
 */
export const lnMatchFactor = (error1: number, error2: number, separationArcsec: number): number => {
  if (!(error1 >= 0 && error2 >= 0 && separationArcsec >= 0)) return Number.NaN;
  const variance = error1 * error1 + error2 * error2;
  if (!(variance > 0)) return Number.NaN;
  return (
    Math.log(2 / variance) -
    2 * Math.log(RADIANS_PER_ARCSEC) -
    (separationArcsec * separationArcsec) / (2 * variance)
  );
};

/**
 * The same for a source in n catalogues: `ln B = (n − 1) ln 2 + Σ ln wᵢ − ln Σ wᵢ − Σ_{i<j} wᵢ wⱼ ψᵢⱼ² / (2 Σ wᵢ)` with
 * `wᵢ = 1 / σᵢ²`, in radians.
 *
 * @param errors σᵢ along one axis, arcsec, each positive
 * @param separations ψᵢⱼ of the pairs in the order (0, 1), (0, 2) … (1, 2) …, arcsec
 * @returns 0 for a single catalogue; NaN for none, for an error that is not positive, or when pairs are missing
 * @see Budavári & Szalay 2008, ApJ 679, 301, eq. 18
 */
export const lnMatchFactorOfMany = (errors: ArrayLike<number>, separations: ArrayLike<number>): number => {
  const n = errors.length;
  if (n === 0 || separations.length !== (n * (n - 1)) / 2) return Number.NaN;
  let sum = 0;
  let logs = 0;
  let spread = 0;
  let pair = 0;
  for (let i = 0; i < n; i++) {
    const error = errors[i] ?? Number.NaN;
    if (!(error > 0)) return Number.NaN;
    const weight = 1 / (error * error);
    sum += weight;
    logs += Math.log(weight);
    for (let j = i + 1; j < n; j++) {
      const psi = separations[pair++] ?? Number.NaN;
      const other = errors[j] ?? Number.NaN;
      spread += (weight * psi * psi) / (other * other);
    }
  }
  const units = -2 * (n - 1) * Math.log(RADIANS_PER_ARCSEC);
  return (n - 1) * Math.LN2 + logs - Math.log(sum) + units - spread / (2 * sum);
};

/**
 * Probability that the positions are of one source: `1 / (1 + (1 − P₀) / (B P₀))`.
 *
 * @param lnFactor ln B, see {@link lnMatchFactor}
 * @param prior P₀, such as N_matching / (N₁ N₂) with the counts of the whole sky; 0 to 1, NaN outside
 * @see Budavári & Szalay 2008, ApJ 679, 301, eq. 11
 */
export const matchProbability = (lnFactor: number, prior: number): number =>
  prior >= 0 && prior <= 1 ? 1 / (1 + Math.exp(-lnFactor) * ((1 - prior) / prior)) : Number.NaN;

/**
 * Radius, in the unit of the errors, within which a share of the true pairs lies: `√(σ₁² + σ₂²) √(−2 ln(1 − p))`. A floor of
 * half to one arcsecond guards against errors that are given too small (common practice, no source); it is the caller's.
 *
 * @param share p, 0 ≤ p < 1; NaN outside. 0.68 gives 1.5096 σ, 0.95 gives 2.4477 σ, 0.9973 gives 3.4393 σ
 */
export const searchRadius = (error1: number, error2: number, share: number): number =>
  share >= 0 && share < 1 && error1 >= 0 && error2 >= 0
    ? Math.sqrt((error1 * error1 + error2 * error2) * -2 * Math.log1p(-share))
    : Number.NaN;

/**
 * Sources that stand within a radius by chance: `π r² ρ`.
 *
 * @param radiusArcsec r, arcsec; @param density ρ, sources per square degree; NaN when either is negative
 */
export const chanceAlignments = (radiusArcsec: number, density: number): number =>
  radiusArcsec >= 0 && density >= 0
    ? Math.PI * (radiusArcsec / ARCSEC_PER_DEGREE) ** 2 * density
    : Number.NaN;
