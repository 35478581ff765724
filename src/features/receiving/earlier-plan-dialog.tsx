import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { ExtractPreview, NamedPlan, ReadingPlan } from "#shared/api/extracts.ts";
import { count } from "#shared/format/numbers.ts";
import { namedPlansOptions } from "#src/api/reading-plans.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { differencesFrom, planFor } from "./plan-answers.ts";

/** Differences written out; more are counted. */
const WRITTEN = 8;

const Differences = ({ preview, named }: { preview: ExtractPreview; named: NamedPlan }) => {
  const all = differencesFrom(preview, named.plan);
  if (all.length === 0) return <p className="mt-3 text-soft">Every column of this file is in that plan.</p>;
  return (
    <>
      <p className="mt-3 text-soft">What differs:</p>
      <ul className="list-disc pl-5 text-[13px]">
        {all.slice(0, WRITTEN).map((text) => (
          <li key={text} className="wrap-anywhere">
            {text}
          </li>
        ))}
        {all.length > WRITTEN ? <li>and {count(all.length - WRITTEN)} more</li> : null}
      </ul>
    </>
  );
};

interface Props {
  preview: ExtractPreview;
  isOpen: boolean;
  onClose: () => void;
  onPlan: (plan: ReadingPlan) => void;
}

const Plans = ({ preview, onClose, onPlan }: Omit<Props, "isOpen">) => {
  const { data: plans, error, refetch } = useQuery(namedPlansOptions(useProgrammeId()));
  const [chosen, setChosen] = useState<NamedPlan | null>(null);
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
  if (!plans) return <Loading what="Reading the plans" />;
  if (plans.length === 0)
    return (
      <p className="text-soft">
        No plan has a name yet. Answer the questions of this file, then save its plan under a name.
      </p>
    );
  const use = () => {
    if (!chosen) return;
    onPlan(planFor(preview, chosen.plan));
    onClose();
  };
  return (
    <>
      <fieldset>
        <legend className="sr-only">Reading plans</legend>
        {plans.map((named) => (
          <label key={named.id} className="flex min-h-9 items-start gap-2.5 border-b border-hair py-1.5">
            <input
              type="radio"
              name="plan"
              className="mt-1 size-4"
              checked={chosen?.id === named.id}
              onChange={() => setChosen(named)}
            />
            <span className="min-w-0 wrap-anywhere">
              {named.name} <span className="text-soft">version {named.number}</span>
              <span className="block text-xs text-soft">
                {count(named.plan.columns.length)} columns, saved by {named.savedBy.name}{" "}
                <Moment at={named.savedAt} isShort />
              </span>
            </span>
          </label>
        ))}
      </fieldset>
      {chosen ? <Differences preview={preview} named={chosen} /> : null}
      <div className="mt-5 flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Cancel</Button>
        <Button kind="main" disabled={chosen === null} onClick={use}>
          Read with this plan
        </Button>
      </div>
    </>
  );
};

/** Chooses one of the programme's named plans for this file, saying first what differs. */
export const EarlierPlanDialog = ({ isOpen, onClose, ...rest }: Props) => (
  <Dialog title="Use an earlier plan" isOpen={isOpen} onClose={onClose}>
    <Plans onClose={onClose} {...rest} />
  </Dialog>
);
