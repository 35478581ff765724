import { useState } from "react";
import type { Merit } from "#shared/api/merits.ts";
import { ApiError } from "#src/api/client.ts";
import { useMakeMerit, useSaveMerit } from "#src/api/merits.ts";
import { useForm } from "#src/lib/form.ts";
import { termColor } from "#src/lib/merit-strip.tsx";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { draftMerit, meritDraftSchema, newTerm, readFigure, type TermDraft } from "./term-draft.ts";
import { TermEditor } from "./term-editor.tsx";
import { WeightBar } from "./weight-bar.tsx";

interface Props {
  programmeId: string;
  /** The version that is open; null for a new figure of merit. */
  merit: Merit | null;
  mayEdit: boolean;
  mostTerms: number;
  onSaved: (merit: Merit) => void;
  /** Begins again from the newest version. */
  onReopen: () => void;
}

/** Each term's part of all weights; null where a weight is no figure, or all are zero. */
export const weightShares = (terms: readonly Pick<TermDraft, "weight">[]): (number | null)[] => {
  const weights = terms.map((term) => readFigure(term.weight));
  const sum = weights.reduce<number>((total, w) => total + (typeof w === "number" ? Math.max(0, w) : 0), 0);
  return weights.map((w) => (typeof w === "number" && sum > 0 ? Math.max(0, w) / sum : null));
};

const moved = <T,>(list: readonly T[], from: number, by: -1 | 1): readonly T[] => {
  const next = [...list];
  const [item] = next.splice(from, 1);
  if (item !== undefined) next.splice(from + by, 0, item);
  return next;
};

const useMeritForm = ({ programmeId, merit: newest, onSaved }: Props) => {
  const make = useMakeMerit(programmeId);
  const save = useSaveMerit(programmeId);
  // The version that typing began from: a newer one that arrives meanwhile must not pass for it.
  const [merit] = useState(newest);
  const [initial] = useState(() => draftMerit(merit));
  const form = useForm({
    schema: meritDraftSchema,
    initial,
    send: async (body) => {
      const { merit: saved } = merit
        ? await save.mutateAsync({ id: merit.id, number: merit.number, ...body })
        : await make.mutateAsync(body);
      announce(`${saved.name}, version ${saved.number}, is saved.`);
      onSaved(saved);
    },
  });
  const isOvertaken =
    (merit !== null && newest !== null && newest.number > merit.number) ||
    (form.problem instanceof ApiError && form.problem.code === "changed-meanwhile");
  return { form, merit, isOvertaken, isChanged: form.values !== initial };
};

interface OvertakenProps {
  newest: Merit | null;
  isChanged: boolean;
  onOpen: () => void;
}

/** Says that another person saved meanwhile, and what can be done with what stands here. */
const Overtaken = ({ newest, isChanged, onOpen }: OvertakenProps) => (
  <div role="status" className="rounded border border-rule bg-sheet p-3">
    <p>
      {newest
        ? `${newest.savedBy.name} saved version ${newest.number} after you opened this one.`
        : "A newer version was saved after you opened this one."}{" "}
      {isChanged ? "What you typed is still here; saving it under another name keeps both." : ""}
    </p>
    <Button className="mt-2" onClick={onOpen}>
      Open the newer version
    </Button>
  </div>
);

/** Reads and changes a figure of merit; saving makes a version and leaves those before it as they are. */
export const MeritEditor = (props: Props) => {
  const { programmeId, merit: newest, mayEdit, mostTerms, onSaved, onReopen } = props;
  const { form, merit, isOvertaken, isChanged } = useMeritForm(props);
  const makeCopy = useMakeMerit(programmeId);
  const { name, note, terms } = form.values;
  const shares = weightShares(terms);
  const change = (index: number, part: Partial<TermDraft>) =>
    form.set({ terms: terms.map((term, i) => (i === index ? { ...term, ...part } : term)) });
  const saveCopy = async () => {
    const parsed = meritDraftSchema.safeParse({
      ...form.values,
      name: name === merit?.name ? `${name} (copy)` : name,
    });
    if (!parsed.success) return form.submit();
    const { merit: saved } = await makeCopy.mutateAsync(parsed.data);
    announce(`${saved.name} is saved.`);
    onSaved(saved);
  };
  return (
    <Form form={form} aria-label={merit ? merit.name : "New figure of merit"}>
      {isOvertaken ? <Overtaken newest={newest} isChanged={isChanged} onOpen={onReopen} /> : null}
      <div className="grid gap-4 md:grid-cols-2">
        <TextInput
          label="Name"
          name="name"
          autoComplete="off"
          disabled={!mayEdit}
          value={name}
          error={form.fields.name}
          onChange={(event) => form.set({ name: event.target.value })}
        />
        <TextArea
          label="What it is for"
          name="note"
          rows={2}
          disabled={!mayEdit}
          value={note}
          error={form.fields.note}
          onChange={(event) => form.set({ note: event.target.value })}
        />
      </div>
      <WeightBar terms={terms} shares={shares} />
      <ol>
        {terms.map((draft, index) => (
          <TermEditor
            key={draft.key}
            draft={draft}
            index={index}
            count={terms.length}
            share={shares[index] ?? null}
            color={termColor(index)}
            fields={form.fields}
            disabled={!mayEdit}
            onChange={(part) => change(index, part)}
            onMove={(by) => form.set({ terms: moved(terms, index, by) })}
            onRemove={() => form.set({ terms: terms.filter((_, i) => i !== index) })}
          />
        ))}
      </ol>
      {form.fields.terms ? <p className="text-xs text-mark">◆ {form.fields.terms}</p> : null}
      {mayEdit ? (
        <div className="sticky bottom-0 -mx-5 flex flex-wrap items-center gap-2 border-t border-rule bg-paper px-5 py-3">
          <Button
            disabled={terms.length >= mostTerms}
            onClick={() => form.set({ terms: [...terms, newTerm()] })}
          >
            Add a term
          </Button>
          <span className="grow" />
          {merit && (isChanged || isOvertaken) ? (
            <Button isBusy={makeCopy.isPending} onClick={() => void saveCopy().catch(() => undefined)}>
              Save under another name
            </Button>
          ) : null}
          <Button
            type="submit"
            kind="main"
            isBusy={form.isBusy}
            disabled={(merit !== null && !isChanged) || isOvertaken}
          >
            {merit ? `Save as version ${merit.number + 1}` : "Save figure of merit"}
          </Button>
        </div>
      ) : null}
    </Form>
  );
};
