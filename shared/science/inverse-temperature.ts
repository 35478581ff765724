/**
 * Temperature from dereddened BP − RP by way of θ = 5040 K / Teff: Mucciarelli, Bellazzini & Massari 2021, A&A 653, A90, Table
 * 1. A second modern scale for cross-checks: at the Sun's colour it gives 78 K less than Casagrande et al. 2021, and the
 * latter is right for the Sun.
 */

type Limits = readonly [least: number, most: number];

export interface InverseTemperatureRow {
  /** b₀ to b₅: 1, C, C², [Fe/H], [Fe/H]², [Fe/H] C. */
  readonly coefficients: readonly [number, number, number, number, number, number];
  readonly colours: Limits;
  /** [Fe/H] of the stars that the scale was drawn from (González Hernández & Bonifacio 2009; from memory). */
  readonly feh: Limits;
  /** Scatter, K. */
  readonly scatterK: number;
}

export const INVERSE_TEMPERATURE_ROWS = {
  dwarfs: {
    coefficients: [0.4929, 0.5092, -0.0353, 0.0192, -0.002, -0.0395],
    colours: [0.39, 1.5],
    feh: [-3.5, 0.5],
    scatterK: 61,
  },
  giants: {
    coefficients: [0.5323, 0.4775, -0.0344, -0.011, -0.002, -0.0009],
    colours: [0.33, 1.81],
    feh: [-4, 0.2],
    scatterK: 83,
  },
} as const satisfies Readonly<Record<string, InverseTemperatureRow>>;

const UNIT_K = 5040;

const theta = (b: InverseTemperatureRow["coefficients"], colour: number, feh: number): number =>
  b[0] + colour * (b[1] + colour * b[2]) + feh * (b[3] + b[4] * feh + b[5] * colour);

/**
 * Effective temperature, K: `5040 / (b₀ + b₁ C + b₂ C² + b₃ [Fe/H] + b₄ [Fe/H]² + b₅ [Fe/H] C)`; scatter 61 K (dwarfs) and 83 K
 * (giants).
 *
 * @param of row of {@link INVERSE_TEMPERATURE_ROWS}
 * @param bpRp C, dereddened BP − RP, mag, inside the colours of the row
 * @param feh [Fe/H] inside those of the row
 * @returns NaN outside
 * @see Mucciarelli, Bellazzini & Massari 2021, A&A 653, A90, Table 1
 * @example teffFromInverse(INVERSE_TEMPERATURE_ROWS.dwarfs, 0.82, 0) // 5683.94
 */
export const teffFromInverse = (of: InverseTemperatureRow, bpRp: number, feh: number): number =>
  bpRp >= of.colours[0] && bpRp <= of.colours[1] && feh >= of.feh[0] && feh <= of.feh[1]
    ? UNIT_K / theta(of.coefficients, bpRp, feh)
    : Number.NaN;

/** dTeff / dC and dTeff / d[Fe/H] of {@link teffFromInverse}, K per mag and per dex. */
export const inverseTeffColourSlope = (of: InverseTemperatureRow, bpRp: number, feh: number): number => {
  const b = of.coefficients;
  return (-UNIT_K * (b[1] + 2 * b[2] * bpRp + b[5] * feh)) / theta(b, bpRp, feh) ** 2;
};
export const inverseTeffIronSlope = (of: InverseTemperatureRow, bpRp: number, feh: number): number => {
  const b = of.coefficients;
  return (-UNIT_K * (b[3] + 2 * b[4] * feh + b[5] * bpRp)) / theta(b, bpRp, feh) ** 2;
};
