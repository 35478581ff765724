import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { assessColumns, type InstrumentColumns } from "#server/assess/columns.ts";
import { columnsOfOne, deriveColumns } from "#server/derive/derive.ts";
import { type DeviateColumns, deviateColumns } from "#server/derive/scratch.ts";
import type { Columns, StellarColumns } from "#server/derive/star-columns.ts";
import { errorKey } from "#shared/catalogue/columns.ts";
import { methodCode } from "#shared/catalogue/methods.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import { quantilesOfDistance } from "#shared/science/distance-prior.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";

export interface DrawOptions {
  readonly draws: number;
  /** The same seed gives the same draws. */
  readonly seed: number;
  readonly card: CardSettings | null;
  readonly campaign: CampaignSettings | null;
}

/** What the draws of one quantity say; null where an input of it has no error, or where most draws are blank. */
export interface DrawnInterval {
  readonly p16: number;
  readonly p50: number;
  readonly p84: number;
  /** Draws that fell outside the range of a relation and have no value, as a share. */
  readonly blankShare: number;
}

/** A share of draws above this leaves no interval: it would speak of the rest alone. */
const MOST_BLANK = 0.16;

const PRIOR = methodCode("volume-prior");

class Normals {
  private readonly generator;

  constructor(seed: number) {
    this.generator = xoroshiro128plus(seed);
  }

  uniform(): number {
    return uniformFloat64(this.generator);
  }

  /** Box and Muller. */
  next(): number {
    return Math.sqrt(-2 * Math.log(1 - this.uniform())) * Math.cos(2 * Math.PI * this.uniform());
  }

  column(length: number, mean: number, sigma: number): Float64Array {
    return Float64Array.from({ length }, () => mean + sigma * this.next());
  }
}

/** Each given value with an error, drawn from its own normal distribution; the errors stay as they are. */
const drawGiven = (given: Readonly<Record<string, number>>, draws: number, normals: Normals): Columns =>
  Object.fromEntries(
    Object.entries(given).map(([key, value]) => {
      const error = given[errorKey(key)];
      const isDrawn = error !== undefined && error > 0;
      return [key, isDrawn ? normals.column(draws, value, error) : new Float64Array(draws).fill(value)];
    }),
  );

const drawDeviates = (draws: number, normals: Normals): DeviateColumns => {
  const deviates = deviateColumns(draws);
  for (const column of Object.values(deviates)) for (let i = 0; i < draws; i++) column[i] = normals.next();
  return deviates;
};

/** A distance by a prior is drawn from its own distribution, which is no normal one. */
const drawDistance = (
  given: Readonly<Record<string, number>>,
  { distance }: RecipeSettings,
  draws: number,
  normals: Normals,
): Float64Array => {
  const levels = Array.from({ length: draws }, () => normals.uniform());
  const order = levels.map((_, i) => i).sort((a, b) => (levels[a] ?? 0) - (levels[b] ?? 0));
  const parallax = (given.parallax ?? Number.NaN) - distance.zeroPointMas;
  const sorted = quantilesOfDistance(
    parallax,
    given.parallax_err ?? Number.NaN,
    distance.priorLengthPc,
    order.map((i) => levels[i] ?? Number.NaN),
  );
  const drawn = new Float64Array(draws);
  order.forEach((i, rank) => {
    drawn[i] = sorted[rank] ?? Number.NaN;
  });
  return drawn;
};

const quantile = (sorted: Float64Array, p: number): number => {
  const at = p * (sorted.length - 1);
  const below = Math.floor(at);
  const [low = Number.NaN, high = low] = [sorted[below], sorted[below + 1]];
  return low + (at - below) * (high - low);
};

const intervalOf = (values: Float64Array): DrawnInterval | null => {
  const there = values.filter((value) => !Number.isNaN(value)).sort();
  const blankShare = 1 - there.length / values.length;
  if (blankShare > MOST_BLANK) return null;
  return { p16: quantile(there, 0.16), p50: quantile(there, 0.5), p84: quantile(there, 0.84), blankShare };
};

const assessed = (
  columns: Columns,
  length: number,
  recipe: RecipeSettings,
  { card, campaign }: DrawOptions,
): InstrumentColumns | null => card && campaign && assessColumns(columns, length, card, campaign, recipe);

/** Quantities with an error: the intervals are asked of these alone. */
const withError = (nominal: StellarColumns, instrument: InstrumentColumns | null): string[] => [
  ...Object.keys(nominal.values).filter(
    (key) =>
      !Number.isNaN(nominal.values[key]?.[0]) &&
      !Number.isNaN(nominal.values[errorKey(key)]?.[0] ?? Number.NaN),
  ),
  ...(instrument && !Number.isNaN(instrument.r_min_err[0]) ? ["r_min"] : []),
];

/**
 * Draws of one star through the same code that derives it: every given value with an error, what is assumed, and the
 * scatter of each relation.
 *
 * @returns by key of the quantity; only those whose inputs all have errors
 */
export const drawStar = (
  given: Readonly<Record<string, number>>,
  recipe: RecipeSettings,
  options: DrawOptions,
): Record<string, DrawnInterval | null> => {
  const { draws, seed } = options;
  const one = columnsOfOne(given);
  const nominal = deriveColumns(one, 1, recipe);
  const instrument = assessed({ ...one, ...nominal.values }, 1, recipe, options);
  const normals = new Normals(seed);
  const drawn = drawGiven(given, draws, normals);
  const isByPrior = nominal.methods.distance_method?.[0] === PRIOR;
  if (isByPrior) drawn.distance_given = drawDistance(given, recipe, draws, normals);
  const settings: RecipeSettings = isByPrior
    ? { ...recipe, distance: { ...recipe.distance, order: ["given-distance"] } }
    : recipe;
  const stellar = deriveColumns(drawn, draws, settings, drawDeviates(draws, normals));
  const seen = assessed({ ...drawn, ...stellar.values }, draws, settings, options);
  const columns: Record<string, Float64Array | undefined> = { ...stellar.values, r_min: seen?.r_min };
  return Object.fromEntries(
    withError(nominal, instrument).map((key) => {
      const values = columns[key];
      return [key, values ? intervalOf(values) : null];
    }),
  );
};
