import { useState } from "react";
import { passwordChangeBody } from "#shared/api/session.ts";
import { LIMITS } from "#shared/limits.ts";
import { useChangePassword } from "#src/api/session.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { PasswordInput } from "#src/ui/password-input.tsx";

const EMPTY = { current: "", next: "" };

export const PasswordForm = ({ email }: { email: string }) => {
  const [isChanged, setChanged] = useState(false);
  const change = useChangePassword();
  const form = useForm({
    schema: passwordChangeBody,
    initial: EMPTY,
    send: async (body) => {
      setChanged(false);
      await change.mutateAsync(body);
      form.set(EMPTY);
      setChanged(true);
    },
  });
  return (
    <Form form={form} className="max-w-md">
      {/* Password managers keep the new password under this name. */}
      <input type="text" autoComplete="username" value={email} readOnly hidden />
      <PasswordInput
        label="Present password"
        name="current"
        autoComplete="current-password"
        value={form.values.current}
        error={form.fields.current}
        onChange={(event) => form.set({ current: event.target.value })}
      />
      <PasswordInput
        label="New password"
        name="next"
        autoComplete="new-password"
        hint={`At least ${LIMITS.passwordCharacters.least} characters; a few words in a row are good.`}
        value={form.values.next}
        error={form.fields.next}
        onChange={(event) => form.set({ next: event.target.value })}
      />
      <div className="flex flex-wrap items-center gap-3">
        <Button type="submit" isBusy={form.isBusy}>
          Change password
        </Button>
        <span role="status">{isChanged ? "The new password is set." : ""}</span>
      </div>
    </Form>
  );
};
