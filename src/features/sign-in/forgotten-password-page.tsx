import { useState } from "react";
import { Link } from "react-router-dom";
import { passwordResetRequestBody } from "#shared/api/session.ts";
import { LIMITS } from "#shared/limits.ts";
import { useRequestPasswordReset, useSession } from "#src/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextInput } from "#src/ui/inputs.tsx";
import { asClock, useWait } from "./use-wait.ts";
import { VisitorFrame } from "./visitor-frame.tsx";

const Sent = ({ email }: { email: string }) => {
  const { installation } = useSession();
  return (
    <div role="status">
      <p>
        If <span className="font-medium wrap-anywhere">{email}</span> can sign in here, a link is on its way
        to it. The link works once, within {LIMITS.passwordResetHours} hour.
      </p>
      {installation.hasMailbox ? (
        <p className="mt-3 text-[13px] text-soft">
          This installation sends no mail: it keeps it in the local mailbox, which an administrator of the
          installation can open from their menu.
        </p>
      ) : (
        <p className="mt-3 text-[13px] text-soft">
          Nothing there after some minutes? Look among the unwanted mail, and check the address.
        </p>
      )}
    </div>
  );
};

const RequestForm = ({ onSent }: { onSent: (email: string) => void }) => {
  const ask = useRequestPasswordReset();
  const form = useForm({
    schema: passwordResetRequestBody,
    initial: { email: "" },
    send: async (body) => {
      await ask.mutateAsync(body);
      onSent(body.email);
    },
  });
  const wait = useWait(form.problem);
  return (
    <Form form={form}>
      <p className="text-soft">We send a link by which you choose a new one.</p>
      <TextInput
        label="E-mail address"
        name="email"
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        value={form.values.email}
        error={form.fields.email}
        onChange={(event) => form.set({ email: event.target.value })}
      />
      <div>
        <Button type="submit" kind="main" isBusy={form.isBusy} disabled={wait > 0}>
          {wait > 0 ? `Wait ${asClock(wait)}` : "Send the link"}
        </Button>
      </div>
    </Form>
  );
};

export const ForgottenPasswordPage = () => {
  const [sentTo, setSentTo] = useState<string>();
  return (
    <VisitorFrame title="Forgotten password">
      {sentTo === undefined ? <RequestForm onSent={setSentTo} /> : <Sent email={sentTo} />}
      <p className="mt-5 text-[13px]">
        <Link className="underline decoration-edge underline-offset-4" to={paths.signIn.to()}>
          Back to signing in
        </Link>
      </p>
    </VisitorFrame>
  );
};
