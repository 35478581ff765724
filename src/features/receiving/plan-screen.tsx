import { useState } from "react";
import type { Extract, ExtractPreview } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { ApiError } from "#src/api/client.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { ColumnValues } from "./column-values.tsx";
import { EarlierPlanDialog } from "./earlier-plan-dialog.tsx";
import { ExtractFrame } from "./extract-frame.tsx";
import { openOf, questionsLeft } from "./extract-words.ts";
import { FileFacts } from "./file-facts.tsx";
import { FileReading } from "./file-reading.tsx";
import { KnownPlan } from "./known-plan.tsx";
import { LookTabs, useLook } from "./look-tabs.tsx";
import { withCard } from "./plan-answers.ts";
import { PlanTable } from "./plan-table.tsx";
import { PositionMap } from "./position-map.tsx";
import { PreviewRows } from "./preview-rows.tsx";
import { Questions } from "./questions.tsx";
import { SavePlanButton } from "./save-plan-dialog.tsx";
import { usePlan } from "./use-plan.ts";

type Reading = ReturnType<typeof usePlan>;

interface Props {
  extract: Extract;
  preview: ExtractPreview;
  /** Opens the extract anew, with what is saved. */
  onReload: () => void;
}

const Failure = ({ failure }: { failure: NonNullable<Extract["failure"]> }) => (
  <div role="alert" className="mb-4 rounded border border-mark bg-sheet p-3">
    <p className="font-medium">
      <LevelMark level="stop" /> The extract was not committed, and the catalogue is as it was.{" "}
      {failure.message}
    </p>
    {failure.hint ? <p className="mt-1 text-soft">{failure.hint}</p> : null}
  </div>
);

const Trouble = ({
  error,
  onReload,
  onCheck,
}: {
  error: unknown;
  onReload: () => void;
  onCheck: () => void;
}) => {
  const isStale = error instanceof ApiError && error.code === "stale-version";
  return (
    <div className="mb-4">
      <ErrorNotice error={error} />
      <Button className="mt-2" onClick={isStale ? onReload : onCheck}>
        {isStale ? "Show what is saved" : "Save again"}
      </Button>
    </div>
  );
};

/** Ways on with the plan: another one, a name for this one, and the one main way. */
const Actions = ({ extract, reading }: { extract: Extract; reading: Reading }) => {
  const [isChoosing, setChoosing] = useState(false);
  const open = openOf(reading.findings).length;
  return (
    <div className="flex flex-wrap gap-2">
      <Button onClick={() => setChoosing(true)}>Use an earlier plan</Button>
      <SavePlanButton extract={extract} plan={reading.plan} />
      <Button
        kind="main"
        disabled={open > 0 || reading.isSaving}
        isBusy={reading.isCommitting}
        onClick={reading.commit}
        title={open > 0 ? questionsLeft(reading.findings) : undefined}
      >
        {extract.failure ? "Commit again" : "Commit extract"}
      </Button>
      <EarlierPlanDialog
        preview={reading.preview}
        isOpen={isChoosing}
        onClose={() => setChoosing(false)}
        onPlan={reading.change}
      />
    </div>
  );
};

const Looks = ({
  reading,
  isReadOnly,
  onOpen,
}: {
  reading: Reading;
  isReadOnly: boolean;
  onOpen: (header: string) => void;
}) => {
  const { plan, preview, findings } = reading;
  return (
    <LookTabs
      label="The file"
      looks={[
        {
          key: "plan",
          label: "Columns",
          show: () => (
            <PlanTable
              plan={plan}
              preview={preview}
              findings={findings}
              isReadOnly={isReadOnly}
              onCard={(index, change) => reading.change(withCard(plan, index, change))}
              onOpen={onOpen}
            />
          ),
        },
        { key: "rows", label: "Rows", show: () => <PreviewRows plan={plan} preview={preview} /> },
        {
          key: "sky",
          label: "Sky",
          show: () => (
            <div className="max-w-3xl">
              <PositionMap points={preview.sky} />
              <p className="text-xs text-soft">
                Right ascension and declination in degrees, as they are read now.
              </p>
            </div>
          ),
        },
        { key: "values", label: "Values", show: () => <ColumnValues plan={plan} preview={preview} /> },
      ]}
    />
  );
};

/** The reading plan: the columns in the middle, what is open at the right, and the one way on. */
export const PlanScreen = ({ extract, preview: opened, onReload }: Props) => {
  const isReadOnly = !useCan()("extract.edit");
  const [, look] = useLook();
  const reading = usePlan(useProgrammeId(), extract, opened);
  const { plan, preview, findings } = reading;
  const open = openOf(findings).length;
  const used = plan.columns.filter((c) => c.means !== KEPT).length;
  const openColumn = (header: string) => look("values", { column: header });
  return (
    <ExtractFrame
      extract={{ ...extract, plan }}
      planNote={`${questionsLeft(findings)}; ${count(used)} of ${count(plan.columns.length)} columns used`}
      onDescribed={onReload}
      below={
        preview.sky.length > 0 ? (
          <div className="mt-5 max-w-sm max-xl:hidden">
            <PositionMap title="Where they fall" points={preview.sky} isSmall />
          </div>
        ) : null
      }
      aside={
        <Questions
          plan={plan}
          sky={preview.sky}
          findings={findings}
          isSaving={reading.isSaving}
          isReadOnly={isReadOnly}
          onPlan={reading.change}
          onCheck={reading.check}
          onOpen={openColumn}
        />
      }
    >
      <header className="mb-4 flex flex-wrap items-start justify-between gap-3">
        <div className="min-w-60 flex-1">
          <h1 className="text-[30px]">How should this file be read?</h1>
          {open > 0 ? (
            <p className="mt-1 text-soft">
              It can be committed once nothing is open: {questionsLeft(findings)}.
            </p>
          ) : null}
        </div>
        {isReadOnly ? null : <Actions extract={extract} reading={reading} />}
      </header>
      {extract.failure ? <Failure failure={extract.failure} /> : null}
      {reading.error ? <Trouble error={reading.error} onReload={onReload} onCheck={reading.check} /> : null}
      {isReadOnly || extract.plan ? null : <KnownPlan preview={opened} onPlan={reading.change} />}
      <FileFacts extract={extract} plan={plan} preview={preview} />
      <FileReading plan={plan} isReadOnly={isReadOnly} onPlan={reading.change} />
      <Looks reading={reading} isReadOnly={isReadOnly} onOpen={openColumn} />
    </ExtractFrame>
  );
};
