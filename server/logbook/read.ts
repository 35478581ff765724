import type { LogbookLine } from "../database/entities/logbook-line.entity.ts";
import type { Deps } from "../deps.ts";
import { linesOf } from "./queries.ts";

interface Page {
  lines: LogbookLine[];
  /** Cursor of the page after this one; absent at the end. */
  next?: string;
}

const subjectOf = (text: string | undefined): { type: string; id?: string } | undefined => {
  if (!text) return undefined;
  const [type = "", id] = text.split(":");
  return { type, id };
};

/** A cursor is the number of a line: it stays right while lines are added, as lines never move. */
export const readLines = async (
  deps: Deps,
  programmeId: string,
  { cursor, limit, subject }: { cursor?: string; limit: number; subject?: string },
): Promise<Page> => {
  const beforeSequence = cursor && /^[0-9]{1,10}$/.test(cursor) ? Number(cursor) : undefined;
  const lines = await linesOf(deps.db.manager, programmeId, {
    beforeSequence,
    subject: subjectOf(subject),
    limit: limit + 1,
  });
  if (lines.length <= limit) return { lines };
  const shown = lines.slice(0, limit);
  return { lines: shown, next: String(shown.at(-1)?.sequence) };
};
