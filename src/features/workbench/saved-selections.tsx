import { useQuery } from "@tanstack/react-query";
import { type FormEvent, useState } from "react";
import type { Selection } from "#shared/api/selections.ts";
import type { Cut } from "#shared/catalogue/view.ts";
import { selectionsOptions, useMakeSelection, useSaveSelection } from "#src/api/selections.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { Menu, MenuItem } from "#src/ui/menu.tsx";

interface Props {
  programmeId: string;
  cuts: readonly Cut[];
  onOpen: (cuts: readonly Cut[]) => void;
}

const same = (a: readonly Cut[], b: readonly Cut[]): boolean =>
  JSON.stringify(a.map(question)) === JSON.stringify(b.map(question));
const question = ({ label, expression, blanks }: Cut) => [label, expression, blanks];

const SaveDialog = ({
  programmeId,
  cuts,
  base,
  onDone,
}: {
  programmeId: string;
  cuts: readonly Cut[];
  base: Selection | null;
  onDone: (saved: Selection | null) => void;
}) => {
  const [name, setName] = useState(base?.name ?? "");
  const [note, setNote] = useState(base?.note ?? "");
  const make = useMakeSelection(programmeId);
  const save = useSaveSelection(programmeId);
  const isNextVersion = base !== null && name.trim() === base.name;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const content = { name: name.trim(), note, cuts };
    const done = ({ selection }: { selection: Selection }) => {
      announce(`Saved as ${selection.name}, version ${selection.number}`);
      onDone(selection);
    };
    if (isNextVersion && base)
      save.mutate({ ...content, id: base.id, number: base.number }, { onSuccess: done });
    else make.mutate(content, { onSuccess: done });
  };
  return (
    <Dialog title="Save selection" isOpen onClose={() => onDone(null)}>
      <form onSubmit={submit} className="flex flex-col gap-4">
        <TextInput
          label="Name"
          required
          value={name}
          maxLength={120}
          onChange={(event) => setName(event.target.value)}
          hint={
            isNextVersion
              ? `Saves version ${base.number + 1}; version ${base.number} stays as it is.`
              : "Saves a new selection."
          }
        />
        <TextArea
          label="What it is for"
          value={note}
          maxLength={2000}
          onChange={(event) => setNote(event.target.value)}
        />
        <ErrorNotice error={make.error ?? save.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={() => onDone(null)}>Cancel</Button>
          <Button type="submit" kind="main" isBusy={make.isPending || save.isPending}>
            Save selection
          </Button>
        </div>
      </form>
    </Dialog>
  );
};

/** Opens a saved selection, says when what is on screen differs from it, and saves. */
export const SavedSelections = ({ programmeId, cuts, onOpen }: Props) => {
  const can = useCan();
  const mayRead = can("selection.read");
  const { data: selections = [] } = useQuery({ ...selectionsOptions(programmeId), enabled: mayRead });
  const [openedId, setOpenedId] = useState<string | null>(null);
  const [isSaving, setSaving] = useState(false);
  if (!mayRead) return null;
  const current = selections.find((s) => same(s.cuts, cuts));
  const opened = selections.find((s) => s.id === openedId);
  const open = (selection: Selection) => {
    setOpenedId(selection.id);
    onOpen(selection.cuts);
  };
  return (
    <div className="mt-2 flex flex-wrap items-center gap-x-3 gap-y-1 text-[13px]">
      {selections.length > 0 ? (
        <Menu
          label={
            current ? `Open a selection: ${current.name}, version ${current.number}` : "Open a selection"
          }
          align="left"
          trigger={current ? `${current.name}, version ${current.number}` : "Open a selection"}
          triggerClassName="underline decoration-edge underline-offset-4 hover:decoration-ink"
        >
          {selections.map((selection) => (
            <MenuItem key={selection.id} isChecked={selection === current} onSelect={() => open(selection)}>
              {selection.name}
            </MenuItem>
          ))}
        </Menu>
      ) : null}
      {opened && opened !== current ? (
        <p className="basis-full rounded bg-sel px-2 py-1 text-xs">
          A changed copy of {opened.name}.{" "}
          <button type="button" className="underline" onClick={() => open(opened)}>
            Go back to it
          </button>
        </p>
      ) : null}
      {can("selection.edit") && cuts.length > 0 && !current ? (
        <Button kind="plain" className="px-0!" onClick={() => setSaving(true)}>
          Save selection
        </Button>
      ) : null}
      {isSaving ? (
        <SaveDialog
          programmeId={programmeId}
          cuts={cuts}
          base={opened ?? null}
          onDone={(saved) => {
            setSaving(false);
            if (saved) setOpenedId(saved.id);
          }}
        />
      ) : null}
    </div>
  );
};
