import { useState } from "react";
import { Link } from "react-router-dom";
import { type Invitation, invitationBody } from "#shared/api/programmes.ts";
import type { Role } from "#shared/policy/roles.ts";
import { useInvite } from "#src/api/programmes.ts";
import { useSession } from "#src/api/session.ts";
import { paths } from "#src/app/paths.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextInput } from "#src/ui/inputs.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { RoleBoxes } from "./role-boxes.tsx";

const NO_ROLES: Role[] = [];

const Sent = ({ invitation }: { invitation: Invitation }) => {
  const { person, installation } = useSession();
  return (
    <>
      The invitation to <span className="font-medium wrap-anywhere">{invitation.email}</span> is on its way;
      it ends at <Moment at={invitation.expiresAt} />.
      {installation.hasMailbox && person?.isInstallationAdministrator ? (
        <>
          {" "}
          <Link className="underline underline-offset-4" to={paths.mailbox.to()}>
            Open the local mailbox
          </Link>
        </>
      ) : null}
    </>
  );
};

/** Invites by e-mail; an earlier open invitation to the same address ends with it. */
export const InviteForm = ({ programmeId }: { programmeId: string }) => {
  const [sent, setSent] = useState<Invitation>();
  const invite = useInvite(programmeId);
  const form = useForm({
    schema: invitationBody,
    initial: { email: "", roles: NO_ROLES },
    send: async (body) => {
      setSent(undefined);
      setSent((await invite.mutateAsync(body)).invitation);
      form.set({ email: "", roles: NO_ROLES });
    },
  });
  return (
    <Form form={form} className="max-w-xl">
      <TextInput
        label="E-mail address"
        name="email"
        type="email"
        autoComplete="off"
        autoCapitalize="none"
        value={form.values.email}
        error={form.fields.email}
        onChange={(event) => form.set({ email: event.target.value })}
      />
      <RoleBoxes
        roles={form.values.roles}
        error={form.fields.roles}
        onChange={(roles) => form.set({ roles })}
      />
      <div>
        <Button type="submit" isBusy={form.isBusy}>
          Send invitation
        </Button>
      </div>
      <p role="status">{sent ? <Sent invitation={sent} /> : null}</p>
    </Form>
  );
};
