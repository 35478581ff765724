import { z } from "zod";
import { LIMITS } from "../limits.ts";
import { ROLES } from "../policy/roles.ts";
import { id, name } from "./common.ts";

export const THEMES = ["plate", "dome", "dark-adapted", "amber"] as const;
export const theme = z.enum(THEMES);
export type Theme = z.infer<typeof theme>;

export const password = z
  .string()
  .min(
    LIMITS.passwordCharacters.least,
    `A password has at least ${LIMITS.passwordCharacters.least} characters.`,
  )
  .max(
    LIMITS.passwordCharacters.most,
    `A password has at most ${LIMITS.passwordCharacters.most} characters.`,
  );
export const email = z
  .email("Give an e-mail address, for example name@example.org.")
  .max(LIMITS.emailCharacters);

/** GET /api/session → { session }. `person` is null for a visitor; the token goes into the X-CSRF-Token header. */
export const session = z.object({
  person: z
    .object({
      id,
      name: z.string(),
      email: z.string(),
      isInstallationAdministrator: z.boolean(),
      theme: theme.nullable(),
    })
    .nullable(),
  csrfToken: z.string(),
  programmes: z.array(
    z.object({ id, name: z.string(), roles: z.array(z.enum(ROLES)), isInvented: z.boolean() }),
  ),
  installation: z.object({ isDemo: z.boolean(), hasMailbox: z.boolean() }),
});
export type Session = z.infer<typeof session>;

/** POST /api/session → 200 { session }. DELETE /api/session → 204. DELETE /api/sessions (everywhere) → 204. */
export const signInBody = z.strictObject({
  email: z.string().min(1, "Type your e-mail address.").max(LIMITS.emailCharacters),
  password: z.string().min(1, "Type your password.").max(LIMITS.passwordCharacters.most),
});
/** PUT /api/me/password → 204; other sessions end. */
export const passwordChangeBody = z.strictObject({
  current: z.string().min(1, "Type the password you sign in with now.").max(LIMITS.passwordCharacters.most),
  next: password,
});
/** PATCH /api/me → { session } */
export const meBody = z.strictObject({ name: name.optional(), theme: theme.optional() });
/** POST /api/password-resets → 202 {} whatever the address. */
export const passwordResetRequestBody = z.strictObject({ email });
/** GET /api/password-resets/:token → { link }; POST /api/password-resets/:token → { session } (signed in). */
export const passwordResetBody = z.strictObject({ password });
/**
 * GET /api/invitations/:token → { link }. Who has no account: POST /api/invitations/:token → { session } (signed in).
 * Who has one signs in with it first: POST /api/invitations/:token/join (no body) → { session }.
 */
export const invitationAcceptBody = z.strictObject({ name, password });
export const link = z.object({
  purpose: z.enum(["invitation", "password-reset"]),
  email: z.string(),
  programme: z.string().nullable(),
  expiresAt: z.iso.datetime(),
  /** Whether that address can sign in already. */
  hasAccount: z.boolean(),
});
export type Link = z.infer<typeof link>;

/** GET /api/mailbox → { mails }: demo installations without SMTP, installation administrators alone. */
export const mail = z.object({
  id,
  to: z.string(),
  subject: z.string(),
  body: z.string(),
  createdAt: z.iso.datetime(),
  state: z.enum(["kept", "queued", "sent", "failed"]),
});
export type Mail = z.infer<typeof mail>;
