import { type Member, rolesBody } from "#shared/api/programmes.ts";
import { useSetRoles } from "#src/api/programmes.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Form } from "#src/ui/form.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { RoleBoxes } from "./role-boxes.tsx";

interface Props {
  programmeId: string;
  onClose: () => void;
}

const RolesForm = ({ programmeId, member, onClose }: Props & { member: Member }) => {
  const setRoles = useSetRoles(programmeId);
  const form = useForm({
    schema: rolesBody,
    initial: { roles: member.roles },
    send: async ({ roles }) => {
      await setRoles.mutateAsync({ personId: member.person.id, roles });
      announce(`The roles of ${member.person.name} are saved.`);
      onClose();
    },
  });
  return (
    <Form form={form}>
      <RoleBoxes
        roles={form.values.roles}
        error={form.fields.roles}
        onChange={(roles) => form.set({ roles })}
      />
      <div className="mt-2 flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Leave as it is</Button>
        <Button type="submit" kind="main" isBusy={form.isBusy}>
          Save roles
        </Button>
      </div>
    </Form>
  );
};

export const RolesDialog = ({ member, ...props }: Props & { member: Member | null }) => (
  <Dialog title={`Roles of ${member?.person.name ?? ""}`} isOpen={member !== null} onClose={props.onClose}>
    {member ? <RolesForm member={member} {...props} /> : null}
  </Dialog>
);
