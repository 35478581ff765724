import { useRef, useState } from "react";
import type { Recipe } from "#shared/api/recipes.ts";
import { useMakeRecipe, useSaveRecipe } from "#src/api/recipes.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { draftOfRecipe, recipeDraftSchema, wrongAmongChanged } from "./recipe-draft.ts";
import { RecipeFields } from "./recipe-fields.tsx";

interface Props {
  programmeId: string;
  /** The version that its settings start from. */
  from: Recipe;
  /** Number of the newest version when the form is opened; null for a copy, which is a recipe of its own. */
  newest: number | null;
  onSaved: (saved: Recipe) => void;
  onClose: () => void;
}

const useRecipeForm = ({ programmeId, from, newest, onSaved }: Props) => {
  const make = useMakeRecipe(programmeId);
  const save = useSaveRecipe(programmeId);
  // What was on screen when typing began: a newer version that arrives meanwhile must not pass for it.
  const [number] = useState(newest);
  const [opened] = useState(() =>
    draftOfRecipe(newest === null ? { ...from, name: `${from.name}, copy` } : { ...from, note: "" }),
  );
  /** Set by the button that sends the form: whether a recipe of its own is wanted instead of a version. */
  const isCopy = useRef(false);
  const form = useForm({
    schema: recipeDraftSchema,
    initial: opened,
    send: async (body) => {
      const { recipe } =
        number === null || isCopy.current
          ? await make.mutateAsync(body)
          : await save.mutateAsync({ id: from.id, number, ...body });
      announce(`Version ${recipe.number} of ${recipe.name} is saved.`);
      onSaved(recipe);
    },
  });
  const wrong = { ...wrongAmongChanged(form.values, opened), ...form.fields };
  const isChanged = JSON.stringify(form.values) !== JSON.stringify(opened);
  return { form, wrong, number, isCopy, isChanged };
};

/** A new version of a recipe, or a copy of it, setting by setting; what it was made from stays as it is. */
export const RecipeEditor = (props: Props) => {
  const { form, wrong, number, isCopy, isChanged } = useRecipeForm(props);
  const { values } = form;
  return (
    <Form form={form} aria-label="Settings of the recipe">
      <div className="flex max-w-xl flex-col gap-4">
        <TextInput
          label="Name"
          name="name"
          autoComplete="off"
          value={values.name}
          error={wrong.name}
          onChange={(event) => form.set({ name: event.target.value })}
        />
        <TextArea
          label="What it is for, or what changed"
          name="note"
          rows={2}
          value={values.note}
          error={wrong.note}
          onChange={(event) => form.set({ note: event.target.value })}
        />
      </div>
      <div>
        <RecipeFields form={form} wrong={wrong} />
      </div>
      <div className="sticky bottom-0 flex flex-wrap gap-2 border-t border-rule bg-paper py-3">
        <Button
          kind="main"
          type="submit"
          isBusy={form.isBusy}
          disabled={number !== null && !isChanged}
          onClick={() => {
            isCopy.current = false;
          }}
        >
          {number === null ? "Make recipe" : `Save version ${number + 1}`}
        </Button>
        {number === null ? null : (
          <Button
            type="submit"
            disabled={form.isBusy}
            onClick={() => {
              isCopy.current = true;
            }}
          >
            Save as a new recipe
          </Button>
        )}
        <Button onClick={props.onClose}>Not now</Button>
      </div>
    </Form>
  );
};
