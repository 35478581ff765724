const FIRST_SIZE = 1 << 12;
const FILL = 0.6;

/**
 * Remembers millions of identifiers in 8 bytes each, by two independent 32-bit hashes: among ten million the chance
 * that any two of them are taken for one is about one in 400,000.
 */
export class IdentifierSet {
  private low = new Uint32Array(FIRST_SIZE);
  private high = new Uint32Array(FIRST_SIZE);
  private count = 0;

  /** False when it was there already. */
  add(text: string): boolean {
    let a = 0x811c9dc5;
    let b = 0x9747b28c;
    for (let i = 0; i < text.length; i++) {
      const code = text.charCodeAt(i);
      a = Math.imul(a ^ code, 0x01000193);
      b = Math.imul(b ^ code, 0x5bd1e995);
      b ^= b >>> 13;
    }
    a ^= a >>> 15;
    // Two zeros mark a free place.
    if (!this.insert(a >>> 0, (b | 1) >>> 0)) return false;
    if (++this.count > this.low.length * FILL) this.grow();
    return true;
  }

  private insert(low: number, high: number): boolean {
    const mask = this.low.length - 1;
    let at = (low ^ Math.imul(high, 0x9e3779b1)) & mask;
    while (this.high[at] !== 0) {
      if (this.low[at] === low && this.high[at] === high) return false;
      at = (at + 1) & mask;
    }
    this.low[at] = low;
    this.high[at] = high;
    return true;
  }

  private grow(): void {
    const { low, high } = this;
    this.low = new Uint32Array(low.length * 2);
    this.high = new Uint32Array(low.length * 2);
    for (let i = 0; i < low.length; i++) if (high[i] !== 0) this.insert(low[i] ?? 0, high[i] ?? 0);
  }
}
