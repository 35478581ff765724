import { useQuery, useQueryClient } from "@tanstack/react-query";
import { useEffect } from "react";
import { jobOptions, useCancelJob } from "#src/api/jobs.ts";
import { programmeKeys } from "#src/api/programmes.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { Progress } from "#src/ui/progress.tsx";
import { jobPhase, jobTitle } from "./job-words.ts";
import { useCan } from "./rights.ts";

interface Props {
  programmeId: string;
  jobId: string;
  /** Said when it went well. */
  done: string;
}

/** A job from its first moment to its outcome, with the way to stop it for who may. */
export const JobProgress = ({ programmeId, jobId, done }: Props) => {
  const can = useCan();
  const client = useQueryClient();
  const cancel = useCancelJob(programmeId);
  const { data: job, error } = useQuery(jobOptions(programmeId, jobId));
  const isOver = job?.finishedAt != null;
  // Where events do not arrive, what the job changed is read again all the same.
  useEffect(() => {
    if (isOver) void client.invalidateQueries({ queryKey: programmeKeys.all(programmeId) });
  }, [client, programmeId, isOver]);
  if (!job) return <ErrorNotice error={error} />;
  if (job.state === "done") return <p role="status">{done}</p>;
  if (job.state === "cancelled") return <p role="status">It was stopped; nothing has changed.</p>;
  if (job.state === "failed")
    return (
      <div role="alert" className="rounded border border-mark bg-sheet p-3">
        <p className="font-medium">
          <LevelMark level="stop" /> {job.error?.message ?? `${jobTitle(job)} did not come to its end.`}
        </p>
        {job.error?.hint ? <p className="mt-1 text-soft">{job.error.hint}</p> : null}
      </div>
    );
  return (
    <div className="flex flex-col gap-2">
      <Progress
        label={`${jobTitle(job)}: ${jobPhase(job).toLowerCase()}`}
        done={job.done}
        total={job.total}
        unit={job.unit}
      />
      <ErrorNotice error={cancel.error} />
      {can("job.cancel") ? (
        <div>
          <Button
            isBusy={cancel.isPending}
            disabled={job.cancelRequested}
            onClick={() => cancel.mutate(job.id)}
          >
            {job.cancelRequested ? "Stopping" : "Stop the job"}
          </Button>
        </div>
      ) : null}
    </div>
  );
};
