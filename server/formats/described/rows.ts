import { unprocessable } from "../../errors.ts";
import { Findings } from "../findings.ts";
import { parseNumber } from "../numbers.ts";
import { cutOff } from "../read-records.ts";
import type { RefusedRow, RowBatch } from "../table.ts";
import type { LineBatch } from "../text/text-lines.ts";
import { TypedColumns } from "../text/typed-columns.ts";
import type { DescribedColumn } from "./columns.ts";
import type { DescribedField } from "./field.ts";
import { type Counting, cellsOf, lengthOf, strayBetween } from "./line-cells.ts";
import { RepeatedDescription } from "./repeated-description.ts";
import { isRuleLine } from "./rule.ts";
import { degreesOf, type SexagesimalGroup } from "./sexagesimal.ts";
import { PARTS_BLANK, SECOND_TABLE, SHORT_LINES, SIXTY_CARRIED, UNMARKED_BLANKS } from "./words.ts";

const tooLong = (line: number, length: number, described: number): Error =>
  unprocessable(
    "line-longer-than-described",
    `Line ${line.toLocaleString("en")} has ${length.toLocaleString("en")} characters, and the description ends at ${described.toLocaleString("en")}, so the columns may not be where it says.`,
    {
      hint: "Check that description and data belong together, and whether one of them is of another version.",
    },
  );

const described = (text: string, field: DescribedField | undefined): string =>
  field !== undefined && text === field.nullMark ? "" : text;

/** Turns lines into rows of the described columns, and keeps what does not fit. */
export class DescribedRows {
  /** Rows and refused rows. */
  seen = 0;
  /** All rows have been read. */
  isDone = false;
  readonly findings = new Findings();
  readonly values: TypedColumns;
  private readonly end: number;
  private readonly repeated: RepeatedDescription;
  private isOver = false;

  constructor(
    private readonly fields: readonly DescribedField[],
    private readonly columns: readonly DescribedColumn[],
    private readonly counting: Counting,
    /** Lines of the file before the first row. */
    private readonly linesBefore: number,
  ) {
    this.end = fields.at(-1)?.to ?? 0;
    this.repeated = new RepeatedDescription(fields);
    this.values = new TypedColumns(
      columns.map(({ column, place, group }) => ({
        name: column.name,
        type: column.type,
        nullMarks: group === null && fields[place]?.nullMark ? [fields[place].nullMark] : [],
      })),
    );
  }

  batch({ lines, first, bytes, isOpen }: LineBatch): RowBatch {
    const refused: RefusedRow[] = [];
    let rows = 0;
    for (const [at, line] of lines.entries()) {
      const number = first + at;
      if (number <= this.linesBefore || this.isOutside(line, number)) continue;
      this.seen++;
      const why = this.take(line, number, isOpen);
      if (why === null) rows++;
      else refused.push({ row: this.seen, line: number, text: line, why });
    }
    return { rows, columns: this.values.empty(), refused, bytes };
  }

  /** Blank and ruled lines, and the same description once more. */
  private isOutside(line: string, number: number): boolean {
    if (this.isOver) return true;
    const state = this.repeated.take(line);
    if (state === "other") {
      this.isOver = true;
      this.findings.add(SECOND_TABLE, `line ${number}`);
    }
    return state !== "row" || line.trim() === "" || isRuleLine(line);
  }

  /** Adds one row, or says why it was refused. */
  private take(line: string, number: number, isOpen: boolean): string | null {
    const length = lengthOf(line, this.counting);
    if (length > this.end) throw tooLong(number, length, this.end);
    const stray = strayBetween(line, this.fields, this.counting);
    if (stray >= 0)
      return `Something stands at ${stray + 1}, between two columns, where it may be a part of a value.`;
    const cells = cellsOf(line, this.fields, this.counting);
    // Blanks that are there say "no value"; a line that ends before them may have lost one.
    const missing = line.length < this.end ? this.missing(cells, length) : undefined;
    if (missing) {
      if (isOpen) throw cutOff(number, cells.filter((cell) => cell !== "").length, this.fields.length);
      this.findings.add(SHORT_LINES, `line ${number}: ${length} of ${this.end} characters`);
      return `This line has ${length} characters, and ${missing.label} stands at ${missing.from + 1} to ${missing.to}.`;
    }
    return this.takeCells(cells, number);
  }

  /** A number that a line ends before or within; undefined where what is missing may be blank. */
  private missing(cells: readonly string[], length: number): DescribedField | undefined {
    return this.fields.find((field, at) => {
      if (field.type === "text" || length >= field.to) return false;
      if (length <= field.from) return !field.isNullable;
      const text = cells[at] ?? "";
      const decimals = /\.(\d*)/.exec(text)?.[1]?.length ?? 0;
      return decimals < field.decimals && /^[+-]?[\d.]+$/.test(text) && text !== field.nullMark;
    });
  }

  private takeCells(cells: readonly string[], number: number): string | null {
    const texts: string[] = [];
    for (const { place, group, column } of this.columns) {
      const text = group === null ? (cells[place] ?? "") : this.position(group, cells, number);
      if (text === null) return `The parts of ${column.name} are no position: ${this.parts(group, cells)}.`;
      texts.push(text);
    }
    const why = this.values.take(texts);
    if (why === null) this.noteBlanks(texts);
    return why;
  }

  private noteBlanks(texts: readonly string[]): void {
    for (const [at, { place, group, column }] of this.columns.entries())
      if (group === null && texts[at] === "" && column.type !== "text" && !this.fields[place]?.isNullable)
        this.findings.add(UNMARKED_BLANKS, column.name);
  }

  /** Degrees as text, empty where there is no position, null where its parts are none. */
  private position(group: SexagesimalGroup, cells: readonly string[], number: number): string | null {
    const part = (place: number): string => described(cells[place] ?? "", this.fields[place]);
    const [whole, minutes, seconds] = [part(group.whole), part(group.minutes), part(group.seconds)];
    if (whole === "" && minutes === "" && seconds === "") return "";
    if (whole === "" || minutes === "" || (group.seconds >= 0 && seconds === "")) {
      this.findings.add(PARTS_BLANK, `line ${number}`);
      return "";
    }
    const sign = part(group.sign);
    if (sign !== "" && sign !== "+" && sign !== "-" && sign !== "\u2212") return null;
    const [w, m, s] = [whole, minutes, seconds || "0"].map((text) => parseNumber(text, "."));
    const degrees = degreesOf(
      group.kind,
      sign === "\u2212" ? "-" : sign,
      w ?? Number.NaN,
      m ?? Number.NaN,
      s ?? Number.NaN,
    );
    if (Number.isNaN(degrees)) return null;
    if (m === 60 || s === 60) this.findings.add(SIXTY_CARRIED, `line ${number}`);
    return Object.is(degrees, -0) ? "-0" : String(degrees);
  }

  private parts(group: SexagesimalGroup | null, cells: readonly string[]): string {
    if (group === null) return "";
    return [group.sign, group.whole, group.minutes, group.seconds]
      .filter((place) => place >= 0)
      .map((place) => cells[place] ?? "")
      .join(" ")
      .trim();
  }
}
