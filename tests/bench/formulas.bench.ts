import { execFileSync } from "node:child_process";
import { once } from "node:events";
import { fileURLToPath } from "node:url";
import { Worker } from "node:worker_threads";
import { type Bench, medianTime } from "./harness.ts";
import { type PracticeColumns, practiceColumns, runPracticeFormulas } from "./practice-formulas.ts";

const ROUNDS = 9;
const THREADS = 2;
/** Debian's own, which has numpy; another Python may come first on the path. */
const PYTHON = "/usr/bin/python3";

interface Yardstick {
  ms: number;
  /** Sum of each result, so that both are known to have done the same. */
  sums: number[];
}

const numpy = (rows: number): Yardstick => {
  const script = fileURLToPath(new URL("practice_formulas.py", import.meta.url));
  const env = { ...process.env, OMP_NUM_THREADS: "1", OPENBLAS_NUM_THREADS: "1" };
  return JSON.parse(execFileSync(PYTHON, [script, String(rows), String(ROUNDS)], { env, encoding: "utf8" }));
};

const startWorkers = (columns: PracticeColumns, rows: number): Promise<Worker[]> =>
  Promise.all(
    Array.from({ length: THREADS }, async (_, i) => {
      const workerData = {
        columns,
        from: Math.floor((rows * i) / THREADS),
        to: Math.floor((rows * (i + 1)) / THREADS),
      };
      const worker = new Worker(new URL("practice-worker.mjs", import.meta.url), {
        workerData,
      });
      await once(worker, "message");
      return worker;
    }),
  );

const round = (workers: readonly Worker[]): Promise<unknown> =>
  Promise.all(
    workers.map((worker) => {
      const done = once(worker, "message");
      worker.postMessage("go");
      return done;
    }),
  );

/** Both sides must have computed the same numbers, or the times say nothing. */
const compare = (columns: PracticeColumns, sums: readonly number[]): void => {
  const results = Object.values(columns).slice(-sums.length);
  results.forEach((result, i) => {
    const sum = result.reduce((all, value) => (Number.isNaN(value) ? all : all + value), 0);
    const expected = sums[i] ?? Number.NaN;
    if (!(Math.abs(sum / expected - 1) < 1e-9))
      throw new Error(`Result ${i} sums to ${sum} here and to ${expected} there.`);
  });
};

const bench: Bench = {
  name: "formulas",
  rows: 1_000_000,
  run: async ({ rows }) => {
    const plain = numpy(rows);
    const columns = practiceColumns(rows);
    const alone = await medianTime(ROUNDS, () => runPracticeFormulas(columns, 0, rows));
    compare(columns, plain.sums);
    const workers = await startWorkers(columns, rows);
    const together = await medianTime(ROUNDS, () => round(workers));
    await Promise.all(workers.map((worker) => worker.terminate()));
    const what = `the practice formulas over ${rows.toLocaleString("en")} stars`;
    const yardstick = { what: "numpy", value: plain.ms };
    return [
      { what, value: alone, unit: "ms", plain: yardstick },
      { what: `${what}, ${THREADS} threads`, value: together, unit: "ms", plain: yardstick },
    ];
  },
};

export default bench;
