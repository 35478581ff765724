import { Readable } from "node:stream";
import type { Deps } from "../deps.ts";

const PAGE = 1_000;

interface Row {
  line: number;
  reason: string;
  text: string;
}

const quote = (text: string): string => `"${text.replaceAll('"', '""')}"`;

/** A cell that a spreadsheet would take for a formula is told to be text; these rows are for reading. */
const asText = (text: string): string => quote(/^[=+\-@\t]/.test(text) ? `'${text}` : text);

async function* lines(deps: Deps, extractId: string): AsyncGenerator<string> {
  yield "line,reason,row\r\n";
  for (let after = 0; ; ) {
    const rows = await deps.db.query<Row[]>(
      `SELECT line_number AS line, reason, text FROM refused_row
       WHERE extract_id = ? AND line_number > ? ORDER BY line_number LIMIT ${PAGE}`,
      [extractId, after],
    );
    if (rows.length === 0) return;
    yield rows.map((r) => `${r.line},${quote(r.reason)},${asText(r.text)}\r\n`).join("");
    after = rows.at(-1)?.line ?? after;
  }
}

/** Rows that were refused or skipped, as CSV: line, reason, the row as it was. */
export const refusedRowsCsv = (deps: Deps, extractId: string): Readable =>
  Readable.from(lines(deps, extractId), { objectMode: true });
