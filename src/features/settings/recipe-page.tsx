import { useQuery, useSuspenseQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Link, useNavigate, useParams, useSearchParams } from "react-router-dom";
import type { Programme } from "#shared/api/programmes.ts";
import type { Recipe } from "#shared/api/recipes.ts";
import { programmeOptions } from "#src/api/programmes.ts";
import { recipeVersionsOptions } from "#src/api/recipes.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Page, Section } from "#src/ui/page.tsx";
import { RecipeComparison } from "./recipe-comparison.tsx";
import { RecipeEditor } from "./recipe-editor.tsx";
import { RecomputeProgress, useRecompute } from "./recipe-recompute.tsx";
import { UseRecipe } from "./recipe-use.tsx";
import { RecipeVersions } from "./recipe-versions.tsx";

type Editing = "next" | "copy";

const editingOf = (text: string | null): Editing | null => (text === "next" || text === "copy" ? text : null);

/** Which version is open and whether it is edited stands in the address: `?version=<id>&edit=next`. */
const useOpen = (versions: readonly [Recipe, ...Recipe[]]) => {
  const mayEdit = useCan()("recipe.edit");
  const [params, setParams] = useSearchParams();
  const open = versions.find(({ versionId }) => versionId === params.get("version")) ?? versions[0];
  const change = (part: Record<string, string | null>) =>
    setParams((before) => {
      const after = new URLSearchParams(before);
      for (const [key, value] of Object.entries(part))
        if (value === null) after.delete(key);
        else after.set(key, value);
      return after;
    });
  return {
    open,
    editing: mayEdit ? editingOf(params.get("edit")) : null,
    against: params.get("against"),
    show: (versionId: string) => change({ version: versionId, edit: null }),
    edit: (how: Editing | null) => change({ version: open.versionId, edit: how }),
    compare: (versionId: string | null) => change({ against: versionId }),
  };
};

interface OpenProps {
  programme: Programme;
  versions: readonly [Recipe, ...Recipe[]];
}

const Over = ({ programme }: { programme: Programme }) => (
  <>
    <Link
      to={paths.programme.to(programme.id, "settings")}
      className="underline decoration-edge underline-offset-4 hover:text-ink"
    >
      Programme settings
    </Link>
    {" · recipe"}
  </>
);

const Actions = ({ onUse, onEdit }: { onUse: (() => void) | null; onEdit: (how: Editing) => void }) => {
  const can = useCan();
  return (
    <>
      {can("recipe.edit") ? (
        <>
          <Button onClick={() => onEdit("next")}>Edit as a new version</Button>
          <Button onClick={() => onEdit("copy")}>Make a copy</Button>
        </>
      ) : null}
      {can("programme.choose-recipe") && onUse ? (
        <Button kind="main" onClick={onUse}>
          Use this version
        </Button>
      ) : null}
    </>
  );
};

const OpenRecipe = ({ programme, versions }: OpenProps) => {
  const { open, editing, against, show, edit, compare } = useOpen(versions);
  const [isAsked, setAsked] = useState(false);
  const recompute = useRecompute(programme.id);
  const navigate = useNavigate();
  if (editing)
    return (
      <Page
        title={editing === "copy" ? `Copy of ${open.name}` : open.name}
        over={<Over programme={programme} />}
        lede={
          editing === "copy"
            ? `A recipe of its own that starts from version ${open.number}.`
            : `Version ${versions[0].number + 1}, starting from version ${open.number}. It changes nothing until it is used.`
        }
      >
        <RecipeEditor
          key={`${editing}-${open.versionId}`}
          programmeId={programme.id}
          from={open}
          newest={editing === "copy" ? null : versions[0].number}
          onClose={() => edit(null)}
          onSaved={({ id, versionId }) =>
            navigate(paths.programme.to(programme.id, "settings", `/recipes/${id}?version=${versionId}`))
          }
        />
      </Page>
    );
  const isInForce = open.versionId === programme.recipe.versionId;
  return (
    <Page
      title={open.name}
      over={<Over programme={programme} />}
      lede={isInForce ? `Version ${open.number}, in force.` : `Version ${open.number}, not in force.`}
      actions={
        <Actions onUse={isInForce || recompute.isActive ? null : () => setAsked(true)} onEdit={edit} />
      }
    >
      <div className="mb-6">
        <RecomputeProgress programme={programme} recompute={recompute} />
      </div>
      <Section title="Versions" note="A version never changes; results name the one they used.">
        <RecipeVersions versions={versions} open={open} inForce={programme.recipe.versionId} onShow={show} />
      </Section>
      <RecipeComparison
        programmeId={programme.id}
        versions={versions}
        open={open}
        against={against}
        onCompare={compare}
      />
      {isAsked ? (
        <UseRecipe
          programme={programme}
          wanted={open}
          onStarted={({ id }) => recompute.follow(id)}
          onClose={() => setAsked(false)}
        />
      ) : null}
    </Page>
  );
};

/** One recipe: its versions, its settings beside another's, and the form for the next. */
export const RecipePage = () => {
  const programmeId = useProgrammeId();
  const { recipeId = "" } = useParams();
  const { data: programme } = useSuspenseQuery(programmeOptions(programmeId));
  const versions = useQuery(recipeVersionsOptions(programmeId, recipeId));
  if (versions.isPending) return <Loading what="Reading the recipe" />;
  if (versions.isError)
    return <ErrorNotice error={versions.error} onRetry={() => void versions.refetch()} isPage />;
  const [newest, ...older] = versions.data;
  // A recipe has a version, or the server says that there is no such recipe.
  if (!newest) return null;
  return <OpenRecipe key={recipeId} programme={programme} versions={[newest, ...older]} />;
};
