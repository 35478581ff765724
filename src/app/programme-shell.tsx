import { useQuery } from "@tanstack/react-query";
import { Suspense } from "react";
import { Outlet } from "react-router-dom";
import { useProgrammeEvents } from "#src/api/jobs.ts";
import { programmeOptions } from "#src/api/programmes.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";

/** What all screens of a programme share: it exists, one may see it, and its changes arrive. */
export const ProgrammeShell = () => {
  const programmeId = useProgrammeId();
  const programme = useQuery(programmeOptions(programmeId));
  const can = useCan();
  useProgrammeEvents(programmeId, can("job.read"));
  if (programme.isPending) return <Loading />;
  if (programme.isError)
    return <ErrorNotice error={programme.error} onRetry={() => void programme.refetch()} isPage />;
  return (
    <Suspense fallback={<Loading />}>
      <Outlet />
    </Suspense>
  );
};
