import { meBody } from "#shared/api/session.ts";
import { useChangeMe } from "#src/api/session.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";

export const NameForm = ({ name }: { name: string }) => {
  const change = useChangeMe();
  const form = useForm({
    schema: meBody.required({ name: true }).pick({ name: true }),
    initial: { name },
    send: async (body) => {
      const { session } = await change.mutateAsync(body);
      form.set({ name: session.person?.name ?? body.name });
      announce("Your name is saved.");
    },
  });
  return (
    <Form form={form} className="max-w-md">
      <TextInput
        label="Name"
        name="name"
        autoComplete="name"
        value={form.values.name}
        error={form.fields.name}
        onChange={(event) => form.set({ name: event.target.value })}
      />
      <div>
        <Button type="submit" isBusy={form.isBusy} disabled={form.values.name === name}>
          Save name
        </Button>
      </div>
    </Form>
  );
};
