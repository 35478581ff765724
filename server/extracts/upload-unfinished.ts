import { LessThan } from "typeorm";
import { LIMITS } from "#shared/limits.ts";
import { Extract } from "../database/entities/extract.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { lockExtract } from "./queries.ts";
import { growingKey } from "./upload-pieces.ts";

const DAY_MS = 24 * 3600 * 1000;

const removeOne = (deps: Deps, { id, programmeId }: Extract, before: Date): Promise<void> =>
  inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, programmeId, id);
    if (row?.state !== "receiving" || row.receivedBytes === "0") return;
    const found = await deps.files.stat(growingKey(row));
    if (found && found.modifiedAt >= before) return;
    const share = Math.floor((100 * Number(row.receivedBytes)) / Math.max(1, Number(row.bytes)));
    await tx.save(
      Object.assign(row, {
        receivedBytes: "0",
        failureMessage: `${share} % of the file had arrived, and nobody went on for ${LIMITS.unfinishedUploadDays} days. What had arrived was removed.`,
        failureHint: "Send the file again, or delete this extract.",
      }),
    );
    await deps.files.remove(growingKey(row));
  });

/** Makes room where an upload was left unfinished. The extract stays and says so; any process may do it at any time. */
export const removeUnfinishedUploads = async (deps: Deps): Promise<void> => {
  const before = new Date(deps.now().getTime() - LIMITS.unfinishedUploadDays * DAY_MS);
  const old = await deps.db.manager.findBy(Extract, { state: "receiving", createdAt: LessThan(before) });
  for (const extract of old) await removeOne(deps, extract, before);
};
