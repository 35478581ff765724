import { useInfiniteQuery } from "@tanstack/react-query";
import { Link } from "react-router-dom";
import { logbookOptions } from "#src/api/programmes.ts";
import { paths } from "#src/app/paths.ts";
import { deedOf } from "#src/lib/logbook-words.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Moment } from "#src/ui/moment.tsx";

const SHOWN = 8;

/** The newest lines of the logbook in words. */
const Lines = ({ programmeId }: { programmeId: string }) => {
  const { data, error, isPending, refetch } = useInfiniteQuery(logbookOptions(programmeId));
  if (isPending) return <Loading />;
  if (!data) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
  const lines = data.pages.flatMap((page) => page.lines).slice(0, SHOWN);
  if (lines.length === 0) return <p className="text-soft">Nothing yet.</p>;
  return (
    <ul className="border-b border-hair">
      {lines.map((line) => (
        <li
          key={line.id}
          className="grid gap-x-6 border-t border-hair py-2 sm:grid-cols-[11.5rem_minmax(0,1fr)]"
        >
          <span className="text-soft">
            <Moment at={line.at} isShort />
          </span>
          <span className="wrap-anywhere">
            <span className="font-medium">{line.actor}</span> {deedOf(line)}
          </span>
        </li>
      ))}
    </ul>
  );
};

export const RecentLines = ({ programmeId }: { programmeId: string }) => (
  <section aria-label="What happened" className="mt-8">
    <div className="mb-3 flex items-baseline justify-between gap-4">
      <h2 className="text-[22px]">What happened</h2>
      <Link
        to={paths.programme.to(programmeId, "logbook")}
        className="text-[13px] underline decoration-edge underline-offset-4 hover:decoration-ink"
      >
        Open the logbook
      </Link>
    </div>
    <Lines programmeId={programmeId} />
  </section>
);
