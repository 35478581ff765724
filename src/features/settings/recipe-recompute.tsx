import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { Programme } from "#shared/api/programmes.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { activeJobsOptions } from "#src/api/jobs.ts";
import { JobProgress } from "#src/lib/job-progress.tsx";
import { useCan } from "#src/lib/rights.ts";

/** The recompute that goes on: found again after the page was loaded anew, and kept on screen to its outcome. */
export const useRecompute = (programmeId: string) => {
  const isAllowed = useCan()("job.read");
  const [jobId, setJobId] = useState<string>();
  const { data } = useQuery({ ...activeJobsOptions(programmeId), enabled: isAllowed });
  const active = data?.find(({ kind }) => kind === "recompute")?.id;
  if (active !== undefined && active !== jobId) setJobId(active);
  return { jobId, isActive: active !== undefined, follow: setJobId };
};

interface Props {
  programme: Programme;
  recompute: ReturnType<typeof useRecompute>;
}

/** How far the recompute is; until it is done, every number is from the recipe that is named. */
export const RecomputeProgress = ({ programme, recompute: { jobId, isActive } }: Props) =>
  jobId ? (
    <div className="rounded border border-rule bg-sheet p-3">
      <JobProgress
        key={jobId}
        programmeId={programme.id}
        jobId={jobId}
        done={`The catalogue is derived by ${recipeLabel(programme.recipe)} now.`}
      />
      {isActive ? (
        <p className="mt-2 text-xs text-soft">
          Until it is done every number stays as it is, from {recipeLabel(programme.recipe)}.
        </p>
      ) : null}
    </div>
  ) : null;
