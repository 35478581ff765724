import { useSuspenseQuery } from "@tanstack/react-query";
import type { Programme } from "#shared/api/programmes.ts";
import { count } from "#shared/format/numbers.ts";
import { programmeOptions } from "#src/api/programmes.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Page } from "#src/ui/page.tsx";
import { ActiveJobs } from "./active-jobs.tsx";
import { Holdings } from "./holdings.tsx";
import { NextStepNote } from "./next-step-note.tsx";
import { RecentLines } from "./recent-lines.tsx";

const Lede = ({ edition, stars }: Programme) =>
  edition === null ? (
    <p className="font-serif text-[22px]">There is no catalogue edition yet.</p>
  ) : (
    <p className="font-serif text-[22px]">
      <em className="text-mark">{count(stars)}</em> {stars === 1 ? "star" : "stars"} in edition {edition}.
    </p>
  );

/** Where the programme stands: what it holds, what goes on, what happened, what comes next. */
export const OverviewPage = () => {
  const can = useCan();
  const { data: programme } = useSuspenseQuery(programmeOptions(useProgrammeId()));
  return (
    <Page title={programme.name} over="Programme" lede={programme.description || undefined}>
      <Lede {...programme} />
      {programme.isInvented ? (
        <p className="mt-2 text-soft">
          The sky of this programme is invented: none of its stars exist, and no telescope should look for
          them.
        </p>
      ) : null}
      <NextStepNote programme={programme} />
      {can("job.read") ? <ActiveJobs programmeId={programme.id} /> : null}
      <Holdings programme={programme} />
      {can("logbook.read") ? <RecentLines programmeId={programme.id} /> : null}
    </Page>
  );
};
