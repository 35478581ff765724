import type { SunlikeColour } from "./recipes.ts";
import { SUNLIKE_TEFF_COEFFICIENTS } from "./sunlike.ts";

/**
 * Temperature of F, G and K stars, dwarfs and giants, from any of twelve dereddened colours: Casagrande et al. 2021, MNRAS
 * 507, 2684, coefficients of the third release.
 */

type Limits = readonly [bluest: number, reddest: number];

export interface SunlikeRow {
  /** a₀ to a₁₄; note that a₄ and a₉ belong to the fifth power of the colour. */
  readonly coefficients: readonly [
    ...[number, number, number, number, number, number, number, number],
    ...[number, number, number, number, number, number, number],
  ];
  /** Colours of dwarfs (log g above 3.2) and of giants. */
  readonly dwarfs: Limits;
  readonly giants: Limits;
}

export const SUNLIKE_ROWS: Readonly<Record<SunlikeColour, SunlikeRow>> = {
  "bp-rp": { coefficients: SUNLIKE_TEFF_COEFFICIENTS, dwarfs: [0.2, 2.0], giants: [0.2, 2.55] },
  "bp-j": {
    coefficients: [
      8172.2439, -2508.6436, 442.6771, -25.312, 0, 251.5862, -240.7094, 86.0579, -11.2705, 0, -45.9166,
      -137.4645, 75.3191, -8.7175, 21.5739,
    ],
    dwarfs: [0.25, 3],
    giants: [0.9, 4.2],
  },
  "bp-h": {
    coefficients: [
      8158.938, -2146.1221, 368.163, -24.4624, 0, 231.868, -170.8788, 52.9164, -6.8455, 0, -45.5554,
      -142.9127, 55.2465, -4.1694, 17.6593,
    ],
    dwarfs: [0.4, 4],
    giants: [0.4, 4.9],
  },
  "bp-ks": {
    coefficients: [
      8265.6045, -2124.5574, 355.5051, -23.1719, 0, 209.9927, -161.4505, 50.5904, -6.3337, 0, -27.2653,
      -160.3595, 67.9016, -6.5232, 16.5137,
    ],
    dwarfs: [0.3, 4.2],
    giants: [0.3, 5.3],
  },
  "rp-j": {
    coefficients: [
      9046.6493, -7392.3789, 2841.5464, 0, -85.706, 0, -88.8397, 80.2959, 0, -15.3872, 0, 54.6816, 0, 0,
      -32.9499,
    ],
    dwarfs: [0.2, 1.05],
    giants: [0.6, 1.55],
  },
  "rp-h": {
    coefficients: [
      8870.909, -4702.5469, 1282.3384, 0, -15.8164, 0, -30.1373, 27.9228, 0, -4.8012, 0, 25.187, 0, 0,
      -22.302,
    ],
    dwarfs: [0.2, 1.6],
    giants: [0.2, 2.45],
  },
  "rp-ks": {
    coefficients: [
      8910.6966, -4305.9927, 1051.8759, 0, -8.6045, 0, -76.7984, 55.5861, 0, -3.9681, 0, 35.4718, 0, 0,
      -16.4448,
    ],
    dwarfs: [0.2, 1.85],
    giants: [0.2, 2.7],
  },
  "g-j": {
    coefficients: [
      8142.3539, -3003.2988, 499.1325, -4.8473, 0, 244.503, -303.1783, 125.8628, -18.2917, 0, -125.8444,
      59.5183, 0, 0, 16.8172,
    ],
    dwarfs: [0.15, 2.1],
    giants: [1, 2.8],
  },
  "g-h": {
    coefficients: [
      8133.809, -2573.4998, 554.7657, -54.071, 0, 229.2455, -206.8658, 68.6489, -10.5528, 0, -124.5804,
      41.963, 0, 0, 7.9258,
    ],
    dwarfs: [0.25, 2.6],
    giants: [0.25, 3.7],
  },
  "g-ks": {
    coefficients: [
      8031.7804, -1815.3523, 0, 70.7201, -1.7309, 252.9647, -342.0817, 161.3031, -26.7714, 0, -120.1133,
      42.6723, 0, 0, 10.0433,
    ],
    dwarfs: [0.2, 2.8],
    giants: [0.2, 3.9],
  },
  "g-bp": {
    coefficients: [
      7346.2, 5810.6636, 0, -2880.3823, 669.381, 415.3961, 2084.4883, 3509.22, 1849.0223, 0, -49.0748, 6.8032,
      0, 0, -100.3419,
    ],
    dwarfs: [-1, -0.15],
    giants: [-1.4, -0.15],
  },
  "g-rp": {
    coefficients: [
      8027.119, -5796.4277, 0, 1747.7036, -308.7685, 248.1828, -323.9569, -120.2658, 225.9584, 0, -35.8856,
      -16.5715, 0, 0, 48.5619,
    ],
    dwarfs: [0.15, 0.85],
    giants: [0.15, 1.15],
  },
};

/** Gravities, dex of cm/s², and [Fe/H] in which the relation holds, and the gravity that parts giants from dwarfs. */
export const SUNLIKE_LOGG = { least: 0, most: 5, leastOfDwarfs: 3.2 } as const;
export const SUNLIKE_FEH = { least: -4, most: 0.6 } as const;

const isInside = (row: SunlikeRow, colour: number, logg: number, feh: number): boolean => {
  const limits = logg > SUNLIKE_LOGG.leastOfDwarfs ? row.dwarfs : row.giants;
  return (
    colour >= limits[0] &&
    colour <= limits[1] &&
    logg >= SUNLIKE_LOGG.least &&
    logg <= SUNLIKE_LOGG.most &&
    feh >= SUNLIKE_FEH.least &&
    feh <= SUNLIKE_FEH.most
  );
};

/**
 * Effective temperature, K: `a₀ + a₁ X + a₂ X² + a₃ X³ + a₄ X⁵ + log g (a₅ + a₆ X + a₇ X² + a₈ X³ + a₉ X⁵) + [Fe/H] (a₁₀ +
 * a₁₁ X + a₁₂ X² + a₁₃ X³) + a₁₄ log g [Fe/H] X`. Zero point of the scale 20 K; scatter 30 to 80 K by colour (from memory).
 *
 * @param row of {@link SUNLIKE_ROWS}
 * @param colour X, dereddened, mag, inside the row's limits for dwarfs (log g above 3.2) or giants
 * @param logg dex of cm/s², 0 to 5
 * @param feh [Fe/H], −4 to 0.6
 * @returns NaN outside
 * @see Casagrande et al. 2021, MNRAS 507, 2684
 * @example sunlikeTeffFromColour(SUNLIKE_ROWS["bp-rp"], 1.2, 2.5, 0) // 4716.1 K, a giant
 */
export const sunlikeTeffFromColour = (row: SunlikeRow, colour: number, logg: number, feh: number): number => {
  if (!isInside(row, colour, logg, feh)) return Number.NaN;
  const a = row.coefficients;
  const x = colour;
  const x5 = x * x * x * x * x;
  return (
    a[0] +
    x * (a[1] + x * (a[2] + x * a[3])) +
    x5 * a[4] +
    logg * (a[5] + x * (a[6] + x * (a[7] + x * a[8])) + x5 * a[9]) +
    feh * (a[10] + x * (a[11] + x * (a[12] + x * a[13]))) +
    a[14] * logg * feh * x
  );
};

/** dTeff / dX of {@link sunlikeTeffFromColour}, K per mag. */
export const sunlikeTeffColourSlope = (
  row: SunlikeRow,
  colour: number,
  logg: number,
  feh: number,
): number => {
  const a = row.coefficients;
  const x = colour;
  const x4 = x * x * x * x;
  return (
    a[1] +
    x * (2 * a[2] + x * 3 * a[3]) +
    5 * x4 * a[4] +
    logg * (a[6] + x * (2 * a[7] + x * 3 * a[8]) + 5 * x4 * a[9]) +
    feh * (a[11] + x * (2 * a[12] + x * 3 * a[13])) +
    a[14] * logg * feh
  );
};

/** dTeff / dlog g and dTeff / d[Fe/H] of {@link sunlikeTeffFromColour}, K per dex. */
export const sunlikeTeffGravitySlope = (row: SunlikeRow, colour: number, feh: number): number => {
  const a = row.coefficients;
  const x = colour;
  return a[5] + x * (a[6] + x * (a[7] + x * a[8])) + x * x * x * x * x * a[9] + a[14] * feh * x;
};
export const sunlikeTeffIronSlope = (row: SunlikeRow, colour: number, logg: number): number => {
  const a = row.coefficients;
  const x = colour;
  return a[10] + x * (a[11] + x * (a[12] + x * a[13])) + a[14] * logg * x;
};
