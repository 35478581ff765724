import { type ReactNode, useState } from "react";
import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning } from "#shared/catalogue/header-spellings.ts";
import { unitChoices } from "#shared/units/units.ts";
import { Button } from "#src/ui/button.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { NO_YEAR, yearOf } from "./extract-words.ts";

const EpochAnswer = ({ onAnswer }: { onAnswer: (value: string) => void }) => {
  const [text, setText] = useState("");
  const [isTried, setTried] = useState(false);
  const year = yearOf(text);
  const isWrong = isTried && year === undefined;
  return (
    <form
      noValidate
      className="mt-2"
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (year !== undefined) onAnswer(String(year));
      }}
    >
      <span className="flex flex-wrap gap-2">
        <input
          aria-label="Epoch as a year"
          aria-invalid={isWrong ? true : undefined}
          inputMode="decimal"
          placeholder="2016.0"
          value={text}
          onChange={(event) => setText(event.target.value)}
          className="min-h-8 w-28 rounded border border-edge bg-sheet px-2.5 font-mono"
        />
        <Button type="submit">Set epoch</Button>
      </span>
      {isWrong ? (
        <span role="alert" className="mt-1 block text-xs text-mark">
          ◆ {NO_YEAR}
        </span>
      ) : null}
    </form>
  );
};

const Answers = ({ finding, plan, onAnswer }: Pick<Props, "finding" | "plan" | "onAnswer">) => {
  if (finding.code === "epoch-missing") return <EpochAnswer onAnswer={onAnswer} />;
  const card = plan.columns.find((c) => c.header === finding.column);
  const meaning = card && findMeaning(card.means);
  const choices =
    finding.code === "unit-unknown" && meaning
      ? unitChoices(meaning.unit)
          .filter((unit) => unit !== "")
          .map((unit) => ({ value: unit, label: unit }))
      : finding.answers;
  if (choices.length === 0) return null;
  return (
    <div className="mt-2 flex flex-wrap gap-2">
      {choices.map(({ value, label }) => (
        <Button key={value} onClick={() => onAnswer(value)}>
          {label}
        </Button>
      ))}
    </div>
  );
};

const Examples = ({ examples }: Pick<Finding, "examples">) =>
  examples.length === 0 ? null : (
    <ul className="mt-1.5 font-mono text-[11px] text-soft">
      {examples.map(({ line, text }) => (
        <li key={`${line}-${text}`} className="truncate" title={text}>
          {line > 0 ? `line ${line}: ` : ""}
          {text}
        </li>
      ))}
    </ul>
  );

interface Props {
  finding: Finding;
  plan: ReadingPlan;
  /** "1 of 3" for what is asked. */
  place: string;
  isReadOnly: boolean;
  onAnswer: (value: string) => void;
  /** Further evidence. */
  children?: ReactNode;
}

/** One finding: what, why, and the way to deal with it. */
export const Question = ({ finding, plan, place, isReadOnly, onAnswer, children }: Props) => (
  <li className="border-t border-hair py-3.5">
    <p className="mb-1">
      <LevelMark level={finding.level} hasWord />
      {place ? (
        <span
          className={`text-xs font-semibold tracking-wider ${finding.level === "note" ? "text-soft" : "text-mark"}`}
        >
          {` · ${place.toUpperCase()}`}
        </span>
      ) : null}
    </p>
    <p className="wrap-anywhere">{finding.message}</p>
    <p className="text-xs text-soft">{finding.hint}</p>
    <Examples examples={finding.examples} />
    {finding.level === "ask" && !isReadOnly ? (
      <Answers finding={finding} plan={plan} onAnswer={onAnswer} />
    ) : null}
    {children}
  </li>
);
