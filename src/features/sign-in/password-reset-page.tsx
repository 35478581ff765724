import { useNavigate } from "react-router-dom";
import { type Link, passwordResetBody } from "#shared/api/session.ts";
import { LIMITS } from "#shared/limits.ts";
import { useResetPassword } from "#src/api/session.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { PasswordInput } from "#src/ui/password-input.tsx";
import { homeOf } from "./destination.ts";
import { LinkGate } from "./link-gate.tsx";

const ResetForm = ({ link, token }: { link: Link; token: string }) => {
  const navigate = useNavigate();
  const reset = useResetPassword(token);
  const form = useForm({
    schema: passwordResetBody,
    initial: { password: "" },
    send: async (body) => {
      const { session } = await reset.mutateAsync(body);
      announce("The new password is set, and you are signed in.");
      navigate(homeOf(session), { replace: true });
    },
  });
  return (
    <Form form={form}>
      <p className="text-soft">
        For <span className="font-medium text-ink wrap-anywhere">{link.email}</span>. Sessions that are open
        elsewhere end.
      </p>
      {/* Password managers keep the new password under this name. */}
      <input type="text" autoComplete="username" value={link.email} readOnly hidden />
      <PasswordInput
        label="New password"
        name="password"
        autoComplete="new-password"
        hint={`At least ${LIMITS.passwordCharacters.least} characters; a few words in a row are good.`}
        value={form.values.password}
        error={form.fields.password}
        onChange={(event) => form.set({ password: event.target.value })}
      />
      <div>
        <Button type="submit" kind="main" isBusy={form.isBusy}>
          Set password and sign in
        </Button>
      </div>
    </Form>
  );
};

export const PasswordResetPage = () => (
  <LinkGate kind="password-resets" title={() => "A new password"}>
    {(link, token) => <ResetForm link={link} token={token} />}
  </LinkGate>
);
