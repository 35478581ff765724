import type { ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { answered } from "#shared/catalogue/answers.ts";
import { Button } from "#src/ui/button.tsx";
import { CompareMaps } from "./compare-maps.tsx";
import { givenAnswers } from "./plan-answers.ts";
import { Question } from "./question.tsx";

interface Props {
  plan: ReadingPlan;
  sky: ExtractPreview["sky"];
  findings: Finding[];
  isSaving: boolean;
  isReadOnly: boolean;
  onPlan: (plan: ReadingPlan) => void;
  onCheck: () => void;
  /** Opens the values of a column. */
  onOpen: (header: string) => void;
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

/** Where the rows behind a question can be looked at. */
const Evidence = ({
  plan,
  finding,
  sky,
  onOpen,
}: Pick<Props, "plan" | "sky" | "onOpen"> & { finding: Finding }) => {
  const { column } = finding;
  const isOfFile = plan.columns.some((card) => card.header === column);
  return (
    <>
      {finding.code === "ra-unit" ? <CompareMaps sky={sky} /> : null}
      {column !== null && isOfFile ? (
        <Button kind="plain" className="mt-1 px-0!" onClick={() => onOpen(column)}>
          Show the column
        </Button>
      ) : null}
    </>
  );
};

/** What only a person can tell, and what a person should know. */
export const Questions = ({ plan, sky, findings, isSaving, isReadOnly, onPlan, onCheck, onOpen }: Props) => {
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
          >
            <Evidence plan={plan} finding={finding} sky={sky} onOpen={onOpen} />
          </Question>
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
