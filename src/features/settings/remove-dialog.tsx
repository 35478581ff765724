import type { Member } from "#shared/api/programmes.ts";
import { useRemoveMember } from "#src/api/programmes.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { announce } from "#src/ui/live-region.tsx";

interface Props {
  programmeId: string;
  onClose: () => void;
}

const Removing = ({ programmeId, member, onClose }: Props & { member: Member }) => {
  const remove = useRemoveMember(programmeId);
  const onDone = () => {
    announce(`${member.person.name} is no longer a member.`);
    onClose();
  };
  return (
    <>
      <p>
        {member.person.name} will see nothing of this programme any more. What they did stays, with their name
        in the logbook; you can invite them again.
      </p>
      <div className="mt-4">
        <ErrorNotice error={remove.error} />
      </div>
      <div className="mt-4 flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Keep member</Button>
        <Button
          kind="danger"
          isBusy={remove.isPending}
          onClick={() => remove.mutate(member.person.id, { onSuccess: onDone })}
        >
          Remove member
        </Button>
      </div>
    </>
  );
};

export const RemoveDialog = ({ member, ...props }: Props & { member: Member | null }) => (
  <Dialog title={`Remove ${member?.person.name ?? ""}`} isOpen={member !== null} onClose={props.onClose}>
    {member ? <Removing member={member} {...props} /> : null}
  </Dialog>
);
