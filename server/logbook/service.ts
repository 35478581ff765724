import type { EntityManager } from "typeorm";
import { LogbookChain } from "../database/entities/logbook-chain.entity.ts";
import { LogbookLine } from "../database/entities/logbook-line.entity.ts";
import { canonicalJson, FIRST_HASH, lineHash } from "./chain.ts";

export interface NewLine {
  /** Null: the installation's own logbook. */
  programmeId: string | null;
  /** Null: the program itself did it. */
  person: { id: string; name: string } | null;
  /** Subject and verb: "list.make". */
  action: string;
  subject: { type: string; id: string; name: string };
  before?: unknown;
  after?: unknown;
  at: Date;
}

interface Head {
  sequence: number;
  hash: string;
}

/** Moves the head on and locks it until the transaction ends, so that no second writer forks the chain. */
const takeNextPlace = async (tx: EntityManager, programmeId: string): Promise<Head> => {
  await tx.query(
    "INSERT INTO logbook_chain (programme_id, sequence, hash) VALUES (?, 1, ?) ON DUPLICATE KEY UPDATE sequence = sequence + 1",
    [programmeId, FIRST_HASH],
  );
  const [head] = await tx.query<Head[]>(
    "SELECT sequence, hash FROM logbook_chain WHERE programme_id = ? FOR UPDATE",
    [programmeId],
  );
  if (!head) throw new Error(`The logbook chain ${programmeId} has no head.`);
  return head;
};

const jsonOf = (value: unknown): string | null =>
  value === undefined || value === null ? null : canonicalJson(value);

/** Appends a line to the programme's chain; call it in the transaction of the change that it tells of. */
export const writeLine = async (tx: EntityManager, line: NewLine): Promise<void> => {
  const programmeId = line.programmeId ?? "0";
  const head = await takeNextPlace(tx, programmeId);
  const content = {
    programmeId,
    sequence: head.sequence,
    at: line.at,
    personId: line.person?.id ?? null,
    actor: line.person?.name ?? "Shortlight",
    action: line.action,
    subjectType: line.subject.type,
    subjectId: line.subject.id,
    subjectName: line.subject.name.slice(0, 200),
    beforeJson: jsonOf(line.before),
    afterJson: jsonOf(line.after),
    previousHash: head.hash,
  };
  const hash = lineHash(content);
  await tx.insert(LogbookLine, { ...content, hash });
  await tx.update(LogbookChain, { programmeId }, { hash });
};
