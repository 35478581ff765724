import type { LogbookLine as LineJson } from "#shared/api/programmes.ts";
import type { LogbookLine } from "../database/entities/logbook-line.entity.ts";

const parsed = (json: string | null): unknown => (json === null ? null : JSON.parse(json));

export const presentLine = (line: LogbookLine): LineJson => ({
  id: line.id,
  sequence: line.sequence,
  at: line.at.toISOString(),
  actor: line.actor,
  action: line.action,
  subject: `${line.subjectType} ${line.subjectName}`.trim(),
  before: parsed(line.beforeJson),
  after: parsed(line.afterJson),
  hash: line.hash,
});
