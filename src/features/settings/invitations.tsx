import { useQuery } from "@tanstack/react-query";
import type { Invitation } from "#shared/api/programmes.ts";
import { ROLE_LABELS } from "#shared/policy/roles.ts";
import { invitationsOptions, useWithdrawInvitation } from "#src/api/programmes.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";

const STATES: Record<Invitation["state"], string> = {
  open: "open",
  used: "accepted",
  expired: "ended",
  withdrawn: "withdrawn",
};

interface RowProps {
  invitation: Invitation;
  isBusy: boolean;
  onWithdraw: () => void;
}

const InvitationRow = ({ invitation, isBusy, onWithdraw }: RowProps) => (
  <tr>
    <td className="min-w-24 wrap-anywhere">
      {invitation.email}
      <span className="block text-[13px] text-soft">
        {invitation.roles.map((role) => ROLE_LABELS[role]).join(", ")}
      </span>
    </td>
    <td>{STATES[invitation.state]}</td>
    <td>
      <Moment at={invitation.expiresAt} isShort />
    </td>
    <td>
      {invitation.state === "open" ? (
        <Button
          isBusy={isBusy}
          aria-label={`Withdraw the invitation to ${invitation.email}`}
          onClick={onWithdraw}
        >
          Withdraw
        </Button>
      ) : null}
    </td>
  </tr>
);

const HEADS = [{ label: "To" }, { label: "State" }, { label: "Ends" }, { label: "Changes" }];

/** What was sent; open ones can be withdrawn. */
export const Invitations = ({ programmeId }: { programmeId: string }) => {
  const invitations = useQuery(invitationsOptions(programmeId));
  const withdraw = useWithdrawInvitation(programmeId);
  if (invitations.isPending) return <Loading />;
  if (!invitations.data)
    return <ErrorNotice error={invitations.error} onRetry={() => void invitations.refetch()} />;
  if (invitations.data.length === 0) return null;
  return (
    <div className="mt-4">
      <SectionTitle>Invitations sent</SectionTitle>
      <ErrorNotice error={withdraw.error} />
      <LedgerTable caption="Invitations sent" heads={HEADS}>
        {invitations.data.map((invitation) => (
          <InvitationRow
            key={invitation.id}
            invitation={invitation}
            isBusy={withdraw.isPending && withdraw.variables === invitation.id}
            onWithdraw={() => withdraw.mutate(invitation.id)}
          />
        ))}
      </LedgerTable>
    </div>
  );
};
