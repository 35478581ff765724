/**
 * The sum by which a file can be checked for damage: all data as 32-bit numbers, added with the carry brought around.
 *
 * @see Definition of the FITS, version 4.0, appendix J (from memory).
 */
export class DataSum {
  private sum = 0;
  /** Bytes that do not fill a 32-bit number yet. */
  private part = 0;
  private partBytes = 0;

  add(bytes: Uint8Array): void {
    let at = 0;
    while (this.partBytes > 0 && at < bytes.length) this.addByte(bytes[at++] ?? 0);
    const words = Math.floor((bytes.length - at) / 4);
    const view = new DataView(bytes.buffer, bytes.byteOffset + at, words * 4);
    // As many numbers as there may be in memory add up exactly in a double, and are folded once.
    let sum = 0;
    for (let word = 0; word < words; word++) sum += view.getUint32(word * 4);
    this.sum = folded(this.sum + folded(sum));
    for (at += words * 4; at < bytes.length; at++) this.addByte(bytes[at] ?? 0);
  }

  /** The sum of whole numbers, which data that fill their last block consist of. */
  value(): number {
    return this.sum;
  }

  private addByte(byte: number): void {
    this.part = this.part * 256 + byte;
    if (++this.partBytes < 4) return;
    this.sum = folded(this.sum + this.part);
    this.part = 0;
    this.partBytes = 0;
  }
}

/** Carries beyond 32 bits are added at the other end. */
const folded = (sum: number): number => {
  let rest = sum;
  while (rest >= 2 ** 32) rest = (rest % 2 ** 32) + Math.floor(rest / 2 ** 32);
  return rest;
};
