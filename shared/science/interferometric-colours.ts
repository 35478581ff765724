/**
 * Temperature of dwarfs A to M from colours measured against interferometric diameters: Boyajian et al. 2013, ApJ 771, 40,
 * Table 8. For cross-checks only: at the Sun the scale is 20 to 150 K cooler than 5772 K. The infrared magnitudes are
 * Johnson's, not 2MASS: 0.04 mag of a slip cost about 60 K. The row of g − J is left out, as its second coefficient could not
 * be settled between −2933 and −2993.
 */

export type InterferometricColour =
  | "b-v"
  | "b-v, cubic"
  | "v-j"
  | "v-h"
  | "v-k"
  | "g-r"
  | "g-i"
  | "g-h"
  | "g-k";

export interface InterferometricRow {
  /** Powers of the colour from 0 on. */
  readonly coefficients: readonly number[];
  readonly bluest: number;
  readonly reddest: number;
}

const row = (bluest: number, reddest: number, ...coefficients: readonly number[]): InterferometricRow => ({
  coefficients,
  bluest,
  reddest,
});

export const INTERFEROMETRIC_ROWS: Readonly<Record<InterferometricColour, InterferometricRow>> = {
  /** Of sixth order; also attributed to Boyajian et al. 2012, ApJ 746, 101 (from memory). */
  "b-v": row(-0.02, 1.73, 9552, -17443, 44350, -68940, 57338, -24072, 4009),
  /** From memory. */
  "b-v, cubic": row(-0.02, 1.73, 9084, -7736, 4781, -1342.9),
  "v-j": row(-0.12, 4.24, 9052, -3972, 1039, -101),
  "v-h": row(-0.13, 4.77, 8958, -3023, 632, -52.9),
  "v-k": row(-0.15, 5.04, 8984, -2914, 588, -47.4),
  "g-r": row(-0.23, 1.4, 7526, -5570, 3750, -1332.9),
  "g-i": row(-0.43, 2.78, 7279, -3356, 1112, -153.9),
  "g-h": row(-0.12, 5.59, 8744, -2396, 432, -32.3),
  "g-k": row(-0.01, 5.86, 8618, -2178, 365, -25.8),
};

/**
 * Effective temperature, K: `Σ a_i X^i`; scatter 1 to 4 % (from memory). Main sequence, [Fe/H] about −0.5 to 0.4.
 *
 * @param of row of {@link INTERFEROMETRIC_ROWS}
 * @param colour X, mag, inside the limits of the row
 * @returns NaN outside
 * @see Boyajian et al. 2013, ApJ 771, 40, Table 8
 * @example interferometricTeff(INTERFEROMETRIC_ROWS["v-k"], 1.55) // 5703.5
 */
export const interferometricTeff = (of: InterferometricRow, colour: number): number => {
  if (!(colour >= of.bluest && colour <= of.reddest)) return Number.NaN;
  let teff = 0;
  for (let i = of.coefficients.length - 1; i >= 0; i--) teff = teff * colour + (of.coefficients[i] as number);
  return teff;
};

/** dTeff / dX of {@link interferometricTeff}, K per mag. */
export const interferometricTeffSlope = (of: InterferometricRow, colour: number): number => {
  let slope = 0;
  for (let i = of.coefficients.length - 1; i >= 1; i--)
    slope = slope * colour + i * (of.coefficients[i] as number);
  return slope;
};
