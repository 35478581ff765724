import type { Extract } from "#shared/api/extracts.ts";
import { count } from "#shared/format/numbers.ts";
import { readingOf, shareOf, shortHash, sizeOf } from "./extract-words.ts";

interface Step {
  title: string;
  note: string;
  state: "done" | "now" | "later" | "failed";
  hash?: string | null;
}

const awaited = (extract: Extract): string => {
  if (extract.receivedBytes > 0) return `${shareOf(extract)} is here`;
  return extract.failure ? "did not arrive" : "not here yet";
};

const fileStep = (extract: Extract): Step => {
  const { plan } = extract;
  if (extract.state === "receiving")
    return {
      title: "File received",
      note: awaited(extract),
      state: extract.failure ? "failed" : "now",
    };
  const read = plan ? ` · ${readingOf(plan)}` : "";
  return {
    title: "File received",
    note: `${sizeOf(extract.bytes)}${read}`,
    state: "done",
    hash: extract.sha256,
  };
};

const commitStep = (extract: Extract): Step => {
  if (extract.state === "importing")
    return { title: "Commit extract", note: "all rows or none; under way", state: "now" };
  if (extract.state === "committed")
    return { title: "Committed", note: `edition ${extract.edition ?? "–"}`, state: "done" };
  if (extract.state === "withdrawn")
    return { title: "Withdrawn", note: "its stars left the catalogue", state: "done" };
  if (extract.state === "planning" && extract.failure)
    return { title: "Commit extract", note: "did not happen", state: "failed" };
  return { title: "Commit extract", note: "all rows or none", state: "later" };
};

const MARKS: Readonly<Record<Step["state"], string>> = {
  done: "border-ink bg-ink text-paper",
  now: "border-mark text-mark",
  later: "border-edge text-soft",
  failed: "border-mark bg-mark text-paper",
};
const WORDS: Readonly<Record<Step["state"], string>> = {
  done: "done",
  now: "now",
  later: "to come",
  failed: "failed",
};

/** How far the extract has come. `planNote` says how many questions are open. */
export const Steps = ({ extract, planNote }: { extract: Extract; planNote: string }) => {
  const isPlanned = !["receiving", "planning"].includes(extract.state);
  const steps: Step[] = [
    fileStep(extract),
    {
      title: "Reading plan",
      note: planNote,
      state: isPlanned ? "done" : extract.state === "planning" ? "now" : "later",
    },
    commitStep(extract),
  ];
  return (
    <>
      <p className="text-xs text-soft">Extract {count(extract.number)}</p>
      <h2 className="text-[21px] wrap-anywhere">{extract.name}</h2>
      <ol className="mt-3">
        {steps.map((step, i) => (
          <li key={step.title} className="flex gap-3.5 border-t border-rule py-3">
            <span
              className={`mt-0.5 flex size-[22px] flex-none items-center justify-center rounded-full border font-mono text-[11px] ${MARKS[step.state]}`}
            >
              <span aria-hidden="true">
                {step.state === "done" ? "✓" : step.state === "failed" ? "!" : i + 1}
              </span>
              <span className="sr-only">{WORDS[step.state]}</span>
            </span>
            <div className="min-w-0">
              <p className={`font-medium ${step.state === "now" ? "text-mark" : ""}`}>{step.title}</p>
              <p className="text-soft">{step.note}</p>
              {step.hash ? (
                <p className="font-mono text-[11px] text-soft" title={step.hash}>
                  sha256 {shortHash(step.hash)}
                </p>
              ) : null}
            </div>
          </li>
        ))}
      </ol>
    </>
  );
};
