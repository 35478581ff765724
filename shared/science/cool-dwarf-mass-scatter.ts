/** Scatter of the mass from M_Ks, percent, by M_Ks: the table of the authors of Mann et al. 2019, ApJ 871, 63. */
const SCATTER: readonly (readonly [absKs: number, percent: number])[] = [
  [4.0, 3.6],
  [4.5, 2.4],
  [5.0, 2.4],
  [5.5, 2.3],
  [6.0, 2.1],
  [8.5, 2.1],
  [9.0, 2.2],
  [9.5, 2.3],
  [10.0, 2.5],
  [10.5, 2.5],
  [11.0, 3.2],
];

/**
 * Scatter of the mass from M_Ks, relative, linear between the entries of the table: 2.1 % in the middle, 3.6 % at the bright
 * end.
 *
 * @param absKs absolute Ks (Vega), 4 to 11
 * @returns NaN outside
 * @see Mann et al. 2019, ApJ 871, 63, and the table beside the authors' program
 * @example massScatter(7) // 0.021
 */
export const massScatter = (absKs: number): number => {
  for (let i = 1; i < SCATTER.length; i++) {
    const [faint, atFaint] = SCATTER[i] as (typeof SCATTER)[number];
    if (!(absKs <= faint)) continue;
    const [bright, atBright] = SCATTER[i - 1] as (typeof SCATTER)[number];
    if (absKs < bright) return Number.NaN;
    return (atBright + ((absKs - bright) / (faint - bright)) * (atFaint - atBright)) / 100;
  }
  return Number.NaN;
};
