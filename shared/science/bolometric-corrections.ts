/** Bolometric corrections beside those of BP − RP and G: to Ks from any colour of cool dwarfs, and to V from temperature. */
import { COOL_DWARF_COLOURS, type CoolDwarfColour } from "./cool-dwarf-colours.ts";
import { BC_KS_COEFFICIENTS, BC_KS_SCATTER } from "./cool-dwarfs.ts";

export interface BcKsRow {
  /** Powers of the colour, 0 to 2. */
  readonly coefficients: readonly [number, number, number];
  /** Scatter (rms) about the fit, mag. */
  readonly scatter: number;
}

/**
 * Fits of this project to the 50 stars published with Mann et al. 2015 (F_bol, Ks, colours), not relations of that paper;
 * `BC_Ks = m_bol − Ks` with the zero point of IAU 2015 B2.
 */
export const BC_KS_ROWS: Readonly<Record<CoolDwarfColour, BcKsRow>> = {
  "v-j": { coefficients: [1.88986475, 0.25624399, -0.01449762], scatter: 0.036 },
  "r-j": { coefficients: [2.01655156, 0.24988401, -0.01557571], scatter: 0.036 },
  "r-z": { coefficients: [2.24865169, 0.26243602, -0.02218204], scatter: 0.038 },
  "bp-rp": { coefficients: BC_KS_COEFFICIENTS, scatter: BC_KS_SCATTER },
  "v-ic": { coefficients: [1.93042237, 0.36354443, -0.02992203], scatter: 0.04 },
};

/**
 * Bolometric correction to Ks from a colour, mag: a parabola; rms 0.036 to 0.040 mag.
 *
 * @param colour which colour
 * @param value its value, mag, inside {@link COOL_DWARF_COLOURS}
 * @returns NaN outside
 * @see a fit of this project to the 50 stars published with Mann et al. 2015; not a relation of that paper
 * @example bolometricCorrectionKsFromColour("v-j", 4.5) // 2.7494
 */
export const bolometricCorrectionKsFromColour = (colour: CoolDwarfColour, value: number): number => {
  const limits = COOL_DWARF_COLOURS[colour];
  if (!(value >= limits.bluest && value <= limits.reddest)) return Number.NaN;
  const c = BC_KS_ROWS[colour].coefficients;
  return c[0] + value * (c[1] + value * c[2]);
};

/** dBC_Ks / dcolour of {@link bolometricCorrectionKsFromColour}. */
export const bolometricCorrectionKsColourSlope = (colour: CoolDwarfColour, value: number): number => {
  const c = BC_KS_ROWS[colour].coefficients;
  return c[1] + 2 * c[2] * value;
};

/**
 * Temperatures for the correction to V, K. Below, the curve follows giants; above, it is not checked here (judgements of
 * this project).
 */
export const BC_V_TEFF_K = { coolest: 4000, hottest: 20_000 } as const;
/** log Teff where its branches meet: each belongs to the hotter one. There it jumps by 0.022 and 0.003 mag. */
export const BC_V_BRANCHES = [3.7, 3.9] as const;
/** Absolute bolometric magnitude of the Sun on the scale of this correction; not 4.74. */
export const BC_V_SOLAR_MBOL = 4.73;

type Powers = readonly [number, number, number, number, number, number];

/** Powers of log Teff, 0 to 5, of the cool, warm and hot branch; all digits are needed, as the terms nearly cancel. */
export const BC_V_COEFFICIENTS: readonly [Powers, Powers, Powers] = [
  [-0.190537291496456e5, 0.155144866764412e5, -0.421278819301717e4, 0.381476328422343e3, 0, 0],
  [
    -0.370510203809015e5, 0.385672629965804e5, -0.150651486316025e5, 0.261724637119416e4,
    -0.170623810323864e3, 0,
  ],
  [
    -0.118115450538963e6, 0.137145973583929e6, -0.636233812100225e5, 0.147412923562646e5,
    -0.170587278406872e4, 0.78873172180499e2,
  ],
];

const branchOfV = (x: number): Powers => {
  if (x < BC_V_BRANCHES[0]) return BC_V_COEFFICIENTS[0];
  return x < BC_V_BRANCHES[1] ? BC_V_COEFFICIENTS[1] : BC_V_COEFFICIENTS[2];
};

/**
 * Bolometric correction to V, mag: a polynomial in log Teff in three branches. To be used with a solar bolometric magnitude of
 * 4.73.
 *
 * @param teffK 4000 to 20 000 K
 * @returns NaN outside
 * @see Flower 1996, ApJ 469, 355, as corrected by Torres 2010, AJ 140, 1158, Table 1
 * @example bolometricCorrectionV(5777) // −0.0801
 */
export const bolometricCorrectionV = (teffK: number): number => {
  if (!(teffK >= BC_V_TEFF_K.coolest && teffK <= BC_V_TEFF_K.hottest)) return Number.NaN;
  const x = Math.log10(teffK);
  const c = branchOfV(x);
  return c[0] + x * (c[1] + x * (c[2] + x * (c[3] + x * (c[4] + x * c[5]))));
};

/** dBC_V / dTeff of {@link bolometricCorrectionV}, mag per K. */
export const bolometricCorrectionVSlope = (teffK: number): number => {
  const x = Math.log10(teffK);
  const c = branchOfV(x);
  const slope = c[1] + x * (2 * c[2] + x * (3 * c[3] + x * (4 * c[4] + x * 5 * c[5])));
  return slope / (teffK * Math.LN10);
};

/** Luminosity from an absolute V magnitude and temperature, L☉: `10^(0.4 (4.73 − M_V − BC_V))`. */
export const luminosityFromAbsV = (absV: number, teffK: number): number =>
  10 ** (0.4 * (BC_V_SOLAR_MBOL - absV - bolometricCorrectionV(teffK)));
