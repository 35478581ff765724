import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { Programme } from "#shared/api/programmes.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { activeJobsOptions } from "#src/api/jobs.ts";
import { recipesOptions, useChooseRecipe } from "#src/api/recipes.ts";
import { JobProgress } from "#src/lib/job-progress.tsx";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { RecipeTable } from "./recipe-table.tsx";

/** The recompute that goes on: found again after the page was loaded anew, and kept on screen to its outcome. */
const useRecompute = (programmeId: string, isAllowed: boolean) => {
  const [jobId, setJobId] = useState<string>();
  const { data } = useQuery({ ...activeJobsOptions(programmeId), enabled: isAllowed });
  const active = data?.find(({ kind }) => kind === "recompute")?.id;
  if (active !== undefined && active !== jobId) setJobId(active);
  return { jobId, setJobId };
};

/** The recipe in force, what another would change, and the recompute that brings it into force. */
export const RecipeChoice = ({ programme }: { programme: Programme }) => {
  const can = useCan();
  const choose = useChooseRecipe(programme.id);
  const { jobId, setJobId } = useRecompute(programme.id, can("job.read"));
  const { data: recipes = [] } = useQuery(recipesOptions(programme.id));
  const [wanted, setWanted] = useState(programme.recipe.versionId);
  const wantedName = recipes.find(({ versionId }) => versionId === wanted)?.name ?? programme.recipe.name;
  const recompute = () => choose.mutate(wanted, { onSuccess: ({ job }) => setJobId(job.id) });
  return (
    <div className="flex flex-col gap-4">
      <p>
        The catalogue is derived by the recipe{" "}
        <span className="font-medium">{recipeLabel(programme.recipe)}</span>.
      </p>
      <RecipeTable
        recipes={recipes}
        inForce={programme.recipe.versionId}
        wanted={wanted}
        onWant={can("programme.choose-recipe") ? setWanted : undefined}
      />
      {can("programme.choose-recipe") ? (
        <>
          <p className="text-[13px] text-soft">
            Another recipe derives every star anew and makes the next catalogue edition. Until it is ready the
            present edition stays in use; editions and lists made before keep their values.
          </p>
          <ErrorNotice error={choose.error} />
          <div>
            <Button
              isBusy={choose.isPending}
              disabled={wanted === programme.recipe.versionId}
              onClick={recompute}
            >
              Recompute with {wantedName}
            </Button>
          </div>
        </>
      ) : null}
      {jobId ? (
        <JobProgress
          key={jobId}
          programmeId={programme.id}
          jobId={jobId}
          done={`The catalogue is derived by the recipe ${recipeLabel(programme.recipe)} now.`}
        />
      ) : null}
    </div>
  );
};
