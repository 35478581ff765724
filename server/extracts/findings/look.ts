import type { ColumnCard, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT, type Meaning } from "#shared/catalogue/header-spellings.ts";
import { isBlankWord } from "../../formats/numbers.ts";
import { numberReader } from "../cells.ts";
import type { PlanProfile } from "../plan-profile.ts";
import type { Sample, SampleColumn } from "../sample.ts";

/** What other extracts say of stars that the sampled rows name as well, row by row of the sample. */
export interface SharedStars {
  readonly count: number;
  /** By key, in the canonical unit; NaN where no other extract has a value. */
  readonly values: ReadonlyMap<string, Float64Array>;
}

/** What is known besides the file and its plan. */
export interface Knowledge {
  readonly shared: SharedStars | null;
  /** What a named plan for the same header was made on. */
  readonly earlier: { readonly name: string; readonly profile: PlanProfile } | null;
}

/** A used column under the plan. */
export interface UsedColumn {
  readonly card: ColumnCard;
  readonly meaning: Meaning;
  readonly shown: SampleColumn;
  /** Rows of the sample whose text is no blank and no mark of one. */
  readonly given: readonly number[];
  /** In the canonical unit, row by row of the sample; NaN for blanks and for what is no number. Empty for texts. */
  readonly values: Float64Array;
  /** Rows whose text should be a number and is none. */
  readonly unread: readonly number[];
}

/** A file as the detectors see it. */
export interface Look {
  readonly sample: Sample;
  readonly plan: ReadingPlan;
  readonly used: readonly UsedColumn[];
  /** Line of each sampled row; 0 where it is not known. */
  readonly lines: readonly number[];
  readonly knowledge: Knowledge;
}

export const NOTHING_KNOWN: Knowledge = { shared: null, earlier: null };

const usedColumn = (
  sample: Sample,
  plan: ReadingPlan,
  card: ColumnCard,
  meaning: Meaning,
): UsedColumn | null => {
  const shown = sample.columns[card.index];
  if (!shown) return null;
  const marks = new Set(card.blankMarks);
  const isGiven = (text: string): boolean => !isBlankWord(text) && !marks.has(text);
  const given = [...shown.texts.keys()].filter((row) => isGiven((shown.texts[row] ?? "").trim()));
  const values = new Float64Array(meaning.kind === "number" ? shown.texts.length : 0).fill(Number.NaN);
  const unread: number[] = [];
  if (meaning.kind === "number") {
    const read = numberReader(card, plan);
    for (const row of given) {
      const value = read(shown.texts[row] ?? "");
      if (value === null) unread.push(row);
      else values[row] = value;
    }
  }
  return { card, meaning, shown, given, values, unread };
};

/** The sampled rows as the plan reads them. */
export const lookAt = (sample: Sample, plan: ReadingPlan, knowledge: Knowledge): Look => ({
  sample,
  plan,
  knowledge,
  lines: sample.rows.map((row) => row.line),
  used: plan.columns.flatMap((card) => {
    const meaning = card.means === KEPT ? undefined : findMeaning(card.means);
    const used = meaning && usedColumn(sample, plan, card, meaning);
    return used ? [used] : [];
  }),
});

export const columnOf = (look: Look, means: string): UsedColumn | undefined =>
  look.used.find((u) => u.card.means === means);

export const textAt = ({ shown }: UsedColumn, row: number): string => (shown.texts[row] ?? "").trim();

/** Rows with a number of which that is true. */
export const rowsWhere = ({ values }: UsedColumn, is: (value: number) => boolean): number[] => {
  const rows: number[] = [];
  for (let row = 0; row < values.length; row++) if (is(values[row] ?? Number.NaN)) rows.push(row);
  return rows;
};

/** The middle of what is finite; NaN of nothing. */
export const median = (values: Iterable<number>): number => {
  const sorted = Float64Array.from(values)
    .filter((v) => Number.isFinite(v))
    .toSorted();
  return sorted.length === 0 ? Number.NaN : (sorted[Math.floor(sorted.length / 2)] ?? Number.NaN);
};

/** Members by a key, in the order in which keys come first. */
export const groupBy = <T, Key>(members: Iterable<T>, keyOf: (member: T) => Key): Map<Key, T[]> => {
  const groups = new Map<Key, T[]>();
  for (const member of members) {
    const key = keyOf(member);
    const group = groups.get(key);
    if (group) group.push(member);
    else groups.set(key, [member]);
  }
  return groups;
};
