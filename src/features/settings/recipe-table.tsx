import type { Recipe } from "#shared/api/recipes.ts";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { recipeDifferences } from "./recipe-differences.ts";

interface Props {
  recipes: readonly Recipe[];
  /** Ids of versions. */
  inForce: string;
  wanted: string;
  /** Absent for who may only look. */
  onWant: ((versionId: string) => void) | undefined;
}

const Head = ({ recipe, inForce, wanted, onWant }: Omit<Props, "recipes"> & { recipe: Recipe }) => {
  const name = `${recipe.name}, version ${recipe.number}`;
  return (
    <span className="flex min-h-6 flex-wrap items-center gap-2">
      {onWant ? (
        <label className="flex items-center gap-2">
          <input
            type="radio"
            name="recipe"
            className="size-4"
            checked={wanted === recipe.versionId}
            onChange={() => onWant(recipe.versionId)}
          />
          {name}
        </label>
      ) : (
        name
      )}
      {inForce === recipe.versionId ? <Pill tone="calm">in force</Pill> : null}
    </span>
  );
};

/** The recipes side by side, in what they differ. */
export const RecipeTable = ({ recipes, ...props }: Props) => (
  <LedgerTable
    caption="What the recipes differ in"
    heads={[
      { key: "what", label: "Differs in" },
      ...recipes.map((recipe) => ({ key: recipe.versionId, label: <Head recipe={recipe} {...props} /> })),
    ]}
  >
    {recipeDifferences(recipes).map(({ label, values }) => (
      <tr key={label}>
        <th scope="row" className="border-b border-hair px-2 py-2 font-normal text-soft">
          {label}
        </th>
        {recipes.map(({ versionId }, index) => (
          <td key={versionId}>{values[index]}</td>
        ))}
      </tr>
    ))}
  </LedgerTable>
);
