import type { Invitation, Member } from "#shared/api/programmes.ts";
import type { Role } from "#shared/policy/roles.ts";
import type { OneTimeLink } from "../database/entities/one-time-link.entity.ts";
import type { MemberRow } from "./queries.ts";

export const presentMember = (row: MemberRow): Member => ({
  person: { id: row.personId, name: row.name, email: row.email },
  roles: row.roles,
  since: row.since.toISOString(),
  state: row.isActive ? "active" : "deactivated",
});

const stateOf = (link: OneTimeLink, now: Date): Invitation["state"] => {
  if (link.usedAt) return "used";
  if (link.withdrawnAt) return "withdrawn";
  return link.expiresAt <= now ? "expired" : "open";
};

export const presentInvitation = (link: OneTimeLink, now: Date): Invitation => ({
  id: link.id,
  email: link.email,
  roles: (link.roles ?? []) as Role[],
  createdAt: link.createdAt.toISOString(),
  expiresAt: link.expiresAt.toISOString(),
  state: stateOf(link, now),
});
