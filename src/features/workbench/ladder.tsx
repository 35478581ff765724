import { useState } from "react";
import type { LadderStep, ViewSummary } from "#shared/api/stars.ts";
import type { Cut, ViewSpec } from "#shared/catalogue/view.ts";
import { count } from "#shared/format/numbers.ts";
import { Button } from "#src/ui/button.tsx";
import { CutDialog } from "./cut-dialog.tsx";
import { SavedSelections } from "./saved-selections.tsx";

interface Props {
  programmeId: string;
  view: ViewSpec;
  summary: ViewSummary;
  ask: (change: Partial<ViewSpec>) => void;
}

/** Length of a bar: by a power that leaves small numbers visible, as on an ordinary log scale but with a zero. */
const share = (n: number, total: number): number =>
  n <= 0 || total <= 0 ? 0 : Math.max(1, 100 * (n / total) ** 0.35);

const Bar = ({ step, total }: { step: LadderStep; total: number }) => {
  const left = share(step.left, total);
  const before = share(step.left + step.fell, total);
  return (
    <div
      className="relative mt-1.5 h-[3px] bg-hair"
      role="img"
      aria-label={`${count(step.left)} left, ${count(step.fell)} fell here`}
    >
      <div className="absolute inset-y-0 left-0 bg-ink" style={{ width: `${left}%` }} />
      <div
        className="absolute inset-y-0 bg-mark opacity-75"
        style={{ left: `${left}%`, width: `${before - left}%` }}
      />
    </div>
  );
};

interface StepProps {
  index: number;
  last: number;
  cut: Cut;
  step: LadderStep | undefined;
  total: number;
  onEdit: () => void;
  onChange: (cut: Cut) => void;
  onMove: (by: -1 | 1) => void;
  onRemove: () => void;
}

const Small = ({
  label,
  onClick,
  children,
  isDisabled = false,
}: {
  label: string;
  onClick: () => void;
  children: string;
  isDisabled?: boolean;
}) => (
  <button
    type="button"
    aria-label={label}
    title={label}
    onClick={onClick}
    disabled={isDisabled}
    className="grid size-6 place-items-center rounded text-soft hover:bg-sel hover:text-ink disabled:opacity-30"
  >
    {children}
  </button>
);

const Step = ({ index, last, cut, step, total, onEdit, onChange, onMove, onRemove }: StepProps) => {
  const name = cut.label || cut.expression;
  return (
    <li className="border-t border-hair py-2.5">
      <div className="flex items-baseline justify-between gap-2">
        <strong className="min-w-0 font-semibold break-words">
          {index + 1}. {name}
        </strong>
        <span className="font-mono text-xs text-soft">{step && !step.error ? count(step.left) : "—"}</span>
      </div>
      <p className="font-mono text-[12.5px] break-words text-blue">{cut.expression}</p>
      {step?.error ? (
        <p className="mt-1 text-xs text-mark">
          <span aria-hidden="true">◆ </span>
          {step.error.message} {step.error.hint} This cut is left out.
        </p>
      ) : step ? (
        <>
          <Bar step={step} total={total} />
          <p className="mt-1.5 text-xs text-soft">
            {count(step.fell)} fell here; alone it would drop {count(step.alone)}
          </p>
        </>
      ) : null}
      <div className="mt-1 flex items-center gap-0.5">
        <button
          type="button"
          onClick={() => onChange({ ...cut, blanks: cut.blanks === "keep" ? "drop" : "keep" })}
          className="mr-auto min-h-6 rounded text-xs text-soft underline decoration-edge underline-offset-2 hover:text-ink"
          title="What this cut does with stars for which a value it needs is blank"
        >
          {step ? `${count(step.blank)} blank: ` : "blank: "}
          {cut.blanks === "keep" ? "kept" : "dropped"}
        </button>
        <Small label={`Move ${name} up`} onClick={() => onMove(-1)} isDisabled={index === 0}>
          ↑
        </Small>
        <Small label={`Move ${name} down`} onClick={() => onMove(1)} isDisabled={index === last}>
          ↓
        </Small>
        <Small label={`Edit ${name}`} onClick={onEdit}>
          ✎
        </Small>
        <Small label={`Remove ${name}`} onClick={onRemove}>
          ×
        </Small>
      </div>
    </li>
  );
};

/** The answer for that cut; none while the one at hand is to a cut that stood there before. */
const answerTo = (cut: Cut, step: LadderStep | undefined): LadderStep | undefined =>
  step?.expression === cut.expression && step.blanks === cut.blanks ? step : undefined;

const moved = (cuts: readonly Cut[], from: number, by: -1 | 1): Cut[] => {
  const next = [...cuts];
  const [cut] = next.splice(from, 1);
  if (cut) next.splice(from + by, 0, cut);
  return next;
};

/** The stack of cuts: what each asks, what it leaves, and what it alone would cost. */
export const Ladder = ({ programmeId, view, summary, ask }: Props) => {
  const [editing, setEditing] = useState<number | "new" | null>(null);
  const { cuts } = view;
  const set = (next: readonly Cut[]) => ask({ cuts: next });
  const save = (cut: Cut) => {
    set(editing === "new" ? [...cuts, cut] : cuts.map((old, i) => (i === editing ? cut : old)));
    setEditing(null);
  };
  return (
    <section aria-label="Cuts" className="p-4">
      <h2 className="text-[21px]">Cuts</h2>
      <p className="text-xs text-soft">in order; each shows what it leaves</p>
      <SavedSelections programmeId={programmeId} cuts={cuts} onOpen={set} />
      <ol className="mt-3">
        {cuts.map((cut, i) => (
          <Step
            // biome-ignore lint/suspicious/noArrayIndexKey: a cut is its place in the ladder
            key={i}
            index={i}
            last={cuts.length - 1}
            cut={cut}
            step={answerTo(cut, summary.ladder[i])}
            total={summary.total}
            onEdit={() => setEditing(i)}
            onChange={(next) => set(cuts.map((old, j) => (j === i ? next : old)))}
            onMove={(by) => set(moved(cuts, i, by))}
            onRemove={() => set(cuts.filter((_, j) => j !== i))}
          />
        ))}
      </ol>
      {cuts.length === 0 ? (
        <p className="border-t border-hair py-3 text-soft">
          No cuts: every star of the edition is in the table.
        </p>
      ) : null}
      <Button className="mt-3" onClick={() => setEditing("new")}>
        Add a cut
      </Button>
      {editing === null ? null : (
        <CutDialog
          cut={editing === "new" ? null : (cuts[editing] ?? null)}
          onSave={save}
          onClose={() => setEditing(null)}
        />
      )}
    </section>
  );
};
