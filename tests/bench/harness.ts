import type { Deps } from "#server/deps.ts";

/** One figure. The plain alternative is measured in the same run, on the same machine and rows. */
export interface Measurement {
  /** What was done, with how much. */
  what: string;
  value: number;
  unit: "ms" | "s" | "rows/s" | "MB";
  plain?: { what: string; value: number };
}

export interface BenchContext {
  /** How many rows to work on, from `--rows`. */
  rows: number;
  /** The product's own dependencies on an empty, migrated database that is thrown away afterwards. */
  deps: Deps;
  /** A temporary folder, removed afterwards. */
  folder: string;
}

/** What a file `tests/bench/<name>.bench.ts` exports as its default. */
export interface Bench {
  name: string;
  /** Rows unless `--rows` says otherwise. */
  rows: number;
  run(context: BenchContext): Promise<Measurement[]>;
}

/** Milliseconds that it took. */
export const timed = async (work: () => unknown): Promise<number> => {
  const began = performance.now();
  await work();
  return performance.now() - began;
};

/** The middle of several rounds in milliseconds, after one that only warms up. */
export const medianTime = async (rounds: number, work: (round: number) => unknown): Promise<number> => {
  await work(-1);
  const times: number[] = [];
  for (let round = 0; round < rounds; round++) times.push(await timed(() => work(round)));
  times.sort((a, b) => a - b);
  return times[Math.floor(times.length / 2)] ?? Number.NaN;
};

/** How often the plain alternative's time (or share of its speed) this took; blank when there is none. */
export const ratioOf = ({ value, plain }: Measurement): number | null => (plain ? value / plain.value : null);

const figure = (value: number): string =>
  Math.abs(value) >= 100 ? Math.round(value).toLocaleString("en") : value.toPrecision(3);

/** `import  | 100,000 rows … | 1.62 s | 2.1 × bare LOAD DATA (0.77 s)` */
export const describeMeasurement = (name: string, measurement: Measurement): string => {
  const { what, value, unit, plain } = measurement;
  const ratio = ratioOf(measurement);
  const compared =
    plain && ratio !== null ? `${figure(ratio)} × ${plain.what} (${figure(plain.value)} ${unit})` : "";
  return [name.padEnd(14), what, `${figure(value)} ${unit}`, compared].join(" | ");
};
