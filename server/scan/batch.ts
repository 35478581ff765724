import { createHash } from "node:crypto";
import { type DuckDBAppender, DuckDBDataChunk } from "@duckdb/node-api";
import type { Assessment } from "#server/assess/assess.ts";
import { INDEX_COLUMNS, INSTRUMENT_KEYS, NUMBER_KEYS, STORED_KEYS } from "./index-columns.ts";
import type { StarCells } from "./read-stars.ts";

/** DuckDB's own vector length: the most rows of one data chunk. */
export const BATCH_ROWS = 2_048;
const FIRST_NUMBER_CELL = 5;

/** Names a star alike on any machine: its identifier in its release, else its designation. */
const identityHash = (
  designation: string | null,
  sourceId: string | null,
  release: string | null,
): bigint => {
  const identity = sourceId === null ? (designation ?? "") : `${release ?? ""}|${sourceId}`;
  return createHash("sha256").update(identity).digest().readBigUInt64BE(0);
};

/** Rows on their way into the index: filled, assessed, appended as one data chunk, emptied. */
export class Batch {
  length = 0;
  private readonly starIds = new BigInt64Array(BATCH_ROWS);
  private readonly hashes = new BigUint64Array(BATCH_ROWS);
  private readonly flagBits = new Int32Array(BATCH_ROWS);
  private readonly designations: (string | null)[] = [];
  private readonly sourceIds: (string | null)[] = [];
  private readonly numbers = new Map(NUMBER_KEYS.map((key) => [key, new Float64Array(BATCH_ROWS)]));
  private readonly stored = STORED_KEYS.map((key) => this.column(key));
  private readonly instrument = INSTRUMENT_KEYS.map((key) => this.column(key));
  private row = 0;
  /** Value of a column in the row added last; NaN where it is blank. */
  readonly valueOf = (key: string): number => this.numbers.get(key)?.[this.row] ?? Number.NaN;

  private column(key: string): Float64Array {
    const column = this.numbers.get(key);
    if (!column) throw new RangeError(`No column ${key} in the index.`);
    return column;
  }

  get isFull(): boolean {
    return this.length === BATCH_ROWS;
  }

  add(cells: StarCells, assess: ((value: (key: string) => number) => Assessment) | null): void {
    const [starId, designation, sourceId, release, flagBits] = cells;
    const i = this.length++;
    this.row = i;
    this.starIds[i] = BigInt(starId);
    this.designations[i] = designation;
    this.sourceIds[i] = sourceId;
    this.hashes[i] = identityHash(designation, sourceId, release);
    this.flagBits[i] = flagBits;
    for (let c = 0; c < this.stored.length; c++) {
      const column = this.stored[c];
      if (column) column[i] = (cells[FIRST_NUMBER_CELL + c] as number | null) ?? Number.NaN;
    }
    for (const column of this.instrument) column[i] = Number.NaN;
    if (assess) this.write(assess(this.valueOf), i);
  }

  private write(assessment: Assessment, i: number): void {
    this.column("noise_1h")[i] = assessment.noise1h;
    this.column("transits")[i] = assessment.transits;
    this.column("r_min")[i] = assessment.rMin;
    this.column("r_min_err")[i] = assessment.rMinError;
  }

  appendTo(appender: DuckDBAppender): void {
    const chunk = DuckDBDataChunk.create(
      INDEX_COLUMNS.map((c) => c.type),
      this.length,
    );
    INDEX_COLUMNS.forEach(({ name }, c) => {
      const vector = chunk.getColumnVector(c) as unknown as Writable;
      const numbers = this.numbers.get(name);
      if (numbers) fillNumbers(vector, numbers, this.length);
      else this.fillIdentity(name, chunk, c, vector);
    });
    appender.appendDataChunk(chunk);
    this.length = 0;
  }

  private fillIdentity(name: string, chunk: DuckDBDataChunk, c: number, vector: Writable): void {
    if (name === "designation") chunk.setColumnValues(c, this.designations.slice(0, this.length));
    else if (name === "source_id") chunk.setColumnValues(c, this.sourceIds.slice(0, this.length));
    else {
      const source = { star_id: this.starIds, identity_hash: this.hashes, flags_bits: this.flagBits }[name];
      if (!source) throw new RangeError(`No source for the column ${name}.`);
      vector.items.set(source.subarray(0, this.length) as never);
      vector.flush();
    }
  }
}

/** What the vectors of numeric types have in common. */
interface Writable {
  items: { set(values: ArrayLike<number>): void; [index: number]: number };
  validity: { data: BigUint64Array | null; setItemValid(index: number, isValid: boolean): void };
  flush(): void;
}

/** The bits of validity, one per row: the vector's own way of clearing one costs a 64-bit object each time. */
const validityBytes = ({ validity }: Writable, firstBlank: number): Uint8Array => {
  validity.setItemValid(firstBlank, false);
  const { data } = validity;
  return data ? new Uint8Array(data.buffer, data.byteOffset, data.byteLength) : new Uint8Array();
};

const fillNumbers = (vector: Writable, numbers: Float64Array, length: number): void => {
  vector.items.set(numbers.subarray(0, length));
  let bytes: Uint8Array | undefined;
  for (let i = 0; i < length; i++) {
    if (Number.isFinite(numbers[i])) continue;
    bytes ??= validityBytes(vector, i);
    bytes[i >> 3] = (bytes[i >> 3] ?? 0) & ~(1 << (i & 7));
  }
  vector.flush();
};
