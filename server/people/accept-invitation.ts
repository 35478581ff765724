import type { EntityManager } from "typeorm";
import type { Link } from "#shared/api/session.ts";
import type { Role } from "#shared/policy/roles.ts";
import { openLink, useLink } from "../auth/one-time-links.ts";
import { hashPassword } from "../auth/password.ts";
import { presentLink } from "../auth/present.ts";
import { personByEmail, programmeName } from "../auth/queries.ts";
import type { OneTimeLink } from "../database/entities/one-time-link.entity.ts";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { type AppError, conflict } from "../errors.ts";
import type { Caller } from "../http/route.ts";
import { addMember } from "./membership.ts";

const hasAccount = (person: Person | null): boolean => person !== null && person.passwordHash !== null;

export const readInvitation = async (deps: Deps, token: string): Promise<Link> => {
  const tx = deps.db.manager;
  const link = await openLink(tx, "invitation", token, deps.now());
  const person = await personByEmail(tx, link.email);
  return presentLink(link, await programmeName(tx, link.programmeId), hasAccount(person));
};

const accountExists = (email: string): AppError =>
  conflict("account-exists", `There is an account for ${email} already.`, {
    hint: "Sign in with it, then open the invitation again and join.",
  });

const deactivated = (email: string): AppError =>
  conflict("account-deactivated", `The account for ${email} has been deactivated.`, {
    hint: "Ask whoever runs this installation to activate it.",
  });

const enter = async (tx: EntityManager, link: OneTimeLink, person: Person, at: Date): Promise<void> => {
  if (!link.programmeId) return;
  await addMember(tx, {
    programmeId: link.programmeId,
    person,
    roles: (link.roles ?? []) as Role[],
    by: person,
    at,
  });
};

/** For someone new: makes the account with the chosen password and enters the programme. */
export const acceptInvitation = async (
  deps: Deps,
  token: string,
  input: { name: string; password: string },
): Promise<Caller> => {
  const opened = await openLink(deps.db.manager, "invitation", token, deps.now());
  if (hasAccount(await personByEmail(deps.db.manager, opened.email))) throw accountExists(opened.email);
  const passwordHash = await hashPassword(input.password);
  return inTransaction(deps.db, async (tx) => {
    const now = deps.now();
    const link = await useLink(tx, "invitation", token, now);
    const known = await tx.findOne(Person, {
      where: { email: link.email },
      lock: { mode: "pessimistic_write" },
    });
    if (hasAccount(known)) throw accountExists(link.email);
    if (known && !known.isActive) throw deactivated(link.email);
    const person = await tx.save(Person, {
      ...(known ?? {
        email: link.email,
        isInstallationAdministrator: false,
        isActive: true,
        theme: null,
        createdAt: now,
      }),
      name: input.name,
      passwordHash,
    });
    await enter(tx, link, person, now);
    return person;
  });
};

/** For someone who has an account and is signed in with it. */
export const joinByInvitation = async (deps: Deps, token: string, caller: Caller): Promise<void> => {
  await inTransaction(deps.db, async (tx) => {
    const link = await useLink(tx, "invitation", token, deps.now());
    if (link.email !== caller.email)
      throw conflict(
        "other-account",
        `This invitation is for ${link.email}; you are signed in as ${caller.email}.`,
        {
          hint: `Sign out, sign in as ${link.email}, and open the invitation again.`,
        },
      );
    const person = await tx.findOneByOrFail(Person, { id: caller.id });
    await enter(tx, link, person, deps.now());
  });
};
