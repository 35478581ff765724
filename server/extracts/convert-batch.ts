import type { ReadingPlan } from "#shared/api/extracts.ts";
import { RADIANS_PER_DEGREE } from "#shared/science/angles.ts";
import type { NumberColumn } from "./number-column.ts";
import { northIn, wayToIcrs } from "./to-icrs.ts";
import { vegaOffset } from "./vega-offsets.ts";

type Find = (means: string) => NumberColumn | undefined;

const MAGNITUDE = /_mag(_err)?$/;

/** AB magnitudes onto the scale of Vega; blank where no zero point is known, as nothing could be computed from them. */
const toVega = (columns: readonly NumberColumn[], rows: number): void => {
  for (const column of columns) {
    const { means, magnitudeSystem } = column.card;
    if (magnitudeSystem !== "ab" || !MAGNITUDE.test(means)) continue;
    const offset = vegaOffset(means.replace(/_err$/, ""));
    const change = means.endsWith("_err") ? 0 * offset : offset;
    for (let row = 0; row < rows; row++) column.set(row, (column.values[row] ?? Number.NaN) - change);
  }
};

/** Motions in right ascension as they are kept: multiplied by the cosine of the declination. */
const withCosine = (find: Find, rows: number): void => {
  const dec = find("dec");
  const isBare = find("pmra")?.card.hasCosDec === false;
  for (const means of ["pmra", "pmra_err"]) {
    const column = find(means);
    if (!column || !isBare) continue;
    for (let row = 0; row < rows; row++) {
      const cosine = Math.cos((dec?.values[row] ?? Number.NaN) * RADIANS_PER_DEGREE);
      column.set(row, (column.values[row] ?? Number.NaN) * cosine);
    }
  }
};

const position = new Float64Array(2);

/**
 * Positions into the ICRS. Motions turn with the axes of an equinox; next to galactic positions they are taken for what
 * their columns are called, motions in right ascension and declination.
 */
const toIcrs = (plan: ReadingPlan, find: Find, rows: number): void => {
  const way = wayToIcrs(plan);
  const [ra, dec, pmra, pmdec] = [find("ra"), find("dec"), find("pmra"), find("pmdec")];
  if (!way || !ra || !dec) return;
  for (let row = 0; row < rows; row++) {
    const longitude = ra.values[row] ?? Number.NaN;
    const latitude = dec.values[row] ?? Number.NaN;
    way(position, longitude, latitude);
    if (pmra && pmdec && plan.frame === "FK5") {
      const angle = northIn(way, position, longitude, latitude);
      const [sin, cos] = [Math.sin(angle), Math.cos(angle)];
      const east = pmra.values[row] ?? Number.NaN;
      const north = pmdec.values[row] ?? Number.NaN;
      pmra.set(row, east * cos + north * sin);
      pmdec.set(row, north * cos - east * sin);
    }
    ra.set(row, position[0] ?? Number.NaN);
    dec.set(row, position[1] ?? Number.NaN);
  }
};

/** What is not a matter of one column's unit: zero points, the cosine in motions, the frame. */
export const convertBatch = (plan: ReadingPlan, columns: readonly NumberColumn[], rows: number): void => {
  const find: Find = (means) => columns.find((column) => column.card.means === means);
  toVega(columns, rows);
  withCosine(find, rows);
  toIcrs(plan, find, rows);
};
