import type { ColumnCard, ColumnHealth } from "#shared/api/extracts.ts";
import { findMeaning } from "#shared/catalogue/header-spellings.ts";

/** Values kept to judge the others by; columns with no more than these are described exactly. */
const KEPT_VALUES = 8_192;
const BINS = 40;
const MOST_MARKS = 40;
const MARK_CHARACTERS = 60;
const OTHER_MARKS = "other texts";
const SEED = 0x2545f491;

/** What a column holds: a fixed amount of memory however many rows there are, the same for the same rows in the same order. */
export class ColumnProfile {
  private rows = 0;
  private values = 0;
  private low = Number.POSITIVE_INFINITY;
  private high = Number.NEGATIVE_INFINITY;
  private readonly blanks = new Map<string, number>();
  private readonly kept = new Float64Array(KEPT_VALUES);
  private state = SEED;

  constructor(private readonly card: ColumnCard) {}

  /** A value in the canonical unit. */
  add(value: number): void {
    this.rows++;
    if (value < this.low) this.low = value;
    if (value > this.high) this.high = value;
    // Reservoir sampling (Vitter 1985, ACM Trans. Math. Softw. 11, 37, algorithm R): each value is as likely to be kept.
    const at = this.values < KEPT_VALUES ? this.values : Math.floor(this.random() * (this.values + 1));
    if (at < KEPT_VALUES) this.kept[at] = value;
    this.values++;
  }

  addText(): void {
    this.rows++;
    this.values++;
  }

  addBlank(mark: string): void {
    this.rows++;
    const known = mark.slice(0, MARK_CHARACTERS);
    const key = this.blanks.has(known) || this.blanks.size < MOST_MARKS ? known : OTHER_MARKS;
    this.blanks.set(key, (this.blanks.get(key) ?? 0) + 1);
  }

  health(): ColumnHealth {
    const { header, means } = this.card;
    const meaning = findMeaning(means);
    const isNumber = meaning?.kind === "number" && this.values > 0;
    return {
      header,
      means,
      unit: meaning?.unit ?? "",
      rows: this.rows,
      values: this.values,
      blanks: [...this.blanks].map(([mark, count]) => ({ mark, count })).sort((a, b) => b.count - a.count),
      low: isNumber ? this.low : null,
      median: isNumber ? this.median() : null,
      high: isNumber ? this.high : null,
      histogram: isNumber ? this.histogram() : [],
    };
  }

  /** Marsaglia 2003, J. Stat. Softw. 8(14): xorshift of 32 bits, from 0 up to 1. */
  private random(): number {
    let x = this.state;
    x ^= x << 13;
    x ^= x >>> 17;
    x ^= x << 5;
    this.state = x;
    return (x >>> 0) / 2 ** 32;
  }

  private sample(): Float64Array {
    return this.kept.subarray(0, Math.min(this.values, KEPT_VALUES));
  }

  private median(): number {
    const sorted = this.sample().slice().sort();
    const half = sorted.length / 2;
    const upper = sorted[Math.floor(half)] ?? Number.NaN;
    return Number.isInteger(half) ? ((sorted[half - 1] ?? upper) + upper) / 2 : upper;
  }

  /** Values in equal steps from the lowest to the highest; they add up to all values. */
  private histogram(): number[] {
    const counts = new Array<number>(BINS).fill(0);
    const span = this.high - this.low;
    const sample = this.sample();
    for (const value of sample) {
      const bin = span > 0 ? Math.min(BINS - 1, Math.floor(((value - this.low) / span) * BINS)) : 0;
      counts[bin] = (counts[bin] ?? 0) + 1;
    }
    return spreadOver(counts, sample.length, this.values);
  }
}

/** Counts of a sample as counts of all, by the largest remainder, so that their sum is whole. */
const spreadOver = (counts: readonly number[], sampled: number, all: number): number[] => {
  if (sampled === all) return [...counts];
  const shares = counts.map((count) => (count / sampled) * all);
  const whole = shares.map(Math.floor);
  let left = all - whole.reduce((sum, n) => sum + n, 0);
  const byRemainder = shares.map((share, i) => ({ i, rest: share % 1 })).sort((a, b) => b.rest - a.rest);
  for (const { i } of byRemainder) {
    if (left-- <= 0) break;
    whole[i] = (whole[i] ?? 0) + 1;
  }
  return whole;
};
