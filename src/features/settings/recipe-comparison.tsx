import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { Recipe } from "#shared/api/recipes.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { recipesOptions, recipeVersionOptions } from "#src/api/recipes.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Checkbox, Select } from "#src/ui/inputs.tsx";
import { Section } from "#src/ui/page.tsx";
import { RecipeLines } from "./recipe-lines.tsx";

interface Props {
  programmeId: string;
  versions: readonly Recipe[];
  open: Recipe;
  /** Id of the version that it is compared with. */
  against: string | null;
  onCompare: (versionId: string | null) => void;
}

const Choices = ({ label, recipes }: { label: string; recipes: readonly Recipe[] }) =>
  recipes.length === 0 ? null : (
    <optgroup label={label}>
      {recipes.map((recipe) => (
        <option key={recipe.versionId} value={recipe.versionId}>
          {recipeLabel(recipe)}
        </option>
      ))}
    </optgroup>
  );

/** The settings of the open version, alone or beside those of another. */
export const RecipeComparison = ({ programmeId, versions, open, against, onCompare }: Props) => {
  const [isDifferenceOnly, setDifferenceOnly] = useState(false);
  const { data: newest = [] } = useQuery(recipesOptions(programmeId));
  const asked = against === open.versionId ? null : against;
  const other = useQuery({ ...recipeVersionOptions(programmeId, asked ?? ""), enabled: asked !== null });
  const compared = asked !== null && other.data ? other.data : null;
  return (
    <Section title="Settings" note="In the order in which a star is derived.">
      <div className="mb-3 flex flex-wrap items-end gap-x-6 gap-y-2">
        <div className="w-72 max-w-full">
          <Select
            label="Compare with"
            value={asked ?? ""}
            onChange={(event) => onCompare(event.target.value || null)}
          >
            <option value="">nothing</option>
            <Choices
              label="Versions of this recipe"
              recipes={versions.filter(({ versionId }) => versionId !== open.versionId)}
            />
            <Choices label="Other recipes" recipes={newest.filter(({ id }) => id !== open.id)} />
          </Select>
        </div>
        {compared ? (
          <Checkbox
            label="Only what differs"
            checked={isDifferenceOnly}
            onChange={(event) => setDifferenceOnly(event.target.checked)}
          />
        ) : null}
      </div>
      <ErrorNotice error={asked === null ? null : other.error} />
      <RecipeLines
        caption={
          compared
            ? `${recipeLabel(open)} beside ${recipeLabel(compared)}`
            : `Settings of ${recipeLabel(open)}`
        }
        recipes={compared ? [open, compared] : [open]}
        isDifferenceOnly={compared !== null && isDifferenceOnly}
      />
    </Section>
  );
};
