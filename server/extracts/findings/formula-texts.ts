import type { Finding } from "#shared/api/extracts.ts";
import { examplesAt, note } from "./finding.ts";
import { type Look, textAt } from "./look.ts";

const FORMULA = /^[=@](?:[A-Za-z]+\(|cmd|[A-Z]+\d)/;

/** Names that a spreadsheet would run as formulas. */
export const formulaFindings = (look: Look): Finding[] =>
  look.used
    .filter((u) => u.meaning.kind === "text")
    .flatMap((u) => {
      const rows = u.given.filter((row) => FORMULA.test(textAt(u, row)));
      if (rows.length === 0) return [];
      return [
        note(
          "formula-text",
          `${rows.length} texts looked at in “${u.card.header}” look like formulas of a spreadsheet. They are kept as text and never run.`,
          "Look where the file comes from.",
          { column: u.card.header, count: rows.length, examples: examplesAt(u.shown, look.lines, rows) },
        ),
      ];
    });
