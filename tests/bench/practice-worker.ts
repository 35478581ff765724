import { parentPort, workerData } from "node:worker_threads";
import { type PracticeColumns, runPracticeFormulas } from "./practice-formulas.ts";

/** One thread's share of the stars, over and over as it is asked. */
const { columns, from, to } = workerData as { columns: PracticeColumns; from: number; to: number };

parentPort?.on("message", () => {
  runPracticeFormulas(columns, from, to);
  parentPort?.postMessage("done");
});
parentPort?.postMessage("ready");
