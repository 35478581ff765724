/**
 * Temperature of cool dwarfs from five colours, alone, with [Fe/H] or with J − H: Mann et al. 2015, ApJ 804, 64, Table 2,
 * with the erratum 2016, ApJ 819, 87. V is Johnson, Ic Cousins, r and z SDSS, J and H 2MASS; BP and RP are those that the
 * paper synthesised before the survey's launch.
 */
import {
  COOL_DWARF_BP_RP,
  COOL_DWARF_TEFF_COEFFICIENTS,
  COOL_DWARF_TEFF_K,
  COOL_DWARF_TEFF_UNIT_K,
  RADIUS_FEH,
} from "./cool-dwarfs.ts";

export type CoolDwarfColour = "bp-rp" | "v-j" | "v-ic" | "r-z" | "r-j";

/**
 * Colours of the calibration stars (the 50 published rows; the whole sample may be slightly wider). Towards the red end
 * some of the quartics turn up again.
 */
export const COOL_DWARF_COLOURS: Readonly<
  Record<CoolDwarfColour, { readonly bluest: number; readonly reddest: number }>
> = {
  "bp-rp": COOL_DWARF_BP_RP,
  "v-j": { bluest: 2.64, reddest: 6.72 },
  "v-ic": { bluest: 1.7, reddest: 4.48 },
  "r-z": { bluest: 0.89, reddest: 4.22 },
  "r-j": { bluest: 2.06, reddest: 6.06 },
};

/** J − H of dwarfs of these temperatures: a judgement of this project, the paper names no limit. */
export const COOL_DWARF_J_H = { bluest: 0.4, reddest: 0.75 } as const;

/** What a row reads beside its colour. */
export type SecondTerm = "none" | "feh" | "j-h";

export interface CoolDwarfRow {
  readonly colour: CoolDwarfColour;
  readonly second: SecondTerm;
  /** a to e: powers 0 to 4 of the colour. */
  readonly coefficients: readonly [number, number, number, number, number];
  /** f and g: first and second power of [Fe/H] or J − H. */
  readonly secondCoefficients: readonly [number, number];
  /** Scatter of the fit, K. */
  readonly scatterK: number;
}

/** Zero point of the spectroscopic scale, K; it comes to the scatter of every row. */
export const COOL_DWARF_ZERO_POINT_K = 60;

const row = (
  colour: CoolDwarfColour,
  second: SecondTerm,
  coefficients: CoolDwarfRow["coefficients"],
  secondCoefficients: CoolDwarfRow["secondCoefficients"],
  scatterK: number,
): CoolDwarfRow => ({ colour, second, coefficients, secondCoefficients, scatterK });

/** The fifteen rows of the table. */
export const COOL_DWARF_ROWS = {
  "bp-rp": row("bp-rp", "none", COOL_DWARF_TEFF_COEFFICIENTS, [0, 0], 52),
  "v-j": row("v-j", "none", [2.84, -1.3453, 0.3906, -0.0546, 0.002913], [0, 0], 55),
  "v-ic": row("v-ic", "none", [2.455, -1.5701, 0.6891, -0.15, 0.01254], [0, 0], 53),
  "r-z": row("r-z", "none", [1.547, -0.7053, 0.3656, -0.1008, 0.01046], [0, 0], 58),
  // biome-ignore lint/suspicious/noApproximativeNumericConstant: a coefficient of the paper, not log e
  "r-j": row("r-j", "none", [2.445, -1.2578, 0.434, -0.072, 0.004502], [0, 0], 58),
  "bp-rp, feh": row("bp-rp", "feh", [2.835, -1.893, 0.786, -0.1594, 0.01243], [0.04417, 0], 45),
  "v-j, feh": row("v-j", "feh", [2.515, -1.054, 0.2965, -0.0415, 0.002245], [0.05262, 0], 42),
  "v-ic, feh": row("v-ic", "feh", [1.901, -0.6564, 0.1471, -0.01274, 0], [0.04697, 0], 48),
  "r-z, feh": row("r-z", "feh", [1.572, -0.722, 0.356, -0.09221, 0.009071], [0.0522, 0], 50),
  "r-j, feh": row("r-j", "feh", [2.532, -1.319, 0.4449, -0.07151, 0.004333], [0.05629, 0], 47),
  "bp-rp, j-h": row("bp-rp", "j-h", [3.172, -2.475, 1.082, -0.2231, 0.01738], [0.08776, 0.04355], 49),
  "v-j, j-h": row("v-j", "j-h", [2.769, -1.421, 0.4284, -0.06133, 0.00331], [0.1333, 0.05416], 48),
  "v-ic, j-h": row("v-ic", "j-h", [1.568, -0.4381, 0.07749, -0.00561, 0], [0.2441, -0.09257], 52),
  "r-z, j-h": row("r-z", "j-h", [1.384, -0.6132, 0.311, -0.08574, 0.008895], [0.1865, -0.02039], 55),
  "r-j, j-h": row("r-j", "j-h", [2.151, -1.092, 0.3767, -0.06292, 0.00395], [0.1697, 0.03106], 52),
} as const satisfies Readonly<Record<string, CoolDwarfRow>>;

const isSecondInside = (second: SecondTerm, value: number): boolean => {
  if (second === "feh") return value >= RADIUS_FEH.least && value <= RADIUS_FEH.most;
  if (second === "j-h") return value >= COOL_DWARF_J_H.bluest && value <= COOL_DWARF_J_H.reddest;
  return true;
};

/**
 * Effective temperature, K: `3500 (a + b X + c X² + d X³ + e X⁴ + f Y + g Y²)`, Y either [Fe/H] or J − H.
 *
 * @param of row of {@link COOL_DWARF_ROWS}
 * @param colour X, mag, inside {@link COOL_DWARF_COLOURS}
 * @param second Y: [Fe/H], −0.6 to 0.5, or J − H, 0.40 to 0.75; a row without one does not look at it
 * @returns NaN outside these and outside 2700 to 4100 K
 * @see Mann et al. 2015, ApJ 804, 64, Table 2, with the erratum 2016, ApJ 819, 87
 * @example coolDwarfTeffFromColour(COOL_DWARF_ROWS["v-j"], 4, 0) // 3359.0 to 0.1 K
 */
export const coolDwarfTeffFromColour = (of: CoolDwarfRow, colour: number, second: number): number => {
  const limits = COOL_DWARF_COLOURS[of.colour];
  if (!(colour >= limits.bluest && colour <= limits.reddest)) return Number.NaN;
  if (!isSecondInside(of.second, second)) return Number.NaN;
  const c = of.coefficients;
  const x = colour;
  const y = of.second === "none" ? 0 : second;
  const byColour = c[0] + x * (c[1] + x * (c[2] + x * (c[3] + x * c[4])));
  const bySecond = y * (of.secondCoefficients[0] + y * of.secondCoefficients[1]);
  const teff = COOL_DWARF_TEFF_UNIT_K * (byColour + bySecond);
  return teff >= COOL_DWARF_TEFF_K.coolest && teff <= COOL_DWARF_TEFF_K.hottest ? teff : Number.NaN;
};

/** dTeff / dX of {@link coolDwarfTeffFromColour}, K per mag. */
export const coolDwarfTeffColourSlope = (of: CoolDwarfRow, colour: number): number => {
  const c = of.coefficients;
  const x = colour;
  return COOL_DWARF_TEFF_UNIT_K * (c[1] + x * (2 * c[2] + x * (3 * c[3] + x * 4 * c[4])));
};

/** dTeff / dY of {@link coolDwarfTeffFromColour}: K per dex of [Fe/H] or per mag of J − H; 0 in a row without it. */
export const coolDwarfTeffSecondSlope = (of: CoolDwarfRow, second: number): number =>
  of.second === "none"
    ? 0
    : COOL_DWARF_TEFF_UNIT_K * (of.secondCoefficients[0] + 2 * of.secondCoefficients[1] * second);

/** Scatter of a row and zero point of the scale in quadrature, K. */
export const coolDwarfTeffScatter = (of: CoolDwarfRow): number =>
  Math.sqrt(of.scatterK * of.scatterK + COOL_DWARF_ZERO_POINT_K * COOL_DWARF_ZERO_POINT_K);
