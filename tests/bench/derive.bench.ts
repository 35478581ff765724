import { deriveColumns } from "#server/derive/derive.ts";
import { allocateGiven, type Columns } from "#server/derive/star-columns.ts";
import { radiusFromAbsKs } from "#shared/science/cool-dwarfs.ts";
import { DEFAULT_RECIPE } from "#shared/science/recipes.ts";
import { type Bench, medianTime } from "./harness.ts";

const ROUNDS = 5;
/** As in a recompute: a block at a time, so that columns stay in the processor's reach. */
const BLOCK = 20_000;

/** Cool dwarfs of the solar neighbourhood, spread evenly; the figures only have to be inside every relation. */
const givenStars = (length: number): Columns => {
  const columns = allocateGiven(length);
  const fill = (key: string, from: number, to: number): void => {
    const column = columns[key];
    if (!column) throw new Error(`There is no given column ${key}.`);
    for (let i = 0; i < length; i++) column[i] = from + ((to - from) * ((i * 7919) % length)) / length;
  };
  fill("parallax", 10, 60);
  fill("parallax_err", 0.02, 0.2);
  fill("ks_mag", 9, 11);
  fill("ks_mag_err", 0.02, 0.03);
  fill("bp_mag", 14, 15);
  fill("rp_mag", 11.5, 12);
  fill("ruwe", 0.9, 1.6);
  return columns;
};

/** The least that a radius takes: one pass of bare arithmetic, with no errors, reasons or methods kept. */
const bareRadius = (given: Columns, length: number): Float64Array => {
  const radius = new Float64Array(length);
  const { parallax, ks_mag: ks } = given;
  if (!parallax || !ks) return radius;
  for (let i = 0; i < length; i++)
    radius[i] = radiusFromAbsKs((ks[i] ?? Number.NaN) + 5 * Math.log10((parallax[i] ?? Number.NaN) / 100));
  return radius;
};

const bench: Bench = {
  name: "derive",
  rows: 100_000,
  run: async ({ rows }) => {
    const blocks: { given: Columns; length: number }[] = [];
    for (let done = 0; done < rows; done += BLOCK) {
      const length = Math.min(BLOCK, rows - done);
      blocks.push({ given: givenStars(length), length });
    }
    const whole = await medianTime(ROUNDS, () => {
      for (const { given, length } of blocks) deriveColumns(given, length, DEFAULT_RECIPE.settings);
    });
    const bare = await medianTime(ROUNDS, () => {
      for (const { given, length } of blocks) bareRadius(given, length);
    });
    return [
      {
        what: `every stellar quantity of ${rows.toLocaleString("en")} stars, with errors and reasons`,
        value: whole,
        unit: "ms",
        plain: { what: "one bare pass for the radius alone", value: bare },
      },
    ];
  },
};

export default bench;
