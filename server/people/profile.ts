import type { Theme } from "#shared/api/session.ts";
import { lockPerson } from "../auth/queries.ts";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import type { Caller } from "../http/route.ts";
import { writeLine } from "../logbook/service.ts";

/** Changes one's own name or theme. A theme is a matter of taste and not of record; a name is both. */
export const changeProfile = async (
  deps: Deps,
  caller: Caller,
  input: { name?: string; theme?: Theme },
): Promise<void> => {
  if (input.name === undefined && input.theme === undefined) return;
  await inTransaction(deps.db, async (tx) => {
    const before = await lockPerson(tx, caller.id);
    await tx.update(Person, { id: caller.id }, input);
    if (!before || input.name === undefined || input.name === before.name) return;
    await writeLine(tx, {
      programmeId: null,
      person: caller,
      action: "person.rename",
      subject: { type: "person", id: caller.id, name: input.name },
      before: { name: before.name },
      after: { name: input.name },
      at: deps.now(),
    });
  });
};
