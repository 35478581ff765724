import type { Finding } from "#shared/api/extracts.ts";
import { parseNumber } from "../../formats/numbers.ts";
import { ask, examplesAt, said } from "./finding.ts";
import { groupBy, type Look, textAt, type UsedColumn } from "./look.ts";

/** Numbers that files put where there is none. */
const SUSPECTS = new Set([
  -999, -9999, -99, -99.9, -99.99, -999.9, -999.99, -999999, -1e20, -1e30, 99, 99.9, 99.99, 99.999, 999,
  999.9, 999.99, 9999, 9999.99, 99999, 999999, 9999999, 100000, -2147483648, 2147483647, -32768, 32767, 1e20,
  1e30, 1e37,
]);

/** Of a quantity where an exact zero is next to impossible, and a usual mark. */
const NEVER_ZERO = new Set([
  "parallax",
  "pmra",
  "pmdec",
  "teff",
  "distance",
  "logg",
  "ruwe",
  ...["g", "bp", "rp", "v", "j", "h", "ks", "card"].map((band) => `${band}_mag`),
]);

const LEAST_SUSPECTED = 3;
const LEAST_UNSUSPECTED = 5;
const LEAST_SHARE_OF_ZEROS = 0.01;

interface Cell {
  readonly row: number;
  readonly text: string;
  readonly value: number;
}

const cellsOf = (look: Look, used: UsedColumn): Cell[] =>
  used.given.flatMap((row) => {
    const text = textAt(used, row);
    const value = parseNumber(text, look.sample.decimalMark);
    return Number.isNaN(value) ? [] : [{ row, text, value }];
  });

interface Rest {
  readonly least: number;
  readonly most: number;
  readonly count: number;
}

const restOf = (cells: readonly Cell[], isLeftOut: (value: number) => boolean): Rest => {
  let [least, most, count] = [Infinity, -Infinity, 0];
  for (const { value } of cells) {
    if (isLeftOut(value)) continue;
    least = Math.min(least, value);
    most = Math.max(most, value);
    count++;
  }
  return { least, most, count };
};

/** Farther from all others than they are from each other. */
const isApart = (value: number, { least, most }: Rest): boolean => {
  const span = Math.max(most - least, Math.abs(most) * 0.1);
  return value > most + span || value < least - span;
};

const isSuspicious = (key: string, value: number, count: number, rest: Rest, of: number): boolean => {
  if (rest.count === 0) return false;
  const isOutside = value > rest.most || value < rest.least;
  if (SUSPECTS.has(value)) return isApart(value, rest) || (isOutside && count >= LEAST_SUSPECTED);
  if (value === 0 && NEVER_ZERO.has(key) && count >= LEAST_UNSUSPECTED)
    return count >= of * LEAST_SHARE_OF_ZEROS;
  return count >= LEAST_UNSUSPECTED && isOutside && isApart(value, rest);
};

const isAnswered = ({ card }: UsedColumn, value: number, decimalMark: "." | ","): boolean =>
  [...card.blankMarks, ...(card.keptNumbers ?? [])].some((mark) => parseNumber(mark, decimalMark) === value);

const askAbout = (look: Look, { card, shown }: UsedColumn, same: readonly Cell[], rest: Rest): Finding => {
  const text = same[0]?.text ?? "";
  const around =
    rest.least === rest.most
      ? `everything else is ${said(rest.least)}`
      : `everything else lies from ${said(rest.least)} to ${said(rest.most)}`;
  return ask(
    "blank-mark",
    `${text} stands ${same.length === 1 ? "once" : `${same.length} times`} in “${card.header}” of the rows looked at, and ${around}. Is it a mark for “no value”?`,
    "Say whether it is a mark or a number.",
    {
      column: card.header,
      count: same.length,
      examples: examplesAt(
        shown,
        look.lines,
        same.map((cell) => cell.row),
      ),
      answers: [
        { value: `blank:${text}`, label: "A mark for no value" },
        { value: `number:${text}`, label: "A number" },
      ],
    },
  );
};

const inColumn = (look: Look, used: UsedColumn): Finding[] => {
  const cells = cellsOf(look, used);
  const groups = groupBy(cells, (cell) => cell.value);
  const counts = [...groups].filter(
    ([value, same]) => SUSPECTS.has(value) || same.length >= LEAST_UNSUSPECTED,
  );
  return counts.flatMap(([value, same]) => {
    if (isAnswered(used, value, look.sample.decimalMark)) return [];
    const rest = restOf(cells, (other) => other === value || SUSPECTS.has(other));
    const isMark = isSuspicious(used.card.means, value, same.length, rest, cells.length);
    return isMark ? [askAbout(look, used, same, rest)] : [];
  });
};

/** Numbers that stand out by how often they come and how far from the others they lie. */
export const markFindings = (look: Look): Finding[] =>
  look.used
    .filter((u) => u.meaning.kind === "number" && !["ra", "dec", "epoch"].includes(u.card.means))
    .flatMap((u) => inColumn(look, u));
