import { setTimeout as wait } from "node:timers/promises";
import type { OneTimeLink } from "../database/entities/one-time-link.entity.ts";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import type { Caller } from "../http/route.ts";
import { writeLine } from "../logbook/service.ts";
import { passwordResetMail } from "../mail/messages.ts";
import { canMail, queueMail } from "../mail/service.ts";
import { createLink, openLink, useLink, withdrawLinks } from "./one-time-links.ts";
import { hashPassword } from "./password.ts";
import { lockPerson, personByEmail } from "./queries.ts";
import { endSessionsOf } from "./sessions.ts";

/** Longer than the work takes, so that the time of the answer does not tell whether there is an account. */
const ANSWER_AFTER_MS = 300;

const sendLink = async (deps: Deps, email: string): Promise<void> => {
  const person = await personByEmail(deps.db.manager, email);
  if (!person?.isActive) return;
  if (!canMail(deps)) {
    deps.log.warn("mail", "A password reset was asked for, but no mail server is set");
    return;
  }
  await inTransaction(deps.db, async (tx) => {
    const { token } = await createLink(
      tx,
      {
        purpose: "password-reset",
        email: person.email,
        personId: person.id,
        programmeId: null,
        roles: null,
        madeBy: null,
      },
      deps.now(),
    );
    await queueMail(tx, deps, passwordResetMail(deps, person.email, token));
  });
};

/** Sends a link where the address has an account; from outside every address looks alike. */
export const requestPasswordReset = async (deps: Deps, email: string): Promise<void> => {
  await Promise.all([sendLink(deps, email.trim().toLowerCase()), wait(ANSWER_AFTER_MS)]);
};

export const readPasswordReset = (deps: Deps, token: string): Promise<OneTimeLink> =>
  openLink(deps.db.manager, "password-reset", token, deps.now());

/** Sets the new password, ends every session of the person, and answers whom to sign in. */
export const resetPassword = async (deps: Deps, token: string, password: string): Promise<Caller> => {
  await readPasswordReset(deps, token);
  const passwordHash = await hashPassword(password);
  return inTransaction(deps.db, async (tx) => {
    const link = await useLink(tx, "password-reset", token, deps.now());
    const person = await lockPerson(tx, link.personId ?? "0");
    if (!person?.isActive) throw notFound("This link");
    await tx.update(Person, { id: person.id }, { passwordHash });
    await withdrawLinks(tx, link, deps.now());
    await endSessionsOf(tx, person.id);
    await writeLine(tx, {
      programmeId: null,
      person,
      action: "person.reset-password",
      subject: { type: "person", id: person.id, name: person.name },
      at: deps.now(),
    });
    return person;
  });
};
