import { createHash } from "node:crypto";

/** What a line's hash covers: everything it says, and through the previous hash everything before it. */
export interface HashedLine {
  /** "0" is the installation's own chain. */
  programmeId: string;
  sequence: number;
  at: Date;
  personId: string | null;
  actor: string;
  action: string;
  subjectType: string;
  subjectId: string;
  subjectName: string;
  beforeJson: string | null;
  afterJson: string | null;
  previousHash: string;
}

/** Stands before the first line of every chain. */
export const FIRST_HASH = "0".repeat(64);

const isPlain = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value) && !(value instanceof Date);

/** JSON with keys in order, so that the same content is the same text. */
export const canonicalJson = (value: unknown): string =>
  JSON.stringify(value, (_key, part: unknown) =>
    isPlain(part) ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1))) : part,
  );

/** An array and not an object: the order of the fields is part of the format. */
export const lineHash = (line: HashedLine): string =>
  createHash("sha256")
    .update(
      JSON.stringify([
        line.programmeId,
        line.sequence,
        line.at.toISOString(),
        line.personId,
        line.actor,
        line.action,
        line.subjectType,
        line.subjectId,
        line.subjectName,
        line.beforeJson,
        line.afterJson,
        line.previousHash,
      ]),
    )
    .digest("hex");
