import type { TableFinding } from "../table.ts";

type Words = Pick<TableFinding, "key" | "level" | "message" | "hint">;

const MOST_EXAMPLES = 5;

/** Findings by key: each is said once, counted, and shown by a few examples. */
export class Findings {
  private readonly byKey = new Map<string, Words & { count: number; examples: string[] }>();

  /** The words of the first time stay; later ones add to the count and the examples. */
  add(words: Words, example: string): void {
    let finding = this.byKey.get(words.key);
    if (!finding) {
      finding = { ...words, count: 0, examples: [] };
      this.byKey.set(words.key, finding);
    }
    finding.count++;
    if (finding.examples.length < MOST_EXAMPLES) finding.examples.push(example);
  }

  list(): TableFinding[] {
    return [...this.byKey.values()].map((finding) => ({ ...finding, examples: [...finding.examples] }));
  }
}
