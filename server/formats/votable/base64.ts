const ALPHABET = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";
const FOREIGN = -1;
const BLANK = -2;
const PADDING = -3;

/** Meaning of each character (RFC 4648, table 1), for every one that a text can hold. */
const MEANING = new Int8Array(65_536).fill(FOREIGN);
for (const [value, sign] of [...ALPHABET].entries()) MEANING[sign.charCodeAt(0)] = value;
for (const sign of " \t\r\n\f\v") MEANING[sign.charCodeAt(0)] = BLANK;
MEANING["=".charCodeAt(0)] = PADDING;

/** Decodes base64 that comes in pieces broken anywhere, with blanks anywhere inside. */
export class Base64Decoder {
  /** Place in the last text of a character that does not belong there; −1 where there was none. */
  stoppedAt = -1;
  private bits = 0;
  private signs = 0;
  private padding = 0;

  /** Whether the text so far is whole: its groups of four are full, or their rest is short by padding left out. */
  get isWhole(): boolean {
    return this.padding === 0 ? this.signs !== 1 : this.signs + this.padding === 4;
  }

  /**
   * Writes the bytes of `text` from `from` to `to` into `out` at `at`; there must be room for three bytes to four signs.
   *
   * @returns the place in `out` after the last byte
   */
  decode(text: string, from: number, to: number, out: Uint8Array, at: number): number {
    let i = from;
    let o = at;
    while (i < to) {
      if (this.signs === 0 && this.padding === 0) {
        while (i + 4 <= to) {
          const group =
            ((MEANING[text.charCodeAt(i)] as number) << 18) |
            ((MEANING[text.charCodeAt(i + 1)] as number) << 12) |
            ((MEANING[text.charCodeAt(i + 2)] as number) << 6) |
            (MEANING[text.charCodeAt(i + 3)] as number);
          if (group < 0) break;
          out[o] = group >> 16;
          out[o + 1] = group >> 8;
          out[o + 2] = group;
          o += 3;
          i += 4;
        }
        if (i >= to) break;
      }
      const meaning = MEANING[text.charCodeAt(i)] as number;
      if (meaning >= 0 && this.padding === 0) o = this.add(meaning, out, o);
      else if (meaning === PADDING && this.signs >= 2 && this.signs + this.padding < 4) this.padding++;
      else if (meaning !== BLANK) {
        this.stoppedAt = i;
        break;
      }
      i++;
    }
    return o;
  }

  /** Bytes come out as soon as their bits are there, so that nothing is left for the end. */
  private add(value: number, out: Uint8Array, at: number): number {
    this.bits = ((this.bits << 6) | value) & 0xff_ffff;
    this.signs = (this.signs + 1) & 3;
    if (this.signs === 1) return at;
    out[at] = this.signs === 2 ? this.bits >> 4 : this.signs === 3 ? this.bits >> 2 : this.bits;
    return at + 1;
  }
}
