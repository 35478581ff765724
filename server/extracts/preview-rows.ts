import type { ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { columnOf, type Look, lookAt, NOTHING_KNOWN, type UsedColumn } from "./findings/look.ts";
import type { Sample } from "./sample.ts";
import { wayToIcrs } from "./to-icrs.ts";

const ROWS = 50;
/** Wide files show fewer rows, so that a preview stays small. */
const CELLS = 20_000;
const CHARACTERS = 60;
const POINTS = 2000;

type Cell = ExtractPreview["rows"][number]["cells"][number];

const cellOf = (sample: Sample, used: UsedColumn | undefined, index: number, row: number): Cell => {
  const text = (sample.rows[row]?.cells[index] ?? "").trim().slice(0, CHARACTERS);
  if (!used) return { text, value: null };
  if (used.meaning.kind === "text") return { text, value: used.given.includes(row) ? text : null };
  const value = used.values[row] ?? Number.NaN;
  return { text, value: Number.isFinite(value) ? value : null };
};

const rowsOf = (look: Look): ExtractPreview["rows"] => {
  const { sample, used } = look;
  const width = sample.header.length;
  const byIndex = new Map(used.map((u) => [u.card.index, u]));
  const count = Math.min(ROWS, sample.rows.length, Math.max(1, Math.floor(CELLS / Math.max(width, 1))));
  return Array.from({ length: count }, (_, row) => ({
    line: look.lines[row] ?? 0,
    cells: Array.from({ length: width }, (__, index) => cellOf(sample, byIndex.get(index), index, row)),
  }));
};

/** Sampled positions in the ICRS, degrees, spread over the sample. */
const skyOf = (look: Look): ExtractPreview["sky"] => {
  const [ra, dec] = [columnOf(look, "ra"), columnOf(look, "dec")];
  if (!ra || !dec) return [];
  const way = wayToIcrs(look.plan);
  const point = new Float64Array(2);
  const step = Math.max(1, Math.ceil(ra.values.length / POINTS));
  const points: ExtractPreview["sky"] = [];
  for (let row = 0; row < ra.values.length; row += step) {
    const [a = Number.NaN, d = Number.NaN] = [ra.values[row], dec.values[row]];
    if (!(a >= 0 && a < 360 && Math.abs(d) <= 90)) continue;
    point[0] = a;
    point[1] = d;
    way?.(point, a, d);
    points.push([point[0] ?? a, point[1] ?? d]);
  }
  return points;
};

/** First rows with the values that the plan reads from them, and where the sampled stars stand. */
export const shownRows = (sample: Sample, plan: ReadingPlan): Pick<ExtractPreview, "rows" | "sky"> => {
  const look = lookAt(sample, plan, NOTHING_KNOWN);
  return { rows: rowsOf(look), sky: skyOf(look) };
};
