import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import type { TableFinding } from "../../formats/table.ts";
import { accept } from "./finding.ts";

/** What "go on" means where it is more than taking the file as it is. */
const LABELS: Readonly<Record<string, string>> = {
  "votable-overflow": "Keep as partial",
};
const HINTS: Readonly<Record<string, string>> = {
  "votable-overflow":
    "Delete this extract and change the query, or keep the part; a cut answer is not a fair sample of the stars asked for.",
};

const fromReader = ({ key, level, message, hint, count, examples }: TableFinding): Finding => ({
  level,
  code: key,
  column: null,
  message,
  hint: HINTS[key] ?? (hint || "Nothing needs to be done."),
  count,
  examples: examples.map((text) => ({ line: 0, text })),
  answers: level === "ask" ? [accept(LABELS[key] ?? "Take the file as it is")] : [],
});

/** What the readers of the formats found, with a way to answer what they ask. */
export const readerFindings = (found: readonly TableFinding[], plan: ReadingPlan | null): Finding[] =>
  found.filter((f) => f.level !== "ask" || !plan?.accepted?.includes(f.key)).map(fromReader);
