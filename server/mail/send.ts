import { createTransport } from "nodemailer";
import { JobRow } from "../database/entities/job.entity.ts";
import { Mail } from "../database/entities/mail.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError } from "../errors.ts";
import { enqueueJob } from "../jobs/service.ts";

/** Waits between attempts, in minutes; after the last the mail has failed. */
const WAITS = [1, 5, 30, 120];
const TIMEOUT_MS = 30_000;

interface Payload {
  mailId?: string;
  attempt?: number;
}

const deliver = async (deps: Deps, smtpUrl: string, mail: Mail): Promise<void> => {
  const transport = createTransport({
    url: smtpUrl,
    connectionTimeout: TIMEOUT_MS,
    greetingTimeout: TIMEOUT_MS,
    socketTimeout: TIMEOUT_MS,
  });
  try {
    await transport.sendMail({
      from: deps.config.mailFrom,
      to: { name: "", address: mail.to },
      subject: mail.subject,
      text: mail.body,
    });
  } finally {
    transport.close();
  }
};

/** The body is not kept once nobody needs it: it carries a link. */
const finish = async (deps: Deps, mail: Mail, state: "sent" | "failed"): Promise<void> => {
  const sentAt = state === "sent" ? deps.now() : null;
  await deps.db.manager.update(Mail, { id: mail.id }, { state, sentAt, body: "" });
};

const tryLater = async (deps: Deps, mail: Mail, attempt: number, minutes: number): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    const job = await enqueueJob(tx, {
      programmeId: null,
      personId: null,
      kind: "send-mail",
      payload: { mailId: mail.id, attempt: attempt + 1 },
      subject: { type: "mail", id: mail.id },
    });
    await tx.update(JobRow, { id: job.id }, { runAt: new Date(deps.now().getTime() + minutes * 60_000) });
  });
};

/** Sends one queued mail. A mail that is not queued any more was dealt with by an earlier attempt. */
export const sendMail = async ({ deps, job }: { deps: Deps; job: JobRow }): Promise<void> => {
  const { mailId = "0", attempt = 0 } = job.payload as Payload;
  const mail = await deps.db.manager.findOneBy(Mail, { id: mailId, state: "queued" });
  if (!mail) return;
  if (deps.config.smtpUrl === null) {
    await deps.db.manager.update(Mail, { id: mail.id }, { state: "kept" });
    return;
  }
  try {
    await deliver(deps, deps.config.smtpUrl, mail);
    await finish(deps, mail, "sent");
  } catch (error) {
    deps.log.warn("mail", "A mail was not taken by the mail server", { mailId, attempt, error });
    const wait = WAITS[attempt];
    if (wait !== undefined) return tryLater(deps, mail, attempt, wait);
    await finish(deps, mail, "failed");
    throw new AppError(
      502,
      "mail-not-sent",
      "The mail server did not take the mail after several attempts.",
      {
        hint: "Check SHORTLIGHT_SMTP_URL and the mail server, then send the invitation again.",
        cause: error,
      },
    );
  }
};
