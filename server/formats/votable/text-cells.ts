import type { Findings } from "../findings.ts";
import { isBlankWord, parseNumber } from "../numbers.ts";
import type { BatchBuilder } from "./batch-builder.ts";
import { short } from "./faults.ts";
import { type Field, nameOf, slotsOf } from "./fields.ts";
import { hexadecimalNumber, longText, nullNumber, nullText } from "./null-mark.ts";

const INFINITY = /^([+-]?)inf(?:inity)?$/i;
const DIGITS = /^-?[1-9]\d{0,17}$/;
const TRUE = new Set(["T", "t", "1", "true", "TRUE", "True"]);
const FALSE = new Set(["F", "f", "0", "false", "FALSE", "False"]);

const NINE = 57;
const SPACE = 32;

/** Whether a text begins like a decimal number, which leaves out 0x10, NaN, Inf and words. Number() alone would take 0x10. */
const beginsDecimal = (text: string): boolean => {
  const second = text.charCodeAt(1) | 32;
  return !(second > NINE && second !== 101);
};

/** Reads cells as TABLEDATA spells them into the columns of a batch. */
export class TextCells {
  /** Why the last cell could not be read. */
  why = "";
  private readonly slots: Int32Array;
  private readonly nullNumbers: Float64Array;
  private readonly nullTexts: readonly (string | null)[];

  constructor(
    readonly fields: readonly Field[],
    readonly batch: BatchBuilder,
    private readonly findings: Findings,
  ) {
    this.slots = slotsOf(fields);
    this.nullNumbers = Float64Array.from(fields, nullNumber);
    this.nullTexts = fields.map(nullText);
  }

  /** Whether the cell could be read; cells of fields without a column always can. */
  put(index: number, cell: string): boolean {
    const slot = this.slots[index] as number;
    if (slot < 0) return true;
    const field = this.fields[index] as Field;
    switch (field.type) {
      case "text":
        this.batch.setText(slot, this.isMarked(index, cell) ? "" : cell);
        return true;
      case "boolean":
        return this.putBoolean(index, slot, cell.trim());
      case "int64":
        return this.putLong(index, slot, cell.trim());
      default:
        return this.putNumber(index, slot, cell, field);
    }
  }

  private isMarked(index: number, cell: string): boolean {
    const mark = this.nullTexts[index] ?? null;
    return mark !== null && (cell === mark || cell.trim() === mark);
  }

  private putNumber(index: number, slot: number, cell: string, field: Field): boolean {
    let text = cell;
    if (text.charCodeAt(0) <= SPACE || text.charCodeAt(text.length - 1) <= SPACE) text = text.trim();
    let value = Number.NaN;
    if (text !== "") {
      if (beginsDecimal(text)) value = Number(text);
      if (Number.isNaN(value)) {
        value = this.unusualNumber(index, text, field);
        if (Number.isNaN(value) && !this.isBlank(index, text, field)) return this.refuse(index, cell);
      } else if (!Number.isFinite(value)) return this.refuse(index, cell);
      if (field.type === "float32") {
        const single = Math.fround(value);
        if (Number.isFinite(value) && !Number.isFinite(single)) return this.refuse(index, cell);
        value = single;
      }
      if (value === this.nullNumbers[index]) value = Number.NaN;
      else if (field.range && !isInside(value, field.range)) return this.refuse(index, cell);
    }
    this.batch.setNumber(slot, value);
    return true;
  }

  /** Spellings that Number() does not know; NaN for blanks and for what is no number. */
  private unusualNumber(index: number, text: string, field: Field): number {
    if (this.isMarked(index, text)) return Number.NaN;
    if (field.range) {
      const hexadecimal = hexadecimalNumber(text);
      if (!Number.isNaN(hexadecimal)) return hexadecimal;
    } else {
      const infinity = INFINITY.exec(text);
      if (infinity) return infinity[1] === "-" ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
    }
    return parseNumber(text, ".");
  }

  private putLong(index: number, slot: number, text: string): boolean {
    let value: string | null = text;
    if (text !== "" && !DIGITS.test(text)) {
      value = longText(text);
      if (value === null && (this.isMarked(index, text) || this.isBlank(index, text))) value = "";
      if (value === null) return this.refuse(index, text);
    }
    this.batch.setText(slot, value === this.nullTexts[index] ? "" : value);
    return true;
  }

  private putBoolean(index: number, slot: number, text: string): boolean {
    let value = "";
    if (TRUE.has(text)) value = "true";
    else if (FALSE.has(text)) value = "false";
    else if (text !== "" && text !== "?" && !this.isMarked(index, text) && !this.isBlank(index, text))
      return this.refuse(index, text);
    this.batch.setText(slot, value);
    return true;
  }

  /** Words for "no value" where the format has its own ways of saying so: taken, but told. */
  private isBlank(index: number, text: string, field?: Field): boolean {
    if (this.isMarked(index, text)) return true;
    const isFloat = field !== undefined && field.range === null;
    if (isFloat && /^nan$/i.test(text)) return true;
    if (!isBlankWord(text)) return false;
    this.findings.add(
      {
        key: "votable-blank-words",
        level: "note",
        message:
          "Columns of numbers or of yes and no hold words for a missing value, which were taken for blanks.",
        hint: "Check that they mean that nothing is known.",
      },
      `"${text}" in ${nameOf(this.fields[index] as Field, index)}`,
    );
    return true;
  }

  private refuse(index: number, cell: string): false {
    const field = this.fields[index] as Field;
    this.why = `"${short(cell.trim())}" in ${nameOf(field, index)} is not a value of the type ${field.datatype}`;
    return false;
  }
}

const isInside = (value: number, [least, greatest]: readonly [number, number]): boolean =>
  Number.isNaN(value) || (Number.isInteger(value) && value >= least && value <= greatest);
