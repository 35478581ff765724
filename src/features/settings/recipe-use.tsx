import { useQuery } from "@tanstack/react-query";
import type { Job } from "#shared/api/jobs.ts";
import type { Programme } from "#shared/api/programmes.ts";
import type { Recipe } from "#shared/api/recipes.ts";
import { count } from "#shared/format/numbers.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { recipeVersionOptions, useChooseRecipe } from "#src/api/recipes.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { RecipeLines } from "./recipe-lines.tsx";

interface Props {
  programme: Programme;
  wanted: Recipe;
  onStarted: (job: Job) => void;
  onClose: () => void;
}

const starsOf = ({ stars }: Programme): string => `${count(stars)} ${stars === 1 ? "star" : "stars"}`;

/** What the recompute will do, before it is asked for. */
const Outlook = ({ programme, isSame }: { programme: Programme; isSame: boolean }) => (
  <ul className="mb-4 flex list-disc flex-col gap-1 pl-5">
    <li>
      {isSame
        ? `The settings are those in force: every value of the ${starsOf(programme)} stays as it is, and only the label changes.`
        : `Every one of the ${starsOf(programme)} is derived anew.`}
    </li>
    <li>
      {programme.edition === null
        ? "It makes the first catalogue edition."
        : `It makes catalogue edition ${programme.edition + 1}. Until that is complete, edition ${programme.edition} stays in use.`}
    </li>
    <li>Editions and lists made before keep their values and the label of what they used.</li>
  </ul>
);

/** Says what would change and brings a version into force. */
export const UseRecipe = ({ programme, wanted, onStarted, onClose }: Props) => {
  const choose = useChooseRecipe(programme.id);
  const inForce = useQuery(recipeVersionOptions(programme.id, programme.recipe.versionId));
  const start = () =>
    choose.mutate(wanted.versionId, {
      onSuccess: ({ job }) => {
        onStarted(job);
        onClose();
      },
    });
  const isSame = wanted.hash === programme.recipe.hash;
  return (
    <Dialog
      title={`Use ${wanted.name}, version ${wanted.number}`}
      isOpen
      isWide
      onClose={onClose}
      footer={
        <>
          <Button onClick={onClose}>Not now</Button>
          <Button kind="main" isBusy={choose.isPending} onClick={start}>
            Recompute the catalogue
          </Button>
        </>
      }
    >
      <Outlook programme={programme} isSame={isSame} />
      <ErrorNotice error={choose.error ?? inForce.error} />
      {inForce.isPending ? <Loading what="Reading the recipe in force" /> : null}
      {inForce.data && !isSame ? (
        <RecipeLines
          caption={`What changes from ${recipeLabel(inForce.data)} to ${recipeLabel(wanted)}`}
          recipes={[inForce.data, wanted]}
          isDifferenceOnly
        />
      ) : null}
    </Dialog>
  );
};
