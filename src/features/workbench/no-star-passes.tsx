import type { ViewSummary } from "#shared/api/stars.ts";
import { count } from "#shared/format/numbers.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";

/** Which cut leaves nothing, for the words of an empty table. */
export const NoStarPasses = ({ summary }: { summary: ViewSummary }) => {
  const at = summary.ladder.findIndex((step) => !step.error && step.left === 0);
  const step = summary.ladder[at];
  return (
    <EmptyState title="No star passes.">
      {step ? (
        <p>
          Cut {at + 1} ({step.expression}) drops all of the {count(step.fell)} left. Loosen it, or look at the
          ladder.
        </p>
      ) : (
        <p>This edition holds no stars.</p>
      )}
    </EmptyState>
  );
};
