import type { Role } from "#shared/policy/roles.ts";
import { createLink } from "../auth/one-time-links.ts";
import { programmeName } from "../auth/queries.ts";
import { OneTimeLink } from "../database/entities/one-time-link.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { conflict, notFound } from "../errors.ts";
import type { Caller } from "../http/route.ts";
import { writeLine } from "../logbook/service.ts";
import { invitationMail } from "../mail/messages.ts";
import { canMail, mailNotSetUp, queueMail } from "../mail/service.ts";
import { inOrder } from "./membership.ts";
import { invitationsOf, lockInvitation, membersOf } from "./queries.ts";

export const listInvitations = (deps: Deps, programmeId: string): Promise<OneTimeLink[]> =>
  invitationsOf(deps.db.manager, programmeId);

/** Sends a link by which someone joins with those roles. An earlier open one to the same address ends. */
export const invite = async (
  deps: Deps,
  caller: Caller,
  programmeId: string,
  input: { email: string; roles: readonly Role[] },
): Promise<OneTimeLink> => {
  if (!canMail(deps)) throw mailNotSetUp();
  const email = input.email.trim().toLowerCase();
  const roles = inOrder(input.roles);
  return inTransaction(deps.db, async (tx) => {
    const members = await membersOf(tx, programmeId);
    if (members.some((member) => member.email === email))
      throw conflict("already-member", `${email} is a member of this programme already.`, {
        hint: "Change the roles of that member instead.",
      });
    const programme = (await programmeName(tx, programmeId)) ?? "";
    const { id, token } = await createLink(
      tx,
      { purpose: "invitation", email, personId: null, programmeId, roles, madeBy: caller.id },
      deps.now(),
    );
    await queueMail(tx, deps, invitationMail(deps, email, { programme, invitedBy: caller.name, token }));
    await writeLine(tx, {
      programmeId,
      person: caller,
      action: "invitation.make",
      subject: { type: "invitation", id, name: email },
      after: { email, roles },
      at: deps.now(),
    });
    return tx.findOneByOrFail(OneTimeLink, { id });
  });
};

/** Withdrawing one that was withdrawn before changes nothing. */
export const withdrawInvitation = async (
  deps: Deps,
  caller: Caller,
  programmeId: string,
  id: string,
): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    const link = /^[0-9]{1,19}$/.test(id) ? await lockInvitation(tx, programmeId, id) : null;
    if (!link) throw notFound("This invitation");
    if (link.usedAt)
      throw conflict("invitation-used", `${link.email} has accepted this invitation already.`, {
        hint: "Remove the member instead.",
      });
    if (link.withdrawnAt) return;
    await tx.update(OneTimeLink, { id }, { withdrawnAt: deps.now() });
    await writeLine(tx, {
      programmeId,
      person: caller,
      action: "invitation.withdraw",
      subject: { type: "invitation", id, name: link.email },
      before: { email: link.email, roles: link.roles },
      at: deps.now(),
    });
  });
};
