import type { Recipe } from "#shared/api/recipes.ts";
import { shortHash } from "#shared/format/recipe-label.ts";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { savedByWords } from "./recipe-words.ts";

interface Props {
  /** The newest first. */
  versions: readonly Recipe[];
  open: Recipe;
  /** Id of the version in force, of whatever recipe. */
  inForce: string;
  onShow: (versionId: string) => void;
}

const HEADS = [{ label: "Version" }, { label: "Hash" }, { label: "Saved" }];

/** Every version with who saved it and when; choosing one shows its settings. */
export const RecipeVersions = ({ versions, open, inForce, onShow }: Props) => (
  <LedgerTable caption="Versions of the recipe" heads={HEADS}>
    {versions.map((version) => {
      const isOpen = version.versionId === open.versionId;
      return (
        <tr key={version.versionId} className={isOpen ? "bg-sel" : ""}>
          <th scope="row" className="border-b border-hair px-2 py-2 align-top font-normal">
            <button
              type="button"
              aria-pressed={isOpen}
              onClick={() => onShow(version.versionId)}
              className={`min-h-6 underline underline-offset-4 ${isOpen ? "font-medium decoration-ink" : "decoration-edge hover:decoration-ink"}`}
            >
              Version {version.number}
            </button>{" "}
            {version.versionId === inForce ? <Pill tone="calm">in force</Pill> : null}
            {version.name === open.name ? null : <span className="block text-xs">{version.name}</span>}
            {version.note ? (
              <span className="block max-w-prose text-xs text-soft wrap-anywhere">{version.note}</span>
            ) : null}
          </th>
          <td className="font-mono text-[13px]" title={version.hash}>
            {shortHash(version.hash)}
          </td>
          <td>
            <Moment at={version.savedAt} isShort />
            <span className="block text-xs text-soft">{savedByWords(version)}</span>
          </td>
        </tr>
      );
    })}
  </LedgerTable>
);
