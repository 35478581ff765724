import { createLink } from "../auth/one-time-links.ts";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { writeLine } from "../logbook/service.ts";

/**
 * Makes someone an administrator of the installation, with an account if there was none, and answers the link at
 * which they choose a password. For whoever has the machine at hand: nobody can be let in by mail before.
 */
export const makeInstallationAdministrator = (
  deps: Pick<Deps, "config" | "db" | "now">,
  input: { email: string; name: string },
): Promise<string> =>
  inTransaction(deps.db, async (tx) => {
    const at = deps.now();
    const email = input.email.trim().toLowerCase();
    const known = await tx.findOne(Person, { where: { email }, lock: { mode: "pessimistic_write" } });
    const person = await tx.save(
      Person,
      tx.create(Person, {
        ...(known ?? { email, name: input.name, passwordHash: null, theme: null, createdAt: at }),
        isInstallationAdministrator: true,
        isActive: true,
      }),
    );
    const { token } = await createLink(
      tx,
      { purpose: "password-reset", email, personId: person.id, programmeId: null, roles: null, madeBy: null },
      at,
    );
    await writeLine(tx, {
      programmeId: null,
      person: null,
      action: "person.make-installation-administrator",
      subject: { type: "person", id: person.id, name: person.name },
      after: { email },
      at,
    });
    return `${deps.config.publicUrl}/password-resets/${token}`;
  });
