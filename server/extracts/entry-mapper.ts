import type { ColumnCard, ColumnHealth, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";
import { GIVEN } from "../catalogue/adopt.ts";
import { normaliseDesignation } from "../catalogue/designation.ts";
import type { Value } from "../database/bulk.ts";
import type { LineBuffer } from "../database/line-buffer.ts";
import type { ColumnValues } from "../formats/table.ts";
import { ColumnProfile } from "./column-profile.ts";
import { convertBatch } from "./convert-batch.ts";
import { NumberColumn } from "./number-column.ts";
import { TextColumn } from "./text-column.ts";

/** Temperature and distance as given are kept apart from what the recipe makes of them. */
const storedKey = (means: string): string => means.replace(/^(teff|distance)/, "$1_given");

const at = (means: string): number => GIVEN.indexOf(storedKey(means));
const [RA, EPOCH, RELEASE] = [at("ra"), at("epoch"), at("release")];

interface UsedColumn {
  readonly reader: NumberColumn | TextColumn;
  readonly profile: ColumnProfile;
}

const usedColumn = (card: ColumnCard, plan: ReadingPlan): UsedColumn => ({
  reader: findMeaning(card.means)?.kind === "text" ? new TextColumn(card) : new NumberColumn(card, plan),
  profile: new ColumnProfile(card),
});

/**
 * Makes entries of the rows of a file under its reading plan, batch by batch: column by column while it reads and converts,
 * row by row only to write. Nothing is made anew for a row.
 */
export class EntryMapper {
  /** Columns of the entry table that it writes, in that order. */
  readonly written: readonly string[];
  private readonly used: readonly UsedColumn[];
  private readonly refusals = new Map<number, string>();
  private readonly release: string;
  private readonly epoch: number | null;
  private readonly ra: NumberColumn | undefined;
  private readonly dec: NumberColumn | undefined;
  private readonly source: TextColumn | undefined;
  private readonly designation: TextColumn | undefined;
  private readonly releases: TextColumn | undefined;
  private readonly epochs: NumberColumn | undefined;

  constructor(private readonly plan: ReadingPlan) {
    this.used = plan.columns.filter((c) => c.means !== KEPT).map((card) => usedColumn(card, plan));
    const [number, text] = [this.find(NumberColumn), this.find(TextColumn)];
    this.ra = number("ra");
    this.dec = number("dec");
    this.epochs = number("epoch");
    this.source = text("source_id");
    this.designation = text("designation");
    this.releases = text("release");
    this.release = plan.release;
    this.epoch = this.ra ? plan.epoch : null;
    this.written = [
      ...this.used.map(({ reader }) => storedKey(reader.card.means)),
      ...(this.releases || this.release === "" ? [] : ["release"]),
      ...(this.epochs || this.epoch === null ? [] : ["epoch"]),
    ];
  }

  /** Reads a batch of the file's columns. */
  read(columns: readonly ColumnValues[], rows: number): void {
    this.refusals.clear();
    const refuse = (row: number, why: string): void => {
      if (!this.refusals.has(row)) this.refusals.set(row, why);
    };
    for (const { reader } of this.used) reader.read(columns[reader.card.index] ?? [], rows, refuse);
    if (this.ra && this.dec) refuseStrayPositions(this.ra.values, this.dec.values, rows, refuse);
    convertBatch(
      this.plan,
      this.used.flatMap(({ reader }) => (reader instanceof NumberColumn ? [reader] : [])),
      rows,
    );
  }

  /** Why the row cannot be an entry; null when it can. */
  troubleOf(row: number): string | null {
    const refusal = this.refusals.size > 0 ? this.refusals.get(row) : undefined;
    if (refusal !== undefined) return refusal;
    const isPlaced = this.ra !== undefined && !Number.isNaN(this.ra.values[row] ?? Number.NaN);
    if (isPlaced || this.source?.values[row] || this.designation?.values[row]) return null;
    return "Nothing in this row names or places a star.";
  }

  /** Names the star within the file, so that it is taken once; "" where nothing names it. */
  identityOf(row: number): string {
    const source = this.source?.values[row] ?? "";
    if (source !== "") return `i|${this.releases?.values[row] || this.release}|${source}`;
    const name = this.designation?.values[row] ?? "";
    return name === "" ? "" : `n|${normaliseDesignation(name)}`;
  }

  /** Writes the cells of a row, in the order of `written`, and takes the row into what is said of each column. */
  write(row: number, lines: LineBuffer): void {
    for (const { reader, profile } of this.used)
      if (reader instanceof NumberColumn) this.writeNumber(reader, profile, row, lines);
      else this.writeText(reader, profile, row, lines);
    if (!this.releases && this.release !== "") lines.text(this.release);
    if (!this.epochs && this.epoch !== null) this.writeEpoch(row, lines);
  }

  /** The row as values, in the order of `GIVEN`. */
  valuesOf(row: number): Value[] {
    const values: Value[] = new Array(GIVEN.length).fill(null);
    for (const { reader } of this.used) {
      const value = reader.values[row];
      if (value !== "" && !Number.isNaN(value)) values[at(reader.card.means)] = value ?? null;
    }
    values[RELEASE] ??= this.release === "" ? null : this.release;
    if (values[RA] !== null) values[EPOCH] ??= this.epoch;
    return values;
  }

  health(): ColumnHealth[] {
    return this.used.map(({ profile }) => profile.health());
  }

  private writeNumber(column: NumberColumn, profile: ColumnProfile, row: number, lines: LineBuffer): void {
    const value = column.values[row] ?? Number.NaN;
    if (Number.isNaN(value)) {
      profile.addBlank(column.textAt(row));
      if (column === this.epochs && this.epoch !== null) this.writeEpoch(row, lines);
      else lines.blank();
      return;
    }
    profile.add(value);
    if (column.isPlain[row] === 1) lines.plain(column.textAt(row));
    else lines.number(value);
  }

  private writeText(column: TextColumn, profile: ColumnProfile, row: number, lines: LineBuffer): void {
    const text = column.values[row] ?? "";
    if (text !== "") {
      profile.addText();
      lines.text(text);
      return;
    }
    profile.addBlank(column.textAt(row));
    if (column === this.releases && this.release !== "") lines.text(this.release);
    else lines.blank();
  }

  /** The plan's epoch belongs to rows that have a position. */
  private writeEpoch(row: number, lines: LineBuffer): void {
    if (Number.isNaN(this.ra?.values[row] ?? Number.NaN)) lines.blank();
    else lines.number(this.epoch ?? Number.NaN);
  }

  private find<T extends NumberColumn | TextColumn>(kind: abstract new (...args: never[]) => T) {
    return (means: string): T | undefined => {
      const found = this.used.find(({ reader }) => reader.card.means === means)?.reader;
      return found instanceof kind ? found : undefined;
    };
  }
}

/** Positions are judged in the frame of the file. */
const refuseStrayPositions = (
  ras: Float64Array,
  decs: Float64Array,
  rows: number,
  refuse: (row: number, why: string) => void,
): void => {
  for (let row = 0; row < rows; row++) {
    const ra = ras[row] ?? Number.NaN;
    const dec = decs[row] ?? Number.NaN;
    if (Number.isNaN(ra) || Number.isNaN(dec)) {
      if (Number.isNaN(ra) !== Number.isNaN(dec)) refuse(row, "Only one of RA and Dec is given.");
    } else if (ra < 0 || ra >= 360) refuse(row, `RA ${ra}° lies outside 0 to 360°.`);
    else if (Math.abs(dec) > 90) refuse(row, `Dec ${dec}° lies beyond a pole.`);
  }
};
