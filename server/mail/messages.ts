import { LIMITS } from "#shared/limits.ts";
import type { Deps } from "../deps.ts";
import type { Message } from "./service.ts";

/** A name may hold anything; a mail's header may not hold line breaks. */
const oneLine = (text: string): string => text.replace(/\s+/g, " ").trim();

export const invitationMail = (
  deps: Deps,
  to: string,
  { programme, invitedBy, token }: { programme: string; invitedBy: string; token: string },
): Message => ({
  to,
  subject: oneLine(`Invitation to the programme ${programme}`).slice(0, 200),
  body: `${oneLine(invitedBy)} invites you to the programme “${oneLine(programme)}” in Shortlight.

Open this link to join. It works once, within ${LIMITS.invitationDays} days:

${deps.config.publicUrl}/invitations/${token}

If you did not expect this, do nothing.
`,
});

export const passwordResetMail = (deps: Deps, to: string, token: string): Message => ({
  to,
  subject: "A new password for Shortlight",
  body: `Someone, probably you, asked for a new password for this address.

Open this link to choose one. It works once, within ${LIMITS.passwordResetHours} hour:

${deps.config.publicUrl}/password-resets/${token}

If it was not you, do nothing: your password stays as it is.
`,
});
