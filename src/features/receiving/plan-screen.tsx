import type { Extract, ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { ApiError } from "#src/api/client.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Select, TextInput } from "#src/ui/inputs.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { ExtractFrame } from "./extract-frame.tsx";
import { DECIMAL_MARKS, DELIMITERS, ENCODINGS, openOf, questionsLeft } from "./extract-words.ts";
import { withCard } from "./plan-answers.ts";
import { PlanTable } from "./plan-table.tsx";
import { Questions } from "./questions.tsx";
import { usePlan } from "./use-plan.ts";

interface Props {
  extract: Extract;
  preview: ExtractPreview;
  /** Opens the extract anew, with what is saved. */
  onReload: () => void;
}

const entries = <K extends string>(words: Readonly<Record<K, string>>): [K, string][] =>
  Object.entries(words) as [K, string][];

/** How the text of the file is cut into cells, and to which release its identifiers belong. */
const FileReading = ({
  plan,
  isReadOnly,
  onPlan,
}: {
  plan: ReadingPlan;
  isReadOnly: boolean;
  onPlan: (plan: ReadingPlan) => void;
}) => {
  const choice = <K extends "delimiter" | "encoding" | "decimalMark">(
    label: string,
    key: K,
    words: Readonly<Record<ReadingPlan[K], string>>,
  ) => (
    <Select
      label={label}
      value={plan[key]}
      disabled={isReadOnly}
      onChange={(event) => onPlan({ ...plan, [key]: event.target.value })}
    >
      {entries(words).map(([value, word]) => (
        <option key={value} value={value}>
          {word}
        </option>
      ))}
    </Select>
  );
  return (
    <div className="mb-5 grid grid-cols-1 gap-3 sm:grid-cols-2 2xl:grid-cols-4">
      {choice("Values separated by", "delimiter", DELIMITERS)}
      {choice("Decimal mark", "decimalMark", DECIMAL_MARKS)}
      {choice("Encoding", "encoding", ENCODINGS)}
      <TextInput
        label="Release of the identifiers"
        placeholder="as the catalogue names it"
        maxLength={80}
        autoComplete="off"
        value={plan.release}
        disabled={isReadOnly}
        onChange={(event) => onPlan({ ...plan, release: event.target.value })}
      />
    </div>
  );
};

const Failure = ({ failure }: { failure: NonNullable<Extract["failure"]> }) => (
  <div role="alert" className="mb-4 rounded border border-mark bg-sheet p-3">
    <p className="font-medium">
      <LevelMark level="stop" /> The extract was not committed, and the catalogue is as it was.{" "}
      {failure.message}
    </p>
    {failure.hint ? <p className="mt-1 text-soft">{failure.hint}</p> : null}
  </div>
);

/** The reading plan: the columns in the middle, what is open at the right, and the one way on. */
export const PlanScreen = ({ extract, preview: opened, onReload }: Props) => {
  const isReadOnly = !useCan()("extract.edit");
  const reading = usePlan(useProgrammeId(), extract, opened);
  const { plan, preview, findings, isSaving, error } = reading;
  const open = openOf(findings).length;
  const used = plan.columns.filter((c) => c.means !== KEPT).length;
  const isStale = error instanceof ApiError && error.code === "stale-version";
  return (
    <ExtractFrame
      extract={{ ...extract, plan }}
      planNote={`${questionsLeft(findings)}; ${count(used)} of ${count(plan.columns.length)} columns used`}
      aside={
        <Questions
          plan={plan}
          findings={findings}
          isSaving={isSaving}
          isReadOnly={isReadOnly}
          onPlan={reading.change}
          onCheck={reading.check}
        />
      }
    >
      <header className="mb-4 flex flex-wrap items-start justify-between gap-3">
        <div className="min-w-60 flex-1">
          <h1 className="text-[30px]">How should this file be read?</h1>
          <p className="mt-1 text-soft">
            <span className="font-mono text-ink">{count(preview.sampledRows)}</span> rows looked at; all are
            read when the extract is committed. Nothing is stored yet.
            {open > 0 ? ` It can be committed once nothing is open: ${questionsLeft(findings)}.` : ""}
          </p>
        </div>
        {isReadOnly ? null : (
          <Button
            kind="main"
            disabled={open > 0 || isSaving}
            isBusy={reading.isCommitting}
            onClick={reading.commit}
            title={open > 0 ? questionsLeft(findings) : undefined}
          >
            {extract.failure ? "Commit again" : "Commit extract"}
          </Button>
        )}
      </header>
      {extract.failure ? <Failure failure={extract.failure} /> : null}
      {error ? (
        <div className="mb-4">
          <ErrorNotice error={error} />
          <Button className="mt-2" onClick={isStale ? onReload : reading.check}>
            {isStale ? "Show what is saved" : "Save again"}
          </Button>
        </div>
      ) : null}
      <FileReading plan={plan} isReadOnly={isReadOnly} onPlan={reading.change} />
      <PlanTable
        plan={plan}
        preview={preview}
        findings={findings}
        isReadOnly={isReadOnly}
        onCard={(index, change) => reading.change(withCard(plan, index, change))}
      />
    </ExtractFrame>
  );
};
