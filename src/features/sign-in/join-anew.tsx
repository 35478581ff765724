import { useNavigate } from "react-router-dom";
import { invitationAcceptBody, type Link } from "#shared/api/session.ts";
import { LIMITS } from "#shared/limits.ts";
import { useAcceptInvitation, useSession } from "#src/api/session.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextInput } from "#src/ui/inputs.tsx";
import { PasswordInput } from "#src/ui/password-input.tsx";
import { joinedProgramme } from "./destination.ts";

interface Props {
  link: Link;
  token: string;
  /** Someone else who is signed in in this browser. */
  signedInAs: string | undefined;
}

/** For someone new: a name and a password, and they are in. */
export const JoinAnew = ({ link, token, signedInAs }: Props) => {
  const navigate = useNavigate();
  const before = useSession();
  const accept = useAcceptInvitation(token);
  const form = useForm({
    schema: invitationAcceptBody,
    initial: { name: "", password: "" },
    send: async (body) => {
      const { session } = await accept.mutateAsync(body);
      navigate(joinedProgramme(before, session, link.programme), { replace: true });
    },
  });
  return (
    <Form form={form}>
      <p className="text-soft">
        You sign in with <span className="font-medium text-ink wrap-anywhere">{link.email}</span> from now on.
        {signedInAs ? ` You are signed in as ${signedInAs} here; joining ends that.` : ""}
      </p>
      <TextInput
        label="Your name"
        name="name"
        autoComplete="name"
        hint="Stands beside what you do in the programme."
        value={form.values.name}
        error={form.fields.name}
        onChange={(event) => form.set({ name: event.target.value })}
      />
      {/* Password managers keep the new password under this name. */}
      <input type="text" autoComplete="username" value={link.email} readOnly hidden />
      <PasswordInput
        label="Password"
        name="password"
        autoComplete="new-password"
        hint={`At least ${LIMITS.passwordCharacters.least} characters; a few words in a row are good.`}
        value={form.values.password}
        error={form.fields.password}
        onChange={(event) => form.set({ password: event.target.value })}
      />
      <div>
        <Button type="submit" kind="main" isBusy={form.isBusy}>
          Join
        </Button>
      </div>
    </Form>
  );
};
