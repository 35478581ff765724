import type { ColumnHealth, ReadingPlan } from "#shared/api/extracts.ts";
import { LIMITS } from "#shared/limits.ts";
import { IdentifierSet } from "../catalogue/identifier-set.ts";
import { FoundedIds } from "../catalogue/match.ts";
import { bulkInsert, bulkInsertBuffer, type Value } from "../database/bulk.ts";
import type { Extract } from "../database/entities/extract.entity.ts";
import { LineBuffer } from "../database/line-buffer.ts";
import { notFound, unprocessable } from "../errors.ts";
import type { RowBatch, TableReader } from "../formats/table.ts";
import type { JobRun } from "../jobs/job-run.ts";
import { besideOf } from "./beside.ts";
import { EntryMapper } from "./entry-mapper.ts";
import { openExtract } from "./open-extract.ts";

export interface RowCounts {
  read: number;
  accepted: number;
  refused: number;
  skipped: number;
}

export interface Loaded {
  counts: RowCounts;
  health: ColumnHealth[];
}

/** Rows and bytes of one write. */
const BLOCK_ROWS = 40_000;
const BLOCK_BYTES = 8_000_000;
const REASON_CHARACTERS = 500;

const REFUSED_COLUMNS = ["extract_id", "line_number", "reason", "text"];

interface Line {
  readonly line: number;
  readonly text: string;
}

/** A row of a format without lines: its number, and its values between tabs. */
const rowAsLine = ({ columns }: RowBatch, row: number, number: number): Line => ({
  line: number,
  text: columns
    .map((values) => String(values[row] ?? ""))
    .map((text) => (text === "NaN" ? "" : text))
    .join("\t"),
});

/** Sorts the rows of a file into accepted, refused and skipped, and writes them block by block. */
class Loader {
  readonly counts: RowCounts = { read: 0, accepted: 0, refused: 0, skipped: 0 };
  private readonly mapper: EntryMapper;
  private readonly columns: readonly string[];
  private readonly ids: FoundedIds;
  private readonly seen = new IdentifierSet();
  /** One is filled while the other is on its way. */
  private lines = new LineBuffer();
  private spare = new LineBuffer();
  private aside: Value[][] = [];
  private asideCharacters = 0;
  private kept = 0;
  /** Rows of the table so far, refused ones among them. */
  numbered = 0;
  private writing = Promise.resolve();

  constructor(
    private readonly run: JobRun,
    private readonly extract: Extract,
    plan: ReadingPlan,
  ) {
    this.mapper = new EntryMapper(plan);
    this.columns = ["extract_id", "row_number", "programme_id", "star_id", ...this.mapper.written];
    this.ids = new FoundedIds(extract.id);
  }

  take(batch: RowBatch): void {
    this.mapper.read(batch.columns, batch.rows);
    const blankLines = batch.blankLines ?? 0;
    this.counts.read += batch.rows + batch.refused.length + blankLines;
    this.counts.skipped += blankLines;
    const refusedRows = new Set(batch.refused.map(({ row }) => row));
    let number = this.numbered;
    for (let row = 0; row < batch.rows; row++) {
      number++;
      while (refusedRows.size > 0 && refusedRows.has(number)) number++;
      this.takeRow(batch, row, number);
    }
    this.numbered += batch.rows + batch.refused.length;
    for (const { line, row, text, why } of batch.refused) this.refuse({ line: line ?? row, text }, why);
  }

  get isFull(): boolean {
    return this.lines.rows >= BLOCK_ROWS || this.lines.length + this.asideCharacters >= BLOCK_BYTES;
  }

  /** Hands the block on to be written while the next one is read; waits for the one before. */
  async flush(): Promise<void> {
    await this.writing;
    const { lines, aside } = this;
    this.lines = this.spare;
    this.lines.clear();
    this.spare = lines;
    this.aside = [];
    this.asideCharacters = 0;
    this.writing = this.write(lines, aside);
    this.writing.catch(() => undefined);
  }

  /** Nothing may be on its way any more when a clean-up begins. */
  settled(): Promise<void> {
    return this.writing;
  }

  health(): ColumnHealth[] {
    return this.mapper.health();
  }

  private takeRow(batch: RowBatch, row: number, number: number): void {
    const trouble = this.mapper.troubleOf(row);
    if (trouble !== null) {
      this.refuse(this.lineOf(batch, row, number), trouble);
      return;
    }
    const identity = this.mapper.identityOf(row);
    if (identity !== "" && !this.seen.add(identity)) {
      this.counts.skipped++;
      const why = "Skipped: an earlier row of this file has the same identifier.";
      this.keepAside(this.lineOf(batch, row, number), why);
      return;
    }
    this.counts.accepted++;
    this.lines.plain(this.extract.id);
    this.lines.plain(String(number));
    this.lines.plain(this.extract.programmeId);
    this.lines.plain(this.ids.of(number));
    this.mapper.write(row, this.lines);
    this.lines.endRow();
  }

  private lineOf(batch: RowBatch, row: number, number: number): Line {
    return batch.lineOf?.(row) ?? rowAsLine(batch, row, number);
  }

  private async write(lines: LineBuffer, aside: Value[][]): Promise<void> {
    const { db } = this.run.deps;
    await bulkInsertBuffer(db, "entry", this.columns, lines);
    await bulkInsert(db, "refused_row", REFUSED_COLUMNS, aside);
  }

  private refuse(line: Line, reason: string): void {
    this.counts.refused++;
    this.keepAside(line, reason);
  }

  private keepAside({ line, text }: Line, reason: string): void {
    if (this.kept >= LIMITS.refusedRowsKept) return;
    this.kept++;
    const kept = text.slice(0, LIMITS.cellCharacters);
    this.asideCharacters += kept.length;
    this.aside.push([this.extract.id, line, reason.slice(0, REASON_CHARACTERS), kept]);
  }
}

const refuseOtherHeader = (plan: ReadingPlan, width: number): void => {
  if (plan.columns.every((card) => card.index < width)) return;
  throw unprocessable("other-columns", "The file has fewer columns than the reading plan speaks of.", {
    hint: "Look at the delimiter, and confirm the plan again.",
  });
};

/** What a reader asks when it finds that a table is only a part of what was meant. */
const PART_ONLY = new Set(["votable-overflow", "votable-fewer-rows", "fewer-rows"]);

const rowsMissing = (declared: number, rows: number): Error =>
  unprocessable(
    "rows-missing",
    `The file says that it has ${declared.toLocaleString("en")} rows, and ${rows.toLocaleString("en")} of them came. Nothing was kept but the original.`,
    { hint: "Get the table again, whole, and bring it as a new extract." },
  );

/** What the end of a table shows: that its reader stops, that it is a part, or that fewer rows came than were declared. */
const refuseWhatIsMissing = (reader: TableReader, plan: ReadingPlan, rows: number): void => {
  const { declaredRows } = reader.header;
  if (declaredRows !== null && rows < declaredRows) throw rowsMissing(declaredRows, rows);
  const found = reader.findings();
  const stop =
    found.find(({ level }) => level === "stop") ??
    found.find(({ key }) => PART_ONLY.has(key) && !plan.accepted?.includes(key));
  if (stop) throw unprocessable(stop.key, stop.message, { hint: stop.hint });
};

const readAll = async (
  run: JobRun,
  loader: Loader,
  reader: TableReader,
  plan: ReadingPlan,
  total: number,
): Promise<void> => {
  const { counts } = loader;
  for await (const batch of reader.batches) {
    loader.take(batch);
    if (loader.isFull) await loader.flush();
    const most = reader.header.declaredRows ?? Math.round((counts.read * total) / Math.max(1, batch.bytes));
    await run.progress(counts.read, Math.max(counts.read, most), "Reading rows", "rows");
  }
  refuseWhatIsMissing(reader, plan, loader.numbered);
  await loader.flush();
};

/** Reads the original under its plan into entries that each found a star of their own until they are matched. */
export const loadEntries = async (run: JobRun, extract: Extract, plan: ReadingPlan): Promise<Loaded> => {
  if (extract.originalKey === null) throw notFound("This file");
  const source = await run.deps.files.read(extract.originalKey);
  const loader = new Loader(run, extract, plan);
  try {
    const { reader } = await openExtract(source, plan, await besideOf(run.deps.files, extract));
    refuseOtherHeader(plan, reader.header.columns.length);
    await readAll(run, loader, reader, plan, Number(extract.bytes));
  } finally {
    source.destroy();
    await loader.settled();
  }
  const { counts } = loader;
  if (counts.accepted === 0)
    throw unprocessable(
      "no-row-accepted",
      `${counts.read.toLocaleString("en")} rows were read and none of them could be accepted.`,
      { hint: "Look at the columns and units of the reading plan, or at the file itself." },
    );
  return { counts, health: loader.health() };
};
