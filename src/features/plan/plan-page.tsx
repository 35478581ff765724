import { Link } from "react-router-dom";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { Page } from "#src/ui/page.tsx";

const LINK = "inline-flex min-h-8 items-center rounded border px-3 py-1 text-[13px]";

/** Observing windows are not part of Shortlight yet; the page says so and leads to what is. */
export const PlanPage = () => {
  const programmeId = useProgrammeId();
  return (
    <Page title="Plan">
      <EmptyState
        title="Planning is not here yet"
        actions={
          <>
            <Link
              to={paths.programme.to(programmeId, "lists")}
              className={`${LINK} border-ink bg-ink text-paper`}
            >
              Open target lists
            </Link>
            <Link
              to={paths.programme.to(programmeId, "catalogue")}
              className={`${LINK} border-edge bg-sheet`}
            >
              Open the catalogue
            </Link>
          </>
        }
      >
        <p>
          This page will show for each star of a list when in the year it can be observed, and how many
          transits to expect in those windows.
        </p>
        <p className="mt-2">
          Until then: rank stars by merit, make a target list, and export it for the planning tools of your
          observatory.
        </p>
      </EmptyState>
    </Page>
  );
};
