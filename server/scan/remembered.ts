/** Answers kept for the questions asked last, within a bound of weight; one computation for those who ask together. */
export class Remembered<T> {
  private readonly entries = new Map<string, { value: Promise<T>; weight: number }>();
  private weight = 0;

  constructor(
    private readonly most: { entries: number; weight: number },
    private readonly weigh: (value: T) => number,
  ) {}

  /** The answer that is already here; asking makes it the youngest. */
  peek(key: string): Promise<T> | undefined {
    const entry = this.entries.get(key);
    if (!entry) return undefined;
    this.entries.delete(key);
    this.entries.set(key, entry);
    return entry.value;
  }

  get(key: string, make: () => Promise<T>): Promise<T> {
    const known = this.peek(key);
    if (known) return known;
    const entry = { value: make(), weight: 0 };
    this.entries.set(key, entry);
    entry.value.then(
      (value) => {
        if (this.entries.get(key) !== entry) return;
        entry.weight = this.weigh(value);
        this.weight += entry.weight;
        this.shrink();
      },
      () => this.entries.delete(key),
    );
    return entry.value;
  }

  private shrink(): void {
    for (const [key, entry] of this.entries) {
      if (this.entries.size <= this.most.entries && this.weight <= this.most.weight) return;
      this.entries.delete(key);
      this.weight -= entry.weight;
    }
  }
}
