import type { Recipe } from "#shared/api/recipes.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { type LineGroup, recipeDifferences, type SettingLine, settingLines } from "./recipe-differences.ts";
import { aboutSetting, isFigure, rangeWords } from "./recipe-settings.ts";

interface Props {
  caption: string;
  /** One, or two to be compared. */
  recipes: readonly Recipe[];
  /** Leaves out what is the same, and what is published of each setting. */
  isDifferenceOnly?: boolean;
}

const publishedOf = ({ key }: SettingLine): string =>
  [isFigure(key) ? `May be ${rangeWords(key)}.` : "", aboutSetting(key).source ?? ""]
    .filter(Boolean)
    .join(" ");

const Value = ({ line, at }: { line: SettingLine; at: number }) => {
  const value = line.values[at];
  if (value === null || value === undefined) return <span className="text-faint">not in use</span>;
  return isFigure(line.key) ? <span className="font-mono text-[13px]">{value}</span> : value;
};

const Line = ({
  line,
  recipes,
  isDifferenceOnly = false,
}: Omit<Props, "caption"> & { line: SettingLine }) => (
  <tr>
    <th scope="row" className="border-b border-hair px-2 py-2 align-top font-normal">
      {line.label}
      {line.isDifferent && !isDifferenceOnly ? (
        <span className="text-mark">
          {" "}
          <span aria-hidden="true">◆</span>
          <span className="sr-only">differs</span>
        </span>
      ) : null}
      {isDifferenceOnly ? null : <span className="block text-xs text-soft">{publishedOf(line)}</span>}
    </th>
    {recipes.map(({ versionId }, i) => (
      <td key={versionId} className="w-[30%] wrap-anywhere">
        <Value line={line} at={i} />
      </td>
    ))}
  </tr>
);

const Lines = ({ group, ...props }: Omit<Props, "caption"> & { group: LineGroup }) => (
  <>
    <tr>
      <th
        scope="colgroup"
        colSpan={props.recipes.length + 1}
        className="px-2 pt-5 pb-1 text-[11px] font-semibold tracking-[0.09em] text-soft uppercase"
      >
        {group.title}
      </th>
    </tr>
    {group.lines.map((line) => (
      <Line key={line.key} line={line} {...props} />
    ))}
  </>
);

/** The settings of one recipe, or of two side by side, in the reader's words. */
export const RecipeLines = ({ caption, recipes, isDifferenceOnly = false }: Props) => {
  const groups = isDifferenceOnly ? recipeDifferences(recipes) : settingLines(recipes);
  if (groups.length === 0) return <p>They have the same settings, and the same hash.</p>;
  return (
    <LedgerTable
      caption={caption}
      heads={[
        { key: "setting", label: "Setting" },
        ...recipes.map((recipe) => ({
          key: recipe.versionId,
          label: <span className="font-mono font-medium">{recipeLabel(recipe)}</span>,
        })),
      ]}
    >
      {groups.map((group) => (
        <Lines key={group.title} group={group} recipes={recipes} isDifferenceOnly={isDifferenceOnly} />
      ))}
    </LedgerTable>
  );
};
