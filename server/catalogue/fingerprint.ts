import { createHash } from "node:crypto";

const MODULUS = 1n << 256n;

/**
 * Fingerprint of a set of stars: the sum of the SHA-256 of each star's identity and values, modulo 2^256. The order
 * of the stars does not matter, and an edition's follows from the one before by what changed.
 */
export class Fingerprint {
  private sum: bigint;

  constructor(before?: string) {
    this.sum = before === undefined ? 0n : BigInt(`0x${before}`);
  }

  add(row: string): void {
    this.sum = (this.sum + hashOf(row)) % MODULUS;
  }

  remove(row: string): void {
    this.sum = (this.sum - hashOf(row) + MODULUS) % MODULUS;
  }

  toString(): string {
    return this.sum.toString(16).padStart(64, "0");
  }
}

const hashOf = (row: string): bigint => BigInt(`0x${createHash("sha256").update(row).digest("hex")}`);
