import type { Session } from "#shared/api/session.ts";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError } from "../errors.ts";
import type { Caller } from "../http/route.ts";
import { writeLine } from "../logbook/service.ts";
import { hasMailbox } from "../mail/service.ts";
import { hashPassword, verifyPassword } from "./password.ts";
import { presentSession } from "./present.ts";
import { lockPerson, programmesOf } from "./queries.ts";
import { endSessionsOf } from "./sessions.ts";

/** What a page needs to know of who is looking at it. */
export const describeSession = async (deps: Deps, personId: string, csrfToken: string): Promise<Session> => {
  const tx = deps.db.manager;
  const person = personId ? await tx.findOneBy(Person, { id: personId }) : null;
  const programmes = person ? await programmesOf(tx, person.id) : [];
  return presentSession(person, programmes, {
    csrfToken,
    installation: { isDemo: deps.config.isDemo, hasMailbox: hasMailbox(deps) },
  });
};

const wrongPassword = (): AppError =>
  new AppError(422, "wrong-password", "The present password is another one, so nothing was changed.", {
    hint: "Type the password you sign in with now.",
    fields: { current: "This is not your present password." },
  });

/** Changes one's own password; every other session of the person ends. */
export const changePassword = async (
  deps: Deps,
  caller: Caller,
  input: { current: string; next: string },
  sessionId: string,
): Promise<void> => {
  const before = await deps.db.manager.findOneByOrFail(Person, { id: caller.id });
  if (!(await verifyPassword(input.current, before.passwordHash))) throw wrongPassword();
  const passwordHash = await hashPassword(input.next);
  await inTransaction(deps.db, async (tx) => {
    const person = await lockPerson(tx, caller.id);
    if (person?.passwordHash !== before.passwordHash) throw wrongPassword();
    await tx.update(Person, { id: caller.id }, { passwordHash });
    await endSessionsOf(tx, caller.id, sessionId);
    await writeLine(tx, {
      programmeId: null,
      person: caller,
      action: "person.change-password",
      subject: { type: "person", ...caller },
      at: deps.now(),
    });
  });
};

export const signOutEverywhere = async (deps: Deps, caller: Caller): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    await endSessionsOf(tx, caller.id);
    await writeLine(tx, {
      programmeId: null,
      person: caller,
      action: "person.sign-out-everywhere",
      subject: { type: "person", ...caller },
      at: deps.now(),
    });
  });
};
