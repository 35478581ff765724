import { useNavigate } from "react-router-dom";
import { programmeCreateBody } from "#shared/api/programmes.ts";
import { useCreateProgramme } from "#src/api/programmes.ts";
import { paths } from "#src/app/paths.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";

const CreateForm = ({ onClose }: { onClose: () => void }) => {
  const navigate = useNavigate();
  const create = useCreateProgramme();
  const form = useForm({
    schema: programmeCreateBody,
    initial: { name: "", description: "" },
    send: async (body) => {
      const { programme } = await create.mutateAsync(body);
      navigate(paths.programme.to(programme.id));
    },
  });
  return (
    <Form form={form}>
      <p className="text-soft">You become its first administrator and can invite the others.</p>
      <TextInput
        label="Name"
        name="name"
        autoComplete="off"
        value={form.values.name}
        error={form.fields.name}
        onChange={(event) => form.set({ name: event.target.value })}
      />
      <TextArea
        label="Description"
        name="description"
        hint="What the team is after; may stay empty."
        value={form.values.description}
        error={form.fields.description}
        onChange={(event) => form.set({ description: event.target.value })}
      />
      <div className="mt-2 flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Not now</Button>
        <Button type="submit" kind="main" isBusy={form.isBusy}>
          Make programme
        </Button>
      </div>
    </Form>
  );
};

export const CreateProgramme = ({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) => (
  <Dialog title="A new programme" isOpen={isOpen} onClose={onClose}>
    <CreateForm onClose={onClose} />
  </Dialog>
);
