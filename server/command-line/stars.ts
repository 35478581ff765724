import type { ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { IdentifierSet } from "../catalogue/identifier-set.ts";
import type { Value } from "../database/bulk.ts";
import { rowMapper } from "../extracts/map-row.ts";
import type { RecognisedTable } from "../formats/open-table.ts";
import type { ColumnValues, RefusedRow, RowBatch, TableFinding } from "../formats/table.ts";
import { cellText, glanceAt } from "./glance.ts";
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
  private readonly map: ReturnType<typeof rowMapper>;
  private readonly used: readonly number[];

  constructor(
    private readonly table: RecognisedTable,
    plan: ReadingPlan,
  ) {
    this.map = rowMapper(plan);
    this.used = plan.columns.filter((card) => card.means !== KEPT).map((card) => card.index);
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
      for (let row = 0; row < batch.rows; row++) {
        const values = this.take(batch, row);
        if (values) block.push(values);
        if (block.length < BLOCK_ROWS) continue;
        yield block;
        block = [];
      }
    }
    if (block.length > 0) yield block;
  }

  private take(batch: RowBatch, row: number): Value[] | null {
    const { counts, seen } = this;
    counts.read++;
    const { values, reason, identity } = this.map(this.cellsOf(batch.columns, row));
    if (values === null) {
      counts.refused++;
      this.keep({ row: counts.read, line: null, why: reason });
      return null;
    }
    if (identity !== "" && !seen.add(identity)) {
      counts.skipped++;
      return null;
    }
    counts.accepted++;
    return values;
  }

  /** Only the cells that the plan speaks of are made into text. */
  private cellsOf(columns: readonly ColumnValues[], row: number): string[] {
    const cells: string[] = new Array(columns.length).fill("");
    for (const index of this.used) cells[index] = cellText(columns[index], row);
    return cells;
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
