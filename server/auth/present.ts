import { type Link, type Session, theme } from "#shared/api/session.ts";
import type { OneTimeLink } from "../database/entities/one-time-link.entity.ts";
import type { Person } from "../database/entities/person.entity.ts";
import type { OwnProgramme } from "./queries.ts";

export const presentSession = (
  person: Person | null,
  programmes: OwnProgramme[],
  more: Pick<Session, "csrfToken" | "installation">,
): Session => ({
  person: person && {
    id: person.id,
    name: person.name,
    email: person.email,
    isInstallationAdministrator: person.isInstallationAdministrator,
    theme: theme.safeParse(person.theme).data ?? null,
  },
  programmes,
  ...more,
});

export const presentLink = (link: OneTimeLink, programme: string | null, hasAccount: boolean): Link => ({
  purpose: link.purpose,
  email: link.email,
  programme,
  expiresAt: link.expiresAt.toISOString(),
  hasAccount,
});
