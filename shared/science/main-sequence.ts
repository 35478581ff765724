/**
 * Mean absolute G magnitude of the main sequence by BP − RP, F0V to M5V: Pecaut & Mamajek 2013, ApJS 208, 9, Table 5, as
 * extended by E. Mamajek, version 2024.05.15. Colours are of the second release (differences to the third usually below
 * 0.02 mag).
 */
const SEQUENCE: readonly (readonly [bpRp: number, absG: number])[] = [
  [0.377, 2.51],
  [0.49, 2.89],
  [0.587, 3.26],
  [0.67, 3.66],
  [0.719, 4.105],
  [0.784, 4.325],
  [0.823, 4.635],
  [0.85, 4.801],
  [0.9, 5.098],
  [0.983, 5.553],
  [1.1, 5.83],
  [1.19, 6.22],
  [1.34, 6.59],
  [1.43, 6.85],
  [1.53, 7.15],
  [1.7, 7.57],
  [1.84, 8.1],
  [1.97, 8.45],
  [2.09, 8.82],
  [2.23, 9.29],
  [2.39, 9.67],
  [2.5, 10.05],
  [2.78, 10.82],
  [2.94, 11.21],
  [3.16, 12.04],
  [3.35, 12.45],
];

/** The table by column: it is searched once per star. */
const COLOURS = Float64Array.from(SEQUENCE, ([bpRp]) => bpRp);
const MAGNITUDES = Float64Array.from(SEQUENCE, ([, absG]) => absG);

/**
 * Absolute G of a main-sequence star of that colour, mag, by linear interpolation.
 *
 * @returns NaN outside BP − RP 0.377 to 3.35
 */
export const mainSequenceAbsG = (bpRp: number): number => {
  if (!(bpRp >= (COLOURS[0] as number))) return Number.NaN;
  for (let i = 1; i < COLOURS.length; i++) {
    const redder = COLOURS[i] as number;
    if (bpRp > redder) continue;
    const bluer = COLOURS[i - 1] as number;
    const above = MAGNITUDES[i - 1] as number;
    return above + ((bpRp - bluer) / (redder - bluer)) * ((MAGNITUDES[i] as number) - above);
  }
  return Number.NaN;
};

/** A star this much brighter than the main sequence at its colour, mag, is no dwarf. */
export const DWARF_BRIGHTNESS_MARGIN = 1;
/** A star of lower gravity, dex of cm/s², is no dwarf. */
export const DWARF_LEAST_LOGG = 4.0;
