/** Bars of equal width between the least and the greatest of the values. */
export interface Bins {
  low: number;
  high: number;
  counts: number[];
}

/** Counts finite values in so many bars; null where there is none. A single value fills one bar. */
export const binned = (values: readonly number[], bars: number): Bins | null => {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  if (low > high) return null;
  const counts = new Array<number>(high > low ? bars : 1).fill(0);
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    const bar = high > low ? Math.min(bars - 1, Math.floor((bars * (value - low)) / (high - low))) : 0;
    counts[bar] = (counts[bar] ?? 0) + 1;
  }
  return { low, high, counts };
};
