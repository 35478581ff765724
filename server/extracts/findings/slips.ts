/** Factors by which a slip of a unit changes every number of a column. */
const SLIPS: readonly { readonly factor: number; readonly words: string }[] = [
  { factor: 15, words: "15 ×" },
  { factor: 180 / Math.PI, words: "57.3 ×" },
  { factor: 1000, words: "1000 ×" },
  { factor: 3600, words: "3600 ×" },
  { factor: (180 * 3600) / Math.PI, words: "206 265 ×" },
  { factor: 1_000_000, words: "1 000 000 ×" },
  { factor: 3_600_000, words: "3 600 000 ×" },
];

export interface Slip {
  /** The file's numbers over what they should be. */
  readonly factor: number;
  /** `1000 × smaller`. */
  readonly words: string;
}

/**
 * The slip that a ratio of numbers tells of; undefined where it is no factor of units.
 *
 * @param within how far the logarithm of the ratio may lie from that of the factor
 */
export const slipOf = (ratio: number, within: number): Slip | undefined => {
  if (!(ratio > 0)) return undefined;
  const isSmaller = ratio < 1;
  const size = isSmaller ? 1 / ratio : ratio;
  const found = SLIPS.find(({ factor }) => Math.abs(Math.log(size / factor)) <= within);
  return (
    found && {
      factor: isSmaller ? 1 / found.factor : found.factor,
      words: `${found.words} ${isSmaller ? "smaller" : "larger"}`,
    }
  );
};
