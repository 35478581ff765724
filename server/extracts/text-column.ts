import type { ColumnCard } from "#shared/api/extracts.ts";
import type { ColumnValues } from "../formats/table.ts";
import { textReader } from "./cells.ts";
import { type Refuse, shown } from "./number-column.ts";

const MOST_CHARACTERS = 120;
const SPREADSHEET = /^[+-]?\d[.,]?\d*e\+\d+$/i;

/** A used column of texts. A number of the file is taken in its shortest form. */
export class TextColumn {
  /** "" for a blank. */
  values: string[] = [];
  private source: ColumnValues = [];
  private readonly readText: (text: string) => string | null;

  constructor(readonly card: ColumnCard) {
    this.readText = textReader(card);
  }

  read(source: ColumnValues, rows: number, refuse: Refuse): void {
    this.source = source;
    for (let row = 0; row < rows; row++) {
      const text = this.readText(this.rawAt(row)) ?? "";
      this.values[row] = text;
      const trouble = this.troubleOf(text);
      if (trouble !== null) refuse(row, trouble);
    }
  }

  /** What stands in the file where the value is blank: "" for an empty cell. */
  textAt(row: number): string {
    return this.rawAt(row).trim();
  }

  private rawAt(row: number): string {
    const value = this.source[row];
    if (typeof value === "string") return value;
    return value === undefined || Number.isNaN(value) ? "" : String(value);
  }

  private troubleOf(text: string): string | null {
    const { header, means } = this.card;
    if (text.length > MOST_CHARACTERS)
      return `“${shown(text)}” in ${header} is longer than ${MOST_CHARACTERS} characters.`;
    if (means === "source_id" && SPREADSHEET.test(text))
      return `“${text}” in ${header} is not an identifier any more: a spreadsheet has rounded it.`;
    return null;
  }
}
