import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { Member } from "#shared/api/programmes.ts";
import { ROLE_LABELS } from "#shared/policy/roles.ts";
import { membersOptions } from "#src/api/programmes.ts";
import { useSession } from "#src/api/session.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { RemoveDialog } from "./remove-dialog.tsx";
import { RolesDialog } from "./roles-dialog.tsx";

type Doing = { what: "roles" | "remove"; member: Member };

interface RowProps {
  member: Member;
  isOneself: boolean;
  /** Absent for who may only look. */
  onDo: ((doing: Doing) => void) | undefined;
}

const MemberRow = ({ member, isOneself, onDo }: RowProps) => (
  <tr>
    <td className="min-w-24 wrap-anywhere">
      <span className="font-medium">{member.person.name}</span>
      {isOneself ? <span className="text-soft"> (you)</span> : null}{" "}
      {member.state === "deactivated" ? <Pill tone="warning">cannot sign in</Pill> : null}
      <span className="block text-[13px] text-soft">{member.person.email}</span>
    </td>
    <td>{member.roles.map((role) => ROLE_LABELS[role]).join(", ")}</td>
    <td className="max-sm:hidden">
      <Moment at={member.since} isShort />
    </td>
    {onDo ? (
      <td>
        <span className="flex gap-1.5 max-sm:flex-col">
          <Button
            aria-label={`Change the roles of ${member.person.name}`}
            onClick={() => onDo({ what: "roles", member })}
          >
            Roles
          </Button>
          {isOneself ? null : (
            <Button
              aria-label={`Remove ${member.person.name}`}
              onClick={() => onDo({ what: "remove", member })}
            >
              Remove
            </Button>
          )}
        </span>
      </td>
    ) : null}
  </tr>
);

/** Who is in the programme, as what, since when. */
export const Members = ({ programmeId }: { programmeId: string }) => {
  const can = useCan();
  const { person } = useSession();
  const members = useQuery(membersOptions(programmeId));
  const [doing, setDoing] = useState<Doing | null>(null);
  const stop = () => setDoing(null);
  if (members.isPending) return <Loading />;
  if (!members.data) return <ErrorNotice error={members.error} onRetry={() => void members.refetch()} />;
  const heads = [{ label: "Member" }, { label: "Roles" }, { label: "Since", isWideOnly: true }];
  return (
    <>
      <LedgerTable
        caption="Members of the programme"
        heads={can("member.edit") ? [...heads, { label: "Changes" }] : heads}
      >
        {members.data.map((member) => (
          <MemberRow
            key={member.person.id}
            member={member}
            isOneself={member.person.id === person?.id}
            onDo={can("member.edit") ? setDoing : undefined}
          />
        ))}
      </LedgerTable>
      <RolesDialog
        programmeId={programmeId}
        member={doing?.what === "roles" ? doing.member : null}
        onClose={stop}
      />
      <RemoveDialog
        programmeId={programmeId}
        member={doing?.what === "remove" ? doing.member : null}
        onClose={stop}
      />
    </>
  );
};
