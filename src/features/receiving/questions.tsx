import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { Button } from "#src/ui/button.tsx";
import { answered, givenAnswers } from "./plan-answers.ts";
import { Question } from "./question.tsx";

interface Props {
  plan: ReadingPlan;
  findings: Finding[];
  isSaving: boolean;
  isReadOnly: boolean;
  onPlan: (plan: ReadingPlan) => void;
  onCheck: () => void;
}

const ORDER: readonly Finding["level"][] = ["stop", "ask", "note"];

const keyOf = (f: Finding): string => `${f.code}|${f.column ?? ""}|${f.answers[0]?.value ?? ""}|${f.message}`;

const Given = ({ plan, isReadOnly, onPlan }: Pick<Props, "plan" | "isReadOnly" | "onPlan">) => {
  const given = givenAnswers(plan);
  if (given.length === 0) return null;
  return (
    <>
      <h3 className="mt-4 mb-1 text-[11px] font-semibold tracking-[0.09em] text-soft uppercase">Answered</h3>
      <ul>
        {given.map(({ key, text, again }) => (
          <li key={key} className="flex items-center justify-between gap-3 border-t border-hair py-1.5">
            <span className="wrap-anywhere">{text}</span>
            {isReadOnly ? null : (
              <Button kind="plain" className="px-1!" onClick={() => onPlan(again)}>
                Change
              </Button>
            )}
          </li>
        ))}
      </ul>
    </>
  );
};

/** What only a person can tell, and what a person should know. */
export const Questions = ({ plan, findings, isSaving, isReadOnly, onPlan, onCheck }: Props) => {
  const sorted = ORDER.flatMap((level) => findings.filter((f) => f.level === level));
  const asks = sorted.filter((f) => f.level === "ask");
  const hasStop = sorted.some((f) => f.level === "stop");
  const placeOf = (f: Finding): string =>
    f.level === "ask" ? `${asks.indexOf(f) + 1} of ${asks.length}` : "";
  return (
    <section aria-label="Questions">
      <h2 className="text-[21px]">Questions</h2>
      <p className="mb-2 text-xs text-soft" role="status">
        {isSaving
          ? "Looking at the file with your answers…"
          : hasStop || asks.length > 0
            ? "Only what the file cannot tell"
            : "Nothing is open."}
      </p>
      <ul>
        {sorted.map((finding) => (
          <Question
            key={keyOf(finding)}
            finding={finding}
            plan={plan}
            place={placeOf(finding)}
            isReadOnly={isReadOnly}
            onAnswer={(value) => onPlan(answered(plan, finding, value))}
          />
        ))}
      </ul>
      <Given plan={plan} isReadOnly={isReadOnly} onPlan={onPlan} />
      {hasStop && !isReadOnly ? (
        <Button className="mt-3" isBusy={isSaving} onClick={onCheck}>
          Look again
        </Button>
      ) : null}
    </section>
  );
};
