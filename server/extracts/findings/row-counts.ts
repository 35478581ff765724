import type { Finding } from "#shared/api/extracts.ts";
import { accept, ask, isAccepted } from "./finding.ts";
import type { Look } from "./look.ts";

/** Row limits that services cut answers at (common practice, no source). */
const LIMITS = new Set([
  2000, 5000, 10_000, 20_000, 50_000, 100_000, 200_000, 500_000, 1_000_000, 2_000_000, 3_000_000, 5_000_000,
  10_000_000,
]);

const grouped = (rows: number): string => rows.toLocaleString("en-GB");

/** A table of exactly as many rows as services like to cut at. */
export const rowCountFindings = ({ sample, plan }: Look): Finding[] => {
  const { declaredRows } = sample;
  if (declaredRows === null || !LIMITS.has(declaredRows) || isAccepted(plan, "round-number")) return [];
  return [
    ask(
      "round-number",
      `The file has exactly ${grouped(declaredRows)} rows. Services cut their answers at such numbers, and a cut answer is not a fair sample.`,
      "Look whether the query had a limit: change it and bring the whole answer, or say that the table is whole.",
      { count: declaredRows, answers: [accept("The table is whole")] },
    ),
  ];
};
