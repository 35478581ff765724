import type { ReadingPlan } from "#shared/api/extracts.ts";
import { LIMITS } from "#shared/limits.ts";
import { GIVEN } from "../catalogue/adopt.ts";
import { IdentifierSet } from "../catalogue/identifier-set.ts";
import { foundedId } from "../catalogue/match.ts";
import { bulkInsert, bulkInsertLines, encodeRow, type Value } from "../database/bulk.ts";
import type { Extract } from "../database/entities/extract.entity.ts";
import { notFound, unprocessable } from "../errors.ts";
import type { CsvRecord } from "../formats/csv-splitter.ts";
import { readRecords } from "../formats/read-records.ts";
import type { JobRun } from "../jobs/job-run.ts";
import { type Mapped, rowMapper } from "./map-row.ts";

export interface RowCounts {
  read: number;
  accepted: number;
  refused: number;
  skipped: number;
}

/** Rows of one write, by number and by size. */
const BLOCK_ROWS = 10_000;
const BLOCK_CHARACTERS = 8_000_000;
const REASON_CHARACTERS = 500;

const ENTRY_COLUMNS = ["extract_id", "row_number", "programme_id", "star_id", ...GIVEN];
const REFUSED_COLUMNS = ["extract_id", "line_number", "reason", "text"];

/** Sorts the rows of a file into accepted, refused and skipped, and writes them block by block. */
class Loader {
  readonly counts: RowCounts = { read: 0, accepted: 0, refused: 0, skipped: 0 };
  private entries: string[] = [];
  private aside: Value[][] = [];
  private characters = 0;
  private kept = 0;
  private writing = Promise.resolve();
  private readonly seen = new IdentifierSet();
  private readonly map: (cells: readonly string[]) => Mapped;

  constructor(
    private readonly run: JobRun,
    private readonly extract: Extract,
    plan: ReadingPlan,
    private readonly width: number,
  ) {
    this.map = rowMapper(plan);
  }

  take(record: CsvRecord): void {
    this.counts.read++;
    if (record.text.trim() === "" || record.cells.every((cell) => cell.trim() === "")) {
      this.counts.skipped++;
      return;
    }
    if (record.cells.length !== this.width) {
      const has = `This row has ${record.cells.length} values; the first line has ${this.width}.`;
      this.refuse(record, `${has} Nothing was guessed about where the others belong.`);
      return;
    }
    const { values, reason, identity } = this.map(record.cells);
    if (values === null) {
      this.refuse(record, reason);
      return;
    }
    if (identity !== "" && !this.seen.add(identity)) {
      this.counts.skipped++;
      this.keepAside(record, "Skipped: an earlier row of this file has the same identifier.");
      return;
    }
    this.counts.accepted++;
    this.characters += record.text.length;
    const { id, programmeId } = this.extract;
    const row = this.counts.read;
    this.entries.push(`${id}\t${row}\t${programmeId}\t${foundedId(id, row)}\t${encodeRow(values)}`);
  }

  get isFull(): boolean {
    return this.entries.length >= BLOCK_ROWS || this.characters >= BLOCK_CHARACTERS;
  }

  /** Hands the block on to be written while the next one is read; waits for the one before. */
  async flush(): Promise<void> {
    const { entries, aside } = this;
    this.entries = [];
    this.aside = [];
    this.characters = 0;
    await this.writing;
    this.writing = this.write(entries, aside);
    this.writing.catch(() => undefined);
  }

  /** Nothing may be on its way any more when a clean-up begins. */
  settled(): Promise<void> {
    return this.writing;
  }

  private async write(entries: string[], aside: Value[][]): Promise<void> {
    const { db } = this.run.deps;
    await bulkInsertLines(db, "entry", ENTRY_COLUMNS, entries);
    await bulkInsert(db, "refused_row", REFUSED_COLUMNS, aside);
  }

  private refuse(record: CsvRecord, reason: string): void {
    this.counts.refused++;
    this.keepAside(record, reason);
  }

  private keepAside(record: CsvRecord, reason: string): void {
    if (this.kept >= LIMITS.refusedRowsKept) return;
    this.kept++;
    this.characters += record.text.length;
    const text = record.text.slice(0, LIMITS.cellCharacters);
    this.aside.push([this.extract.id, record.line, reason.slice(0, REASON_CHARACTERS), text]);
  }
}

const refuseOtherHeader = (plan: ReadingPlan, width: number): void => {
  if (plan.columns.every((card) => card.index < width)) return;
  throw unprocessable("other-columns", "The file has fewer columns than the reading plan speaks of.", {
    hint: "Look at the delimiter, and confirm the plan again.",
  });
};

/** Reads the original under its plan into entries that each found a star of their own until they are matched. */
export const loadEntries = async (run: JobRun, extract: Extract, plan: ReadingPlan): Promise<RowCounts> => {
  if (extract.originalKey === null) throw notFound("This file");
  const total = Number(extract.bytes);
  const source = await run.deps.files.read(extract.originalKey);
  let loader: Loader | undefined;
  try {
    for await (const { records, bytes } of readRecords(source, plan)) {
      for (const record of records) {
        if (loader) {
          loader.take(record);
          continue;
        }
        refuseOtherHeader(plan, record.cells.length);
        loader = new Loader(run, extract, plan, record.cells.length);
      }
      if (!loader) continue;
      if (loader.isFull) await loader.flush();
      const { read } = loader.counts;
      await run.progress(read, Math.max(read, Math.round((read * total) / bytes)), "Reading rows", "rows");
    }
    await loader?.flush();
  } finally {
    source.destroy();
    await loader?.settled();
  }
  const counts = loader?.counts ?? { read: 0, accepted: 0, refused: 0, skipped: 0 };
  if (counts.accepted === 0)
    throw unprocessable(
      "no-row-accepted",
      `${counts.read.toLocaleString("en")} rows were read and none of them could be accepted.`,
      { hint: "Look at the columns and units of the reading plan, or at the file itself." },
    );
  return counts;
};
