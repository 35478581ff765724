import type { EntityManager } from "typeorm";
import { Mail } from "../database/entities/mail.entity.ts";
import type { Deps } from "../deps.ts";
import { AppError, notFound } from "../errors.ts";
import { enqueueJob } from "../jobs/service.ts";
import { keptMails } from "./queries.ts";

export interface Message {
  to: string;
  subject: string;
  body: string;
}

/** Whether a mail sent now would reach anyone: by a mail server, or in the mailbox of a demo installation. */
export const canMail = (deps: Deps): boolean => deps.config.smtpUrl !== null || deps.config.isDemo;

export const hasMailbox = (deps: Deps): boolean => deps.config.smtpUrl === null && deps.config.isDemo;

export const mailNotSetUp = (): AppError =>
  new AppError(
    422,
    "mail-not-set-up",
    "This installation has no mail server set, so the mail cannot be sent.",
    {
      hint: "Ask whoever runs it to set SHORTLIGHT_SMTP_URL.",
    },
  );

/** Queues a mail in the transaction of what it tells of. Bodies carry links: they are never logged. */
export const queueMail = async (tx: EntityManager, deps: Deps, message: Message): Promise<void> => {
  const state = deps.config.smtpUrl === null ? "kept" : "queued";
  const mail = await tx.save(Mail, { ...message, state, createdAt: deps.now(), sentAt: null });
  if (state === "kept") return;
  await enqueueJob(tx, {
    programmeId: null,
    personId: null,
    kind: "send-mail",
    payload: { mailId: mail.id },
    subject: { type: "mail", id: mail.id },
  });
};

/** The newest mails of the local mailbox; where there is none, the page does not exist. */
export const readMailbox = async (deps: Deps): Promise<Mail[]> => {
  if (!hasMailbox(deps)) throw notFound("This page");
  return keptMails(deps.db.manager);
};
