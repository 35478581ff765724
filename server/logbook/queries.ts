import type { EntityManager } from "typeorm";
import { LogbookLine } from "../database/entities/logbook-line.entity.ts";

export interface LinesAsked {
  /** Only lines before this one. */
  beforeSequence?: number;
  subject?: { type: string; id?: string };
  limit: number;
}

/** Newest first. */
export const linesOf = (
  tx: EntityManager,
  programmeId: string,
  asked: LinesAsked,
): Promise<LogbookLine[]> => {
  const query = tx
    .createQueryBuilder(LogbookLine, "line")
    .where("line.programmeId = :programmeId", { programmeId })
    .orderBy("line.sequence", "DESC")
    .limit(asked.limit);
  if (asked.beforeSequence !== undefined)
    query.andWhere("line.sequence < :before", { before: asked.beforeSequence });
  if (asked.subject) query.andWhere("line.subjectType = :type", { type: asked.subject.type });
  if (asked.subject?.id) query.andWhere("line.subjectId = :id", { id: asked.subject.id });
  return query.getMany();
};

/** A block of a chain, in order, for its check. */
export const blockOfChain = (
  tx: EntityManager,
  programmeId: string,
  afterSequence: number,
  limit: number,
): Promise<LogbookLine[]> =>
  tx
    .createQueryBuilder(LogbookLine, "line")
    .where("line.programmeId = :programmeId AND line.sequence > :afterSequence", {
      programmeId,
      afterSequence,
    })
    .orderBy("line.sequence", "ASC")
    .limit(limit)
    .getMany();
