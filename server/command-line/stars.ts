import type { ReadingPlan } from "#shared/api/extracts.ts";
import { IdentifierSet } from "../catalogue/identifier-set.ts";
import type { Value } from "../database/bulk.ts";
import { EntryMapper } from "../extracts/entry-mapper.ts";
import type { RecognisedTable } from "../formats/open-table.ts";
import type { RefusedRow, TableFinding } from "../formats/table.ts";
import { glanceAt } from "./glance.ts";
import { openTable } from "./open-table.ts";
import { readPlanFile } from "./plan-file.ts";
import { understand } from "./understand.ts";

/** read = accepted + refused + skipped, always. */
export interface RowCounts {
  read: number;
  accepted: number;
  refused: number;
  skipped: number;
}

const BLOCK_ROWS = 4096;
const REFUSALS_KEPT = 10;

/** Sorts the rows of a table under its plan, and hands the stars on in blocks. */
export class StarRows {
  readonly counts: RowCounts = { read: 0, accepted: 0, refused: 0, skipped: 0 };
  /** The first refused rows, to be named. */
  readonly refusals: { row: number; line: number | null; why: string }[] = [];
  private readonly seen = new IdentifierSet();
  private readonly mapper: EntryMapper;

  constructor(
    private readonly table: RecognisedTable,
    plan: ReadingPlan,
  ) {
    this.mapper = new EntryMapper(plan);
  }

  /** What the reader found, complete once all blocks are read. */
  findings(): readonly TableFinding[] {
    return this.table.reader.findings();
  }

  /** Values of accepted rows, each in the order of `GIVEN`. */
  async *blocks(): AsyncGenerator<readonly Value[][]> {
    let block: Value[][] = [];
    for await (const batch of this.table.reader.batches) {
      this.refuse(batch.refused);
      this.mapper.read(batch.columns, batch.rows);
      for (let row = 0; row < batch.rows; row++) {
        const values = this.take(row);
        if (values) block.push(values);
        if (block.length < BLOCK_ROWS) continue;
        yield block;
        block = [];
      }
    }
    if (block.length > 0) yield block;
  }

  private take(row: number): Value[] | null {
    const { counts, mapper, seen } = this;
    counts.read++;
    const trouble = mapper.troubleOf(row);
    if (trouble !== null) {
      counts.refused++;
      this.keep({ row: counts.read, line: null, why: trouble });
      return null;
    }
    const identity = mapper.identityOf(row);
    if (identity !== "" && !seen.add(identity)) {
      counts.skipped++;
      return null;
    }
    counts.accepted++;
    return mapper.valuesOf(row);
  }

  private refuse(refused: readonly RefusedRow[]): void {
    this.counts.read += refused.length;
    this.counts.refused += refused.length;
    for (const { row, line, why } of refused) this.keep({ row, line, why });
  }

  private keep(refusal: { row: number; line: number | null; why: string }): void {
    if (this.refusals.length < REFUSALS_KEPT) this.refusals.push(refusal);
  }
}

/**
 * The stars of a file, read twice: once to understand it, and once for its rows.
 *
 * @param plan name of a plan file; undefined for none
 */
export const readStars = async (
  folder: string,
  file: string,
  plan: string | undefined,
): Promise<StarRows> => {
  const answers = await readPlanFile(folder, plan);
  const understood = understand(await glanceAt(await openTable(folder, file, answers)), answers);
  return new StarRows(await openTable(folder, file, answers), understood);
};
