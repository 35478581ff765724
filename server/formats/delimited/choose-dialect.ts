import { type DecimalMark, type Delimiter, decimalMarkOf, type Parting, partingsOf } from "../dialect.ts";
import { parseNumber } from "../numbers.ts";

export interface ChosenDialect {
  readonly delimiter: Delimiter;
  readonly decimalMark: DecimalMark;
  /** Another delimiter that parts the rows as well; null where there is none. */
  readonly rival: Delimiter | null;
  /** Cells of the sampled lines. */
  readonly rows: readonly (readonly string[])[];
}

/** Lines that still speak for a delimiter when this share of them agrees with the first. */
const ENOUGH = 0.9;

/** Sampled lines by which numbers are counted. */
const COUNTED_ROWS = 200;

/** Share of cells that are numbers, by the decimal mark that the delimiter leaves. */
const numberShare = ({ rows, delimiter }: Parting): number => {
  const mark = decimalMarkOf(rows, delimiter);
  const cells = rows.slice(0, COUNTED_ROWS).flat();
  return (
    cells.filter((cell) => !Number.isNaN(parseNumber(cell.trim(), mark))).length / Math.max(1, cells.length)
  );
};

const SUFFIXES: readonly (readonly [RegExp, Delimiter])[] = [
  [/\.tsv(\.gz)?$/i, "\t"],
  [/\.csv(\.gz)?$/i, ","],
  [/\.psv(\.gz)?$/i, "|"],
];

const byName = (name: string, partings: readonly Parting[]): Parting | undefined => {
  const delimiter = SUFFIXES.find(([suffix]) => suffix.test(name))?.[1];
  return partings.find((parting) => parting.delimiter === delimiter);
};

/**
 * Delimiter and decimal mark together. Where several part the rows as well, more numbers decide, then the name of the
 * file; what is left is a rival to be asked about.
 *
 * @param sample whole lines, the names among them
 */
export const chooseDialect = (sample: string, choice?: Delimiter, name = ""): ChosenDialect => {
  const partings = partingsOf(sample);
  const chosenOf = ({ delimiter, rows }: Parting, rival: Delimiter | null): ChosenDialect => ({
    delimiter,
    decimalMark: decimalMarkOf(rows, delimiter),
    rival,
    rows,
  });
  const given = partings.find((parting) => parting.delimiter === choice);
  if (given) return chosenOf(given, null);
  const [first, second] = [...partings]
    .sort((a, b) => b.score - a.score)
    .filter((parting, at, all) => at === 0 || parting.score >= (all[0]?.score ?? 0) * ENOUGH)
    .map((parting) => ({ parting, numbers: numberShare(parting) }))
    .sort((a, b) => b.numbers - a.numbers);
  if (!first) return { delimiter: ",", decimalMark: ".", rival: null, rows: [] };
  if (!second || first.parting.score === 0 || first.numbers > second.numbers)
    return chosenOf(first.parting, null);
  const even = [first.parting, second.parting];
  const named = byName(name, even);
  return named ? chosenOf(named, null) : chosenOf(first.parting, second.parting.delimiter);
};
