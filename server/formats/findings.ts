import type { TableFinding } from "./table.ts";

type FindingWords = Omit<TableFinding, "count" | "examples">;

const MOST_EXAMPLES = 10;
const LONGEST_EXAMPLE = 200;

/** What a reading found, each kind once with its count and a few examples. */
export class Findings {
  private readonly byKey = new Map<string, FindingWords & { count: number; examples: string[] }>();

  add(words: FindingWords, example?: string, count = 1): void {
    let finding = this.byKey.get(words.key);
    if (!finding) {
      finding = { ...words, count: 0, examples: [] };
      this.byKey.set(words.key, finding);
    }
    finding.count += count;
    if (example === undefined || finding.examples.length >= MOST_EXAMPLES) return;
    const short = example.slice(0, LONGEST_EXAMPLE);
    if (!finding.examples.includes(short)) finding.examples.push(short);
  }

  list(): readonly TableFinding[] {
    return [...this.byKey.values()].map((finding) => ({ ...finding, examples: [...finding.examples] }));
  }
}
