import type { Findings } from "../findings.ts";
import type { PositionFrame, TableHeader } from "../table.ts";
import { BatchBuilder } from "./batch-builder.ts";
import { BinaryRows } from "./binary-rows.ts";
import type { DataBlock } from "./data-block.ts";
import { notVotable, short, unreadable } from "./faults.ts";
import { type Field, nameOf } from "./fields.ts";
import type { MarkupEvents } from "./markup.ts";
import { StreamBlock } from "./stream-block.ts";
import { headerOf, TableDraft } from "./table-draft.ts";
import { TabledataBlock } from "./tabledata-block.ts";
import { TextCells } from "./text-cells.ts";
import {
  ARRAY_COLUMNS,
  type Attributes,
  frameOf,
  isSourceInfo,
  NO_DATA,
  OTHER_TABLES,
  OVERFLOW,
  oneLine,
  PARAMETERS,
  SERVICE_ERROR,
  TIME_SYSTEMS,
  timeSystemText,
  UNKNOWN_DATATYPES,
} from "./words.ts";

const LONGEST_WORDS = 20_000;
const MOST_SOURCES = 100;
const MOST_SYSTEMS = 1_000;

const BINARY_FORMS = new Set(["BINARY", "BINARY2"]);

const titleOf = (table: TableDraft): string => table.title || "a table without a name";

/** The table that is read. */
export interface ChosenTable {
  readonly header: TableHeader;
  readonly fields: readonly Field[];
  readonly batch: BatchBuilder;
}

/** Gathers what a document says of itself and of its tables, and hands the rows of the first to a block. */
export class VotableDocument implements MarkupEvents {
  /** The element with rows that is being read. */
  block: DataBlock | null = null;
  chosen: ChosenTable | null = null;
  isClosed = false;
  /** Words of the service's own error, where it reports one. */
  serviceError: string | null = null;
  private readonly path: string[] = [];
  private readonly frames = new Map<string, PositionFrame>();
  private readonly anonymousFrames: PositionFrame[] = [];
  private readonly timeSystems = new Map<string, string>();
  private readonly sources: string[] = [];
  private resource = { name: "", description: "" };
  private table: TableDraft | null = null;
  private info: Attributes = {};
  private description = "";
  private words = "";
  private variant = "";
  private isReadingChosen = false;
  /** The tables without data, and the first of them that has columns. */
  private readonly tablesWithoutData: string[] = [];
  private emptyTable: TableDraft | null = null;

  constructor(
    private readonly encoding: string,
    private readonly findings: Findings,
  ) {}

  /** Takes the first table that has columns for one of no rows, which some programs write without data. */
  chooseEmpty(): void {
    if (!this.emptyTable) return;
    this.tablesWithoutData.splice(this.tablesWithoutData.indexOf(titleOf(this.emptyTable)), 1);
    this.table = this.emptyTable;
    this.choose("no data");
    this.findings.add(NO_DATA);
  }

  open(name: string, attributes: Attributes, prefix: string): void {
    const parent = this.path.at(-1);
    this.path.push(name);
    if (this.block) this.block.open(name, attributes, prefix);
    else if (parent === undefined) this.openRoot(name);
    else this.openInside(name, parent, attributes, prefix);
  }

  text(text: string): void {
    if (this.block) this.block.text(text);
    else if (this.words.length < LONGEST_WORDS) this.words += text;
  }

  close(name: string): void {
    this.path.pop();
    if (this.block) {
      if (name === "TABLEDATA" || name === "STREAM") this.block.finish();
      else this.block.close(name);
    } else this.closeInside(name);
    if (this.path.length === 0) this.isClosed = true;
  }

  private openRoot(name: string): void {
    if (name !== "VOTABLE") throw notVotable(`its outermost element is ${short(name)}, not VOTABLE`);
  }

  private openInside(name: string, parent: string, attributes: Attributes, prefix: string): void {
    switch (name) {
      case "RESOURCE":
        this.resource = { name: attributes.name ?? attributes.ID ?? "", description: "" };
        break;
      case "TABLE":
        this.table = new TableDraft(attributes, this.resource);
        break;
      case "FIELD":
        if (parent === "TABLE") this.addField(attributes);
        break;
      case "VALUES":
        if (parent === "FIELD") this.addNullMark(attributes.null);
        break;
      case "PARAM":
        if (parent === "TABLE") this.addParameter(attributes);
        break;
      case "COOSYS":
        this.addFrame(attributes);
        break;
      case "TIMESYS":
        if (this.timeSystems.size < MOST_SYSTEMS)
          this.timeSystems.set(attributes.ID ?? "", timeSystemText(attributes));
        break;
      case "INFO":
        this.info = attributes;
        this.words = "";
        break;
      case "DESCRIPTION":
        this.words = "";
        break;
      case "DATA":
        this.variant = "";
        break;
      default:
        this.openData(name, parent, attributes, prefix);
    }
  }

  private openData(name: string, parent: string, attributes: Attributes, prefix: string): void {
    if (name === "TABLEDATA" && parent === "DATA") this.beginTabledata(prefix);
    else if (BINARY_FORMS.has(name) && parent === "DATA") this.choose(name);
    else if (name === "STREAM" && BINARY_FORMS.has(parent)) this.beginStream(attributes);
    else if (name === "FITS" && parent === "DATA" && !this.chosen)
      throw unreadable(
        "votable-fits-inside",
        "The VOTable holds its rows as a FITS file inside, which is not read from there.",
        "Bring the FITS file itself, or get the table in its BINARY2 or TABLEDATA form.",
      );
  }

  private closeInside(name: string): void {
    const words = oneLine(this.words);
    if (name === "DESCRIPTION") this.addDescription(words);
    else if (name === "INFO") this.addInfo(this.info, words);
    else if (name === "TABLE") this.closeTable();
    this.words = "";
  }

  private closeTable(): void {
    if (this.table && !this.isReadingChosen) {
      const title = titleOf(this.table);
      if (this.chosen) this.findings.add(OTHER_TABLES, title);
      else if (this.tablesWithoutData.length < MOST_SOURCES) this.tablesWithoutData.push(title);
      if (!this.chosen && this.table.fields.length > 0) this.emptyTable ??= this.table;
    }
    this.isReadingChosen = false;
    this.table = null;
  }

  private addField(attributes: Attributes): void {
    this.table?.fields.push({ attributes, description: "", nullMark: null });
    if (!this.table?.isTooWide) return;
    throw unreadable(
      "too-many-columns",
      "The table has more than 10 000 columns, more than can be read.",
      "Get the table again with the columns that are needed.",
    );
  }

  private addNullMark(mark: string | undefined): void {
    const field = this.table?.fields.at(-1);
    if (field && mark !== undefined) field.nullMark ??= mark;
  }

  private addParameter({ name, value, unit }: Attributes): void {
    if (!this.table || this.table.parameters.length >= MOST_SOURCES) return;
    this.table.parameters.push(oneLine(`${name ?? ""} = ${value ?? ""} ${unit ?? ""}`));
  }

  private addFrame(attributes: Attributes): void {
    if (this.frames.size + this.anonymousFrames.length >= MOST_SYSTEMS) return;
    if (attributes.ID === undefined) this.anonymousFrames.push(frameOf(attributes));
    else this.frames.set(attributes.ID, frameOf(attributes));
  }

  private addDescription(words: string): void {
    const parent = this.path.at(-1);
    const field = this.table?.fields.at(-1);
    if (parent === "FIELD" && field) field.description = words;
    else if (parent === "TABLE" && this.table) this.table.description = words;
    else if (parent === "RESOURCE") this.resource.description = words;
    else if (parent === "VOTABLE") this.description = words;
  }

  private addInfo({ name = "", value = "" }: Attributes, words: string): void {
    if (name.toUpperCase() === "QUERY_STATUS") this.addStatus(value.trim().toUpperCase(), words);
    else if (isSourceInfo(name) && !this.chosen && this.sources.length < MOST_SOURCES)
      this.sources.push(`${name}: ${oneLine(value || words)}`);
  }

  private addStatus(status: string, words: string): void {
    if (status === "OVERFLOW") this.findings.add(OVERFLOW, words || status);
    if (status !== "ERROR") return;
    this.serviceError = words;
    this.findings.add(SERVICE_ERROR, words || status);
  }

  private beginTabledata(prefix: string): void {
    this.choose("TABLEDATA");
    if (!this.isReadingChosen || !this.chosen) return;
    const { fields, batch } = this.chosen;
    this.block = new TabledataBlock(new TextCells(fields, batch, this.findings), prefix);
  }

  private beginStream({ href, encoding }: Attributes): void {
    if (!this.isReadingChosen || !this.chosen) {
      this.block = new StreamBlock(null);
      return;
    }
    if (href !== undefined)
      throw unreadable(
        "votable-data-elsewhere",
        "The rows of the table are not in the file, which only says where they are; nothing is fetched from there.",
        "Get the table with its rows inside the file.",
      );
    if (encoding !== undefined && encoding.trim().toLowerCase() !== "base64")
      throw unreadable(
        "votable-stream-encoding",
        `The rows of the table are encoded as "${short(encoding)}"; base64 is what can be read inside a file.`,
        "Get the table in its TABLEDATA form or with base64.",
      );
    const { fields, batch } = this.chosen;
    this.block = new StreamBlock(new BinaryRows(fields, batch, this.findings, this.variant === "BINARY2"));
  }

  /** Takes the table for the one to read, where none was before. */
  private choose(variant: string): void {
    if (this.chosen || !this.table) return;
    this.variant = variant;
    const fields = this.table.finishedFields(this.frames);
    if (fields.length === 0)
      throw unreadable(
        "votable-no-columns",
        "The table has rows but no columns: there is no FIELD before its data.",
        "Get the table again from its service or archive.",
      );
    const header = headerOf(this.table, fields, {
      encoding: this.encoding,
      variant,
      description: this.description,
      sources: this.sources,
      frames: this.frames,
      anonymousFrames: this.anonymousFrames,
    });
    this.chosen = { header, fields, batch: new BatchBuilder(header.columns) };
    this.emptyTable = null;
    this.isReadingChosen = true;
    this.tellOf(this.table, fields);
  }

  private tellOf(table: TableDraft, fields: readonly Field[]): void {
    for (const [index, field] of fields.entries()) {
      const name = nameOf(field, index);
      if (field.type === null) this.findings.add(ARRAY_COLUMNS, name);
      if (!field.layout)
        this.findings.add(UNKNOWN_DATATYPES, `${name}: ${field.datatype} ${field.arraysize}`);
      const system = this.timeSystems.get(table.fields[index]?.attributes.ref ?? "\0");
      if (system !== undefined) this.findings.add(TIME_SYSTEMS, `${name}: ${system}`);
    }
    for (const parameter of table.parameters) this.findings.add(PARAMETERS, parameter);
    for (const title of this.tablesWithoutData) this.findings.add(OTHER_TABLES, title);
  }
}
