/** Letters to change, add or take away to make one text of the other (Levenshtein 1966, Sov. Phys. Dokl. 10, 707). */
export const editDistance = (a: string, b: string): number => {
  let before = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = (before[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      row.push(Math.min(change, (before[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1));
    }
    before = row;
  }
  return before[b.length] ?? 0;
};

const MOST_CHARACTERS = 64;
const KEPT = 3;

/** The spellings nearest to one, of any number that are shown. */
export class Nearest {
  private best: { text: string; distance: number }[] = [];

  constructor(
    private readonly wanted: string,
    private readonly plain: (text: string) => string,
  ) {}

  show(text: string): void {
    const distance = editDistance(
      this.plain(this.wanted).slice(0, MOST_CHARACTERS),
      this.plain(text).slice(0, MOST_CHARACTERS),
    );
    const worst = this.best.at(-1);
    if (this.best.length === KEPT && worst && worst.distance <= distance) return;
    if (this.best.some((b) => b.text === text)) return;
    this.best = [...this.best, { text, distance }].toSorted((a, b) => a.distance - b.distance).slice(0, KEPT);
  }

  get texts(): readonly string[] {
    return this.best.map((b) => b.text);
  }
}
