import { useQuery } from "@tanstack/react-query";
import { Link } from "react-router-dom";
import type { Programme } from "#shared/api/programmes.ts";
import type { Recipe } from "#shared/api/recipes.ts";
import { recipeLabel, shortHash } from "#shared/format/recipe-label.ts";
import { recipesOptions, recipeVersionOptions } from "#src/api/recipes.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { RecomputeProgress, useRecompute } from "./recipe-recompute.tsx";
import { savedByWords } from "./recipe-words.ts";

const Row = ({
  recipe,
  inForce,
}: {
  recipe: Recipe;
  inForce: { id: string; number: number } | undefined;
}) => (
  <tr>
    <th scope="row" className="border-b border-hair px-2 py-2 align-top font-normal">
      <Link
        to={paths.programme.to(useProgrammeId(), "settings", `/recipes/${recipe.id}`)}
        className="font-medium underline decoration-edge underline-offset-4 wrap-anywhere hover:decoration-ink"
      >
        {recipe.name}
      </Link>{" "}
      {inForce?.id === recipe.id ? <Pill tone="calm">version {inForce.number} in force</Pill> : null}
      {recipe.note ? <span className="block max-w-prose text-xs text-soft">{recipe.note}</span> : null}
    </th>
    <td className="text-right font-mono text-[13px]">{recipe.number}</td>
    <td className="font-mono text-[13px]">{shortHash(recipe.hash)}</td>
    <td>
      <Moment at={recipe.savedAt} isShort />
      <span className="block text-xs text-soft">{savedByWords(recipe)}</span>
    </td>
  </tr>
);

const HEADS = [
  { label: "Recipe" },
  { label: "Newest version", isNumber: true },
  { label: "Hash" },
  { label: "Saved" },
];

/** The recipe in force and those that there are; each opens on a page of its own. */
export const RecipeChoice = ({ programme }: { programme: Programme }) => {
  const recompute = useRecompute(programme.id);
  const recipes = useQuery(recipesOptions(programme.id));
  const inForce = useQuery(recipeVersionOptions(programme.id, programme.recipe.versionId));
  return (
    <div className="flex flex-col gap-4">
      <p>
        The catalogue is derived by{" "}
        <span className="font-mono text-[13px]">{recipeLabel(programme.recipe)}</span>.
      </p>
      <RecomputeProgress programme={programme} recompute={recompute} />
      {recipes.isPending ? <Loading /> : null}
      <ErrorNotice error={recipes.error} onRetry={() => void recipes.refetch()} />
      {recipes.data ? (
        <LedgerTable caption="Recipes of the programme" heads={HEADS}>
          {recipes.data.map((recipe) => (
            <Row key={recipe.id} recipe={recipe} inForce={inForce.data} />
          ))}
        </LedgerTable>
      ) : null}
    </div>
  );
};
