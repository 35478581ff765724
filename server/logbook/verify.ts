import type { DataSource, EntityManager } from "typeorm";
import { LogbookChain } from "../database/entities/logbook-chain.entity.ts";
import type { LogbookLine } from "../database/entities/logbook-line.entity.ts";
import { FIRST_HASH, lineHash } from "./chain.ts";
import { blockOfChain } from "./queries.ts";

const BLOCK = 1_000;

export interface ChainReport {
  programmeId: string;
  lines: number;
  /** The first thing that does not fit; null where the whole chain does. */
  fault: string | null;
}

interface Place {
  sequence: number;
  hash: string;
}

const faultOf = (line: LogbookLine, before: Place): string | null => {
  if (line.sequence !== before.sequence + 1) return `line ${before.sequence + 1} is missing`;
  if (line.previousHash !== before.hash) return `line ${line.sequence} does not continue the line before it`;
  if (line.hash !== lineHash(line)) return `line ${line.sequence} is not as it was written`;
  return null;
};

const headFault = (end: Place, head: Place): string | null => {
  if (head.sequence > end.sequence) return `line ${end.sequence + 1} is missing`;
  if (head.sequence < end.sequence) return `line ${head.sequence + 1} was not written by Shortlight`;
  return head.hash === end.hash ? null : `line ${end.sequence} is not the one that was written last`;
};

const verifyChain = async (tx: EntityManager, programmeId: string): Promise<ChainReport> => {
  const head = (await tx.findOneBy(LogbookChain, { programmeId })) ?? { sequence: 0, hash: FIRST_HASH };
  let end: Place = { sequence: 0, hash: FIRST_HASH };
  for (;;) {
    const block = await blockOfChain(tx, programmeId, end.sequence, BLOCK);
    for (const line of block) {
      const fault = faultOf(line, end);
      if (fault) return { programmeId, lines: end.sequence, fault };
      end = line;
    }
    if (block.length < BLOCK) break;
  }
  return { programmeId, lines: end.sequence, fault: headFault(end, head) };
};

const allChains = async (tx: EntityManager): Promise<string[]> => {
  const rows = await tx.query<{ id: string }[]>(
    "SELECT programme_id AS id FROM logbook_chain UNION SELECT programme_id FROM logbook_line ORDER BY 1",
  );
  return rows.map((row) => String(row.id));
};

/** Walks one chain, or all: those with a head and those with lines. One snapshot, as lines may be added meanwhile. */
export const verifyLogbook = (db: DataSource, programmeId?: string): Promise<ChainReport[]> =>
  db.transaction("REPEATABLE READ", async (tx) => {
    const reports: ChainReport[] = [];
    for (const id of programmeId ? [programmeId] : await allChains(tx))
      reports.push(await verifyChain(tx, id));
    return reports;
  });
