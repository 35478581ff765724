import { Person } from "../database/entities/person.entity.ts";
import type { Deps } from "../deps.ts";
import type { Caller } from "../http/route.ts";
import { verifyPassword } from "./password.ts";

/** The person with that address and password, or nothing: which of the two was wrong is not told. */
export const verifySignIn = async (
  deps: Deps,
  email: string,
  password: string,
): Promise<Caller | undefined> => {
  const person = await deps.db.manager.findOneBy(Person, {
    email: email.trim().toLowerCase(),
    isActive: true,
  });
  const fits = await verifyPassword(password, person?.passwordHash ?? null);
  if (!person || !fits) return undefined;
  const { id, name, isInstallationAdministrator } = person;
  return { id, name, email: person.email, isInstallationAdministrator };
};
