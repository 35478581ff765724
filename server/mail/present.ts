import type { Mail as MailJson } from "#shared/api/session.ts";
import type { Mail } from "../database/entities/mail.entity.ts";

export const presentMail = (mail: Mail): MailJson => ({
  id: mail.id,
  to: mail.to,
  subject: mail.subject,
  body: mail.body,
  createdAt: mail.createdAt.toISOString(),
  state: mail.state,
});
