import type { DecimalMark } from "../dialect.ts";
import { isBlankWord, isSexagesimal, parseNumber } from "../numbers.ts";
import { isUnitsLine, unitIn } from "./units-line.ts";

/** Names and units of a text table, and how many of its first lines they take. */
export interface NamesFound {
  readonly names: readonly string[];
  /** In the order of the names; null where the file has no line of units. */
  readonly units: readonly string[] | null;
  /** Where the names stand; `nowhere`: they were made up. */
  readonly stand: "line" | "comment" | "nowhere";
  /** Lines at the beginning that are no rows. */
  readonly skip: number;
}

export interface NamesAsked {
  /** The comment lines before the table, without marks. */
  readonly comments: readonly string[];
  /** Cells of the first lines. */
  readonly rows: readonly (readonly string[])[];
  readonly decimalMark: DecimalMark;
  /** Cells of another line, as the rows have theirs. */
  split(line: string): readonly string[];
}

/** Comments right before the table in which its names may stand: above units, or above a ruled line. */
const NAMES_WITHIN = 3;

/** Share of a column's cells that are numbers where it is a column of numbers. */
const NUMBER_SHARE = 0.6;

const isRuleRow = (cells: readonly string[]): boolean =>
  cells.some((cell) => /[-=]{3}/.test(cell)) && cells.every((cell) => /^\s*:?[-=+]*:?\s*$/.test(cell));

/** Tells names from values by what the rows below hold. */
class Evidence {
  private readonly isNumeric: readonly boolean[];

  constructor(
    private readonly body: readonly (readonly string[])[],
    width: number,
    private readonly decimalMark: DecimalMark,
  ) {
    this.isNumeric = Array.from({ length: width }, (_, at) => {
      const cells = body.map((row) => (row[at] ?? "").trim()).filter((cell) => !isBlankWord(cell));
      return cells.length > 0 && cells.filter((c) => this.isNumber(c)).length >= cells.length * NUMBER_SHARE;
    });
  }

  isNumber(cell: string): boolean {
    return !Number.isNaN(parseNumber(cell, this.decimalMark)) || isSexagesimal(cell);
  }

  /** Words above numbers, and no number. */
  isNames(cells: readonly string[]): boolean {
    const filled = cells.map((cell) => cell.trim());
    if (filled.some((cell) => this.isNumber(cell))) return false;
    return filled.some((cell, at) => this.isNumeric[at] && cell !== "" && !isBlankWord(cell));
  }

  /** Numbers as below, at half of the places or more, and nowhere a word above numbers; or a name as those below. */
  isValues(cells: readonly string[]): boolean {
    const filled = cells.map((cell) => cell.trim());
    if (filled.some((cell, at) => this.isNumeric[at] && !isBlankWord(cell) && !this.isNumber(cell)))
      return false;
    if (this.isAsBelow(filled[0] ?? "")) return true;
    const numbers = filled.filter((cell) => this.isNumber(cell)).length;
    return numbers > 0 && numbers >= filled.filter((cell) => !isBlankWord(cell)).length / 2;
  }

  /** `LH-0031` above other designations of that shape is one itself. */
  private isAsBelow(cell: string): boolean {
    const own = shapeOf(cell);
    if (!/A.*9/.test(own)) return false;
    const same = this.body.filter((row) => shapeOf((row[0] ?? "").trim()) === own).length;
    return same > 0 && same >= this.body.length * NUMBER_SHARE;
  }
}

/** Letters and digits as one sign each, however many there are. */
const shapeOf = (cell: string): string => cell.replace(/\p{L}+/gu, "A").replace(/\d+/g, "9");

const isName = (cell: string): boolean => /^\S{1,80}$/.test(cell.trim()) && /[\p{L}_]/u.test(cell);

/** The last comments that part as the rows do: names, and perhaps units below them. */
const inComments = ({ comments, split }: NamesAsked, width: number): Omit<NamesFound, "skip"> | null => {
  const last = comments
    .slice(-NAMES_WITHIN)
    .map(split)
    .filter((cells) => cells.length === width && !isRuleRow(cells));
  const [above, below] = [last.at(-2), last.at(-1)];
  if (!below) return null;
  if (above?.every(isName) && isUnitsLine(below))
    return { names: above, units: below.map(unitIn), stand: "comment" };
  return below.every(isName) ? { names: below, units: null, stand: "comment" } : null;
};

/** Lines of units and ruled lines below the names, in either order. Units stand above numbers, where there are rows. */
const belowNames = (
  { rows, decimalMark }: NamesAsked,
  from: number,
): { units: string[] | null; skip: number } => {
  let units: string[] | null = null;
  let skip = from;
  for (; skip < from + 3; skip++) {
    const cells = rows[skip];
    if (!cells) break;
    if (isRuleRow(cells)) continue;
    if (units !== null || !isUnitsLine(cells)) break;
    const body = rows.slice(skip + 1).filter((row) => !isRuleRow(row));
    if (body.length > 0 && !new Evidence(body, cells.length, decimalMark).isNames(cells)) break;
    units = cells.map(unitIn);
  }
  return { units, skip };
};

/** Finds the names of a table's columns by what stands before its rows and in its first lines. */
export const findNames = (asked: NamesAsked): NamesFound => {
  const ruled = asked.rows.findIndex((cells) => !isRuleRow(cells));
  const rows = ruled > 0 ? asked.rows.slice(ruled) : asked.rows;
  const before = Math.max(0, ruled);
  const first = rows[0] ?? [];
  const evidence = new Evidence(rows.slice(1), first.length, asked.decimalMark);
  const commented = evidence.isNames(first) ? null : inComments(asked, first.length);
  if (commented) {
    const { units, skip } = belowNames(asked, before);
    return { ...commented, units: commented.units ?? units, skip };
  }
  if (evidence.isValues(first))
    return {
      names: first.map((_, at) => `column ${at + 1}`),
      units: null,
      stand: "nowhere",
      skip: before,
    };
  return { names: first, stand: "line", ...belowNames(asked, before + 1) };
};
