const FIRST_BYTES = 1 << 20;
const TAB = 9;
const NEWLINE = 10;
const ZERO = 48;
const BACKSLASH = 92;

/** Signs that mean something in the stream, with the letter that stands for each after a backslash. */
const ESCAPES: ReadonlyMap<number, number> = new Map([
  [0, 48],
  [9, 116],
  [10, 110],
  [13, 114],
  [92, 92],
]);

/**
 * Rows as the bytes that `LOAD DATA` reads: cells parted by tabs, `\N` for a blank. Written letter by letter into one
 * buffer, which is filled again and again: no text of a row is ever made.
 */
export class LineBuffer {
  rows = 0;
  length = 0;
  private bytes = Buffer.allocUnsafeSlow(FIRST_BYTES);
  private isFirst = true;

  clear(): void {
    this.rows = 0;
    this.length = 0;
  }

  /** All that was written since it was cleared; good until it is cleared again. */
  view(): Buffer {
    return this.bytes.subarray(0, this.length);
  }

  /** Takes back what was written from that length on, a row that was not needed. */
  rewind(length: number): void {
    this.length = length;
    this.isFirst = true;
  }

  blank(): void {
    this.begin(2);
    this.bytes[this.length++] = BACKSLASH;
    this.bytes[this.length++] = 78;
  }

  /** A double in the shortest form that reads back as the same bits; what is not finite is blank. */
  number(value: number): void {
    if (value >= 0 && value <= 9 && Number.isInteger(value)) {
      this.begin(1);
      this.bytes[this.length++] = ZERO + value;
    } else if (Number.isFinite(value)) this.plain(String(value));
    else this.blank();
  }

  /** Letters below 128 of which none means anything in the stream. */
  plain(text: string): void {
    this.begin(text.length);
    for (let i = 0; i < text.length; i++) this.bytes[this.length++] = text.charCodeAt(i);
  }

  text(text: string): void {
    // Six bytes hold any letter, escaped or not.
    this.begin(6 * text.length);
    const start = this.length;
    for (let i = 0; i < text.length; i++) {
      const code = text.charCodeAt(i);
      if (code > 127) {
        this.length = start;
        this.wide(text);
        return;
      }
      const letter = code < 14 || code === BACKSLASH ? ESCAPES.get(code) : undefined;
      if (letter !== undefined) this.bytes[this.length++] = BACKSLASH;
      this.bytes[this.length++] = letter ?? code;
    }
  }

  endRow(): void {
    this.room(1);
    this.bytes[this.length++] = NEWLINE;
    this.rows++;
    this.isFirst = true;
  }

  private wide(text: string): void {
    let escaped = text.replaceAll("\\", "\\\\");
    for (const [code, letter] of ESCAPES)
      if (code !== BACKSLASH)
        escaped = escaped.replaceAll(String.fromCharCode(code), `\\${String.fromCharCode(letter)}`);
    this.length += this.bytes.write(escaped, this.length);
  }

  private begin(bytes: number): void {
    this.room(bytes + 1);
    if (this.isFirst) this.isFirst = false;
    else this.bytes[this.length++] = TAB;
  }

  private room(bytes: number): void {
    if (this.length + bytes <= this.bytes.length) return;
    const larger = Buffer.allocUnsafeSlow(Math.max(2 * this.bytes.length, this.length + bytes));
    this.bytes.copy(larger, 0, 0, this.length);
    this.bytes = larger;
  }
}
