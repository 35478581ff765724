import { listPatchBody, type TargetList } from "#shared/api/lists.ts";
import { useEditList } from "#src/api/lists.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";

interface Props {
  programmeId: string;
  list: TargetList;
  onClose: () => void;
}

const EditForm = ({ programmeId, list, onClose }: Props) => {
  const edit = useEditList(programmeId, list.id);
  const form = useForm({
    schema: listPatchBody,
    initial: { name: list.name, note: list.note, version: list.version },
    send: async (body) => {
      await edit.mutateAsync(body);
      announce("The list is saved.");
      onClose();
    },
  });
  return (
    <Form form={form} aria-label="Name and note of the list">
      <TextInput
        label="Name"
        name="name"
        autoComplete="off"
        value={form.values.name}
        error={form.fields.name}
        onChange={(event) => form.set({ name: event.target.value })}
      />
      <TextArea
        label="Note"
        name="note"
        value={form.values.note}
        error={form.fields.note}
        onChange={(event) => form.set({ note: event.target.value })}
      />
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Leave as it is</Button>
        <Button type="submit" kind="main" isBusy={form.isBusy}>
          Save list
        </Button>
      </div>
    </Form>
  );
};

/** Name and note of a list. */
export const EditDialog = (props: Props) => (
  <Dialog title="Name and note" isOpen onClose={props.onClose}>
    <EditForm {...props} />
  </Dialog>
);
