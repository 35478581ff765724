import { useState } from "react";
import { z } from "zod";
import { type Programme, programmePatchBody } from "#shared/api/programmes.ts";
import { ApiError } from "#src/api/client.ts";
import { useEditProgramme } from "#src/api/programmes.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { ChangedMeanwhile } from "./changed-meanwhile.tsx";

const inForce = z.object({ version: z.int(), name: z.string(), description: z.string() });
type InForce = z.infer<typeof inForce>;

/** What someone else saved since the form was opened, where that is why ours was refused. */
const theirsIn = (problem: unknown): InForce | undefined =>
  problem instanceof ApiError && problem.code === "changed-meanwhile"
    ? inForce.safeParse(problem.details).data
    : undefined;

const useAboutForm = (programme: Programme) => {
  const edit = useEditProgramme(programme.id);
  // The version that was on screen when typing began: a newer one that arrives meanwhile must not pass for it.
  const [opened, setOpened] = useState<InForce>(programme);
  const form = useForm({
    schema: programmePatchBody.required({ name: true }),
    initial: { name: programme.name, description: programme.description, version: programme.version },
    send: async (body) => {
      const saved = (await edit.mutateAsync(body)).programme;
      setOpened(saved);
      form.set({ name: saved.name, description: saved.description, version: saved.version });
      announce("The programme is saved.");
    },
  });
  const isChanged = form.values.name !== opened.name || form.values.description !== opened.description;
  const goOnFrom = (theirs: InForce, keep: Partial<InForce>) => {
    setOpened(theirs);
    form.set({ name: theirs.name, description: theirs.description, version: theirs.version, ...keep });
    form.forget();
  };
  return { form, isChanged, goOnFrom };
};

/** Name and description; what two people change at once is put before the second of them. */
export const AboutForm = ({ programme }: { programme: Programme }) => {
  const { form, isChanged, goOnFrom } = useAboutForm(programme);
  const theirs = theirsIn(form.problem);
  const { name, description } = form.values;
  return (
    <Form form={form} className="max-w-xl">
      {theirs ? (
        <ChangedMeanwhile
          theirs={theirs}
          yours={{ name, description }}
          onTheirs={() => goOnFrom(theirs, {})}
          onYours={() => goOnFrom(theirs, { name, description })}
        />
      ) : null}
      <TextInput
        label="Name"
        name="name"
        autoComplete="off"
        value={name}
        error={form.fields.name}
        onChange={(event) => form.set({ name: event.target.value })}
      />
      <TextArea
        label="Description"
        name="description"
        value={description}
        error={form.fields.description}
        onChange={(event) => form.set({ description: event.target.value })}
      />
      <div>
        <Button type="submit" isBusy={form.isBusy} disabled={!isChanged || theirs !== undefined}>
          Save programme
        </Button>
      </div>
    </Form>
  );
};
