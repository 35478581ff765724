import { hash } from "node:crypto";

/** 256 bits in parts of 32, the lowest first. */
const PARTS = 8;
const BASE = 2 ** 32;
/** Each part is exact as a double for some two million sums; carried over well before. */
const CARRY_EVERY = 1_000_000;

/**
 * Fingerprint of a set of stars: the sum of the SHA-256 of each star's identity and values, modulo 2^256. The order
 * of the stars does not matter, and an edition's follows from the one before by what changed.
 */
export class Fingerprint {
  private readonly parts = new Float64Array(PARTS);
  private pending = 0;

  constructor(before?: string) {
    if (before !== undefined) this.sum(Buffer.from(before, "hex"), 1);
  }

  add(row: string | Uint8Array): void {
    this.sum(hashOf(row), 1);
  }

  remove(row: string): void {
    this.sum(hashOf(row), -1);
  }

  toString(): string {
    this.carry();
    return Array.from(this.parts, (part) => part.toString(16).padStart(8, "0"))
      .reverse()
      .join("");
  }

  private sum(digest: Buffer, sign: 1 | -1): void {
    for (let i = 0; i < PARTS; i++)
      this.parts[i] = (this.parts[i] ?? 0) + sign * digest.readUInt32BE(4 * (PARTS - 1 - i));
    if (++this.pending >= CARRY_EVERY) this.carry();
  }

  private carry(): void {
    let over = 0;
    for (let i = 0; i < PARTS; i++) {
      const part = (this.parts[i] ?? 0) + over;
      over = Math.floor(part / BASE);
      this.parts[i] = part - over * BASE;
    }
    this.pending = 0;
  }
}

const hashOf = (row: string | Uint8Array): Buffer => hash("sha256", row, "buffer");
