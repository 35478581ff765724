import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { useParams } from "react-router-dom";
import { count } from "#shared/format/numbers.ts";
import { type ExtractShown, extractOptions } from "#src/api/extracts.ts";
import { JobProgress } from "#src/lib/job-progress.tsx";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { AwaitingFile } from "./awaiting-file.tsx";
import { ExtractFrame } from "./extract-frame.tsx";
import { Outcome } from "./outcome.tsx";
import { PlanScreen } from "./plan-screen.tsx";
import { useUploadOf } from "./uploads.ts";

const ASK_EVERY_MS = 5_000;

const Importing = ({ extract }: Pick<ExtractShown, "extract">) => {
  const programmeId = useProgrammeId();
  return (
    <>
      <h1 className="mb-2 text-[30px]">The extract is being committed</h1>
      <p className="mb-4 text-soft">All rows or none. You may leave this page; the work goes on.</p>
      {extract.job ? (
        <div className="max-w-2xl">
          <JobProgress programmeId={programmeId} jobId={extract.job.id} done="The extract is committed." />
        </div>
      ) : null}
    </>
  );
};

const planNoteOf = ({ extract }: Pick<ExtractShown, "extract">): string => {
  if (!extract.plan) return "not begun";
  return `${count(extract.plan.columns.length)} columns, confirmed`;
};

const Shown = ({ extract, preview, onReload }: ExtractShown & { onReload: () => void }) => {
  if (extract.state === "planning" && preview)
    return <PlanScreen extract={extract} preview={preview} onReload={onReload} />;
  return (
    <ExtractFrame extract={extract} planNote={planNoteOf({ extract })}>
      {extract.state === "receiving" ? <AwaitingFile extract={extract} /> : null}
      {extract.state === "importing" ? <Importing extract={extract} /> : null}
      {extract.state === "committed" || extract.state === "withdrawn" ? <Outcome extract={extract} /> : null}
    </ExtractFrame>
  );
};

/** One extract from its file to its place in the catalogue. */
export const ExtractPage = () => {
  const programmeId = useProgrammeId();
  const { extractId = "" } = useParams();
  const [opening, setOpening] = useState(0);
  const upload = useUploadOf(extractId);
  const { data, error, refetch } = useQuery({
    ...extractOptions(programmeId, extractId),
    enabled: upload?.isTakenBack !== true,
    // Someone may be sending it from another window.
    refetchInterval: ({ state }) =>
      state.data?.extract.state === "receiving" && !upload ? ASK_EVERY_MS : false,
  });
  if (error && !data) return <ErrorNotice error={error} onRetry={() => void refetch()} isPage />;
  if (!data) return <Loading what="Opening the extract" />;
  const reload = async () => {
    await refetch();
    setOpening(opening + 1);
  };
  return <Shown key={`${extractId}-${opening}`} {...data} onReload={() => void reload()} />;
};
