/** Seeded random numbers, so that invented data can be made again to the last digit. */
export class Random {
  private state: number;

  /** @param seed any whole numbers; the same ones give the same sequence */
  constructor(...seed: number[]) {
    let state = 0x2545f491;
    for (const n of seed) state = Math.imul(state ^ n, 0x9e3779b1) ^ (state >>> 15);
    // A state of zero would stay zero.
    this.state = state === 0 ? 1 : state;
    for (let i = 0; i < 8; i++) this.uniform();
  }

  /** From 0 to below 1: xorshift with 32 bits of state (Marsaglia 2003, J. Stat. Softw. 8, 14). */
  uniform(): number {
    this.state ^= this.state << 13;
    this.state ^= this.state >>> 17;
    this.state ^= this.state << 5;
    return (this.state >>> 0) / 2 ** 32;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.uniform();
  }

  /** Normal, by Box and Muller. */
  normal(mean = 0, sigma = 1): number {
    return (
      mean + sigma * Math.sqrt(-2 * Math.log(1 - this.uniform())) * Math.cos(2 * Math.PI * this.uniform())
    );
  }

  chance(probability: number): boolean {
    return this.uniform() < probability;
  }
}
