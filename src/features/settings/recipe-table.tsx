import type { Programme } from "#shared/api/programmes.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { RECIPES, recipeDifferences } from "./recipe-differences.ts";

type Key = Programme["recipe"];

interface Props {
  inForce: Key;
  wanted: Key;
  /** Absent for who may only look. */
  onWant: ((recipe: Key) => void) | undefined;
}

const Head = ({ recipe, inForce, wanted, onWant }: Props & { recipe: Recipe }) => {
  const name = `${recipe.name}, version ${recipe.version}`;
  return (
    <span className="flex min-h-6 flex-wrap items-center gap-2">
      {onWant ? (
        <label className="flex items-center gap-2">
          <input
            type="radio"
            name="recipe"
            className="size-4"
            checked={wanted === recipe.key}
            onChange={() => onWant(recipe.key)}
          />
          {name}
        </label>
      ) : (
        name
      )}
      {inForce === recipe.key ? <Pill tone="calm">in force</Pill> : null}
    </span>
  );
};

/** The recipes side by side, in what they differ. */
export const RecipeTable = (props: Props) => (
  <LedgerTable
    caption="What the recipes differ in"
    heads={[
      { key: "what", label: "Differs in" },
      ...RECIPES.map((recipe) => ({ key: recipe.key, label: <Head recipe={recipe} {...props} /> })),
    ]}
  >
    {recipeDifferences().map(({ label, values }) => (
      <tr key={label}>
        <th scope="row" className="border-b border-hair px-2 py-2 font-normal text-soft">
          {label}
        </th>
        {RECIPES.map(({ key }, index) => (
          <td key={key}>{values[index]}</td>
        ))}
      </tr>
    ))}
  </LedgerTable>
);
