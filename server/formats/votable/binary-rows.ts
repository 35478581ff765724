import type { Findings } from "../findings.ts";
import type { BatchBuilder } from "./batch-builder.ts";
import { brokenRow, short, unreadable } from "./faults.ts";
import { type Field, nameOf, slotsOf } from "./fields.ts";
import { nullNumber, nullText } from "./null-mark.ts";

const MOST_ROW_BYTES = 16_777_216;
const COUNT_BYTES = 4;

const NUL = 0;
const SPACE = 32;
const QUESTION = 63;
const LETTER = { T: 84, t: 116, one: 49, F: 70, f: 102, zero: 48 } as const;

/** Bytes of a refused row that are shown. */
const MOST_SHOWN_BYTES = 400;

/** Bits of one item and the bytes of a cell; −1 where each cell says its count. */
interface Width {
  readonly bits: number;
  readonly bytes: number;
}

const widthOf = (field: Field, index: number): Width => {
  const { layout } = field;
  const name = nameOf(field, index);
  if (!layout)
    throw unreadable(
      "votable-unknown-width",
      `The column ${name} has the datatype "${short(field.datatype)}" and the arraysize "${short(field.arraysize)}", which the VOTable standard does not know, so the place of everything after it in a binary row is unknown.`,
      "Get the table in its TABLEDATA form.",
    );
  const { items, varies, dimensions } = layout.size;
  if (varies && dimensions > 1)
    throw unreadable(
      "votable-unclear-count",
      `The column ${name} has arrays of the size ${short(field.arraysize)}. Programs count the items of such arrays differently in the binary forms, so the place of everything after it is uncertain.`,
      "Get the table without that column, or in its TABLEDATA form.",
    );
  return { bits: layout.bits, bytes: varies ? -1 : Math.ceil((items * layout.bits) / 8) };
};

/** Rows of the binary forms: bytes come in at `end`, and whole rows go into the batch. */
export class BinaryRows {
  bytes = Buffer.alloc(131_072);
  end = 0;
  private at = 0;
  private scratch = Buffer.alloc(1024);
  private view = new DataView(this.bytes.buffer, this.bytes.byteOffset, this.bytes.length);
  private readonly widths: readonly Width[];
  private readonly maskBytes: number;
  /** Bytes of every row; −1 where they differ. */
  private readonly rowBytes: number;
  private readonly slots: Int32Array;
  private readonly nullNumbers: Float64Array;
  private readonly nullTexts: readonly (string | null)[];

  constructor(
    private readonly fields: readonly Field[],
    private readonly batch: BatchBuilder,
    private readonly findings: Findings,
    hasMask: boolean,
  ) {
    this.widths = fields.map(widthOf);
    this.maskBytes = hasMask ? Math.ceil(fields.length / 8) : 0;
    this.rowBytes = this.widths.reduce(
      (sum, { bytes }) => (sum < 0 || bytes < 0 ? -1 : sum + bytes),
      this.maskBytes,
    );
    if (this.rowBytes === 0 || this.rowBytes > MOST_ROW_BYTES)
      throw brokenRow(1, this.wrongSize(this.rowBytes));
    this.slots = slotsOf(fields);
    this.nullNumbers = Float64Array.from(fields, nullNumber);
    this.nullTexts = fields.map(nullText);
  }

  /** Makes room for so many bytes after `end`. */
  makeRoom(more: number): void {
    if (this.end + more <= this.bytes.length) return;
    const kept = this.end - this.at;
    if (kept + more <= this.bytes.length) this.bytes.copyWithin(0, this.at, this.end);
    else {
      const larger = Buffer.alloc(2 * (kept + more));
      this.bytes.copy(larger, 0, this.at, this.end);
      this.bytes = larger;
      this.view = new DataView(larger.buffer, larger.byteOffset, larger.length);
    }
    this.at = 0;
    this.end = kept;
  }

  /** Reads whole rows until the batch is full; false where it would need more bytes. */
  read(): boolean {
    while (!this.batch.isFull) {
      const end = this.endOfRow();
      if (end < 0) return false;
      this.readRow(end);
      this.at = end;
    }
    return true;
  }

  /** The stream has ended. */
  finish(): void {
    if (this.at === this.end) return;
    throw brokenRow(this.batch.row, "the data end in the middle of it");
  }

  private wrongSize(bytes: number): string {
    return bytes === 0 ? "by its columns it has no bytes" : "by its columns it is longer than 16 MB";
  }

  private endOfRow(): number {
    if (this.rowBytes >= 0) return this.at + this.rowBytes <= this.end ? this.at + this.rowBytes : -1;
    let at = this.at + this.maskBytes;
    for (let index = 0; index < this.widths.length; index++) {
      const width = this.widths[index] as Width;
      if (width.bytes >= 0) {
        at += width.bytes;
        continue;
      }
      if (at + COUNT_BYTES > this.end) return -1;
      const count = this.view.getInt32(at);
      at += COUNT_BYTES + Math.ceil((count * width.bits) / 8);
      if (count < 0 || at - this.at > MOST_ROW_BYTES) throw this.wrongCount(index, count);
    }
    return at <= this.end ? at : -1;
  }

  private wrongCount(index: number, count: number): Error {
    const name = nameOf(this.fields[index] as Field, index);
    return brokenRow(
      this.batch.row,
      `its cell in ${name} claims to hold ${count.toLocaleString("en")} items`,
    );
  }

  private readRow(end: number): void {
    const mask = this.at;
    let at = mask + this.maskBytes;
    for (let index = 0; index < this.widths.length; index++) {
      const width = this.widths[index] as Width;
      let bytes = width.bytes;
      if (bytes < 0) {
        bytes = Math.ceil((this.view.getInt32(at) * width.bits) / 8);
        at += COUNT_BYTES;
      }
      const slot = this.slots[index] as number;
      if (slot >= 0) {
        const isNull =
          this.maskBytes > 0 && (this.view.getUint8(mask + (index >> 3)) & (0x80 >> (index & 7))) !== 0;
        if (!this.readCell(index, slot, at, bytes, isNull)) {
          this.refuse(index, mask, end, at);
          return;
        }
      }
      at += bytes;
    }
    this.batch.commit();
  }

  private readCell(index: number, slot: number, at: number, bytes: number, isNull: boolean): boolean {
    const field = this.fields[index] as Field;
    switch (field.type) {
      case "float64":
        this.setNumber(index, slot, isNull ? Number.NaN : this.view.getFloat64(at));
        return true;
      case "float32":
        this.setNumber(index, slot, isNull ? Number.NaN : this.view.getFloat32(at));
        return true;
      case "int32":
        this.setNumber(index, slot, isNull ? Number.NaN : this.view.getInt32(at));
        return true;
      case "int16":
        this.setNumber(index, slot, isNull ? Number.NaN : this.view.getInt16(at));
        return true;
      case "uint8":
        this.setNumber(index, slot, isNull ? Number.NaN : this.view.getUint8(at));
        return true;
      case "int64":
        this.setText(index, slot, isNull ? "" : this.view.getBigInt64(at).toString());
        return true;
      case "boolean":
        if (isNull) this.batch.setText(slot, "");
        return isNull || this.setBoolean(slot, this.view.getUint8(at), field.layout?.bits === 1);
      default:
        this.setText(index, slot, isNull ? "" : this.text(at, bytes, field.layout?.bits === 16));
        return true;
    }
  }

  private setNumber(index: number, slot: number, value: number): void {
    this.batch.setNumber(slot, value === this.nullNumbers[index] ? Number.NaN : value);
  }

  private setText(index: number, slot: number, value: string): void {
    const mark = this.nullTexts[index];
    this.batch.setText(slot, mark !== null && value.trim() === mark ? "" : value);
  }

  /** A bit is set wherever in its byte a program put it: the others are filling and zero. */
  private setBoolean(slot: number, byte: number, isBit: boolean): boolean {
    if (isBit) this.batch.setText(slot, byte === 0 ? "false" : "true");
    else if (byte === LETTER.T || byte === LETTER.t || byte === LETTER.one) this.batch.setText(slot, "true");
    else if (byte === LETTER.F || byte === LETTER.f || byte === LETTER.zero)
      this.batch.setText(slot, "false");
    else if (byte === NUL || byte === SPACE || byte === QUESTION) this.batch.setText(slot, "");
    else return false;
    return true;
  }

  /** Up to the first NUL, by which fixed lengths are filled up. */
  private text(at: number, bytes: number, isWide: boolean): string {
    if (isWide) return this.wideText(at, bytes);
    const end = at + bytes;
    let stop = at;
    let isPlain = true;
    for (; stop < end; stop++) {
      const byte = this.bytes[stop] as number;
      if (byte === NUL) break;
      if (byte > 127) isPlain = false;
    }
    if (stop === at) return "";
    return isPlain ? this.bytes.toString("latin1", at, stop) : this.utf8(at, stop);
  }

  /** Text is ASCII by the standard and UTF-8 in practice. */
  private utf8(from: number, to: number): string {
    const text = this.bytes.toString("utf8", from, to);
    if (text.includes("\ufffd"))
      this.findings.add(
        {
          key: "votable-stray-bytes",
          level: "ask",
          message: "Some texts hold bytes that are no UTF-8; each stands as \ufffd.",
          hint: "Look at these texts, and get the table in its TABLEDATA form if they matter.",
        },
        `row ${this.batch.row}: ${text}`,
      );
    return text;
  }

  /** UTF-16, most significant byte first; most of it is Latin, for which a byte is enough. */
  private wideText(at: number, bytes: number): string {
    if (bytes > this.scratch.length) this.scratch = Buffer.alloc(2 * bytes);
    const { scratch, view } = this;
    let isLatin = true;
    let units = 0;
    for (; 2 * units + 1 < bytes; units++) {
      const unit = view.getUint16(at + 2 * units);
      if (unit === NUL) break;
      if (unit > 255) isLatin = false;
      scratch[units] = unit;
    }
    if (isLatin) return units === 0 ? "" : scratch.toString("latin1", 0, units);
    for (let i = 0; i < units; i++) scratch.writeUInt16LE(view.getUint16(at + 2 * i), 2 * i);
    return scratch.toString("utf16le", 0, 2 * units);
  }

  private refuse(index: number, from: number, to: number, at: number): void {
    const name = nameOf(this.fields[index] as Field, index);
    const why = `the byte ${this.view.getUint8(at)} in ${name} is neither yes nor no`;
    this.batch.refuse(null, this.bytes.toString("hex", from, Math.min(to, from + MOST_SHOWN_BYTES)), why);
  }
}
