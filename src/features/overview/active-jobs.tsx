import { useQuery } from "@tanstack/react-query";
import { activeJobsOptions } from "#src/api/jobs.ts";
import { JobProgress } from "#src/lib/job-progress.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";

/** How often the list is read where events of the server do not arrive. */
const AGAIN_MS = 5_000;

/** What goes on now; nothing is shown while nothing does. */
export const ActiveJobs = ({ programmeId }: { programmeId: string }) => {
  const { data, error } = useQuery({ ...activeJobsOptions(programmeId), refetchInterval: AGAIN_MS });
  const jobs = (data ?? []).filter(({ kind }) => kind !== "send-mail");
  if (!data) return <ErrorNotice error={error} />;
  if (jobs.length === 0) return null;
  return (
    <section aria-label="Going on now" className="mt-8 max-w-2xl">
      <h2 className="mb-3 text-[22px]">Going on now</h2>
      <ul className="flex flex-col gap-4">
        {jobs.map((job) => (
          <li key={job.id}>
            <JobProgress programmeId={programmeId} jobId={job.id} done="Done." />
          </li>
        ))}
      </ul>
    </section>
  );
};
