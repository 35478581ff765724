import type { PositionFrame, TableHeader } from "../table.ts";
import { columnsOf, type Field, type FieldWords, fieldOf } from "./fields.ts";
import type { Attributes } from "./words.ts";

const MOST_COLUMNS = 10_000;

/** A FIELD while its children are read. */
interface FieldDraft {
  readonly attributes: Attributes;
  description: string;
  nullMark: string | null;
}

/** A TABLE while its head is read. */
export class TableDraft {
  readonly fields: FieldDraft[] = [];
  readonly parameters: string[] = [];
  description = "";

  constructor(
    readonly attributes: Attributes,
    readonly resource: { readonly name: string; description: string },
  ) {}

  /** How a person names it. */
  get title(): string {
    return this.attributes.name ?? this.attributes.ID ?? this.resource.name;
  }

  get isTooWide(): boolean {
    return this.fields.length > MOST_COLUMNS;
  }

  get declaredRows(): number | null {
    const rows = this.attributes.nrows?.trim() ?? "";
    return /^\d{1,15}$/.test(rows) ? Number(rows) : null;
  }

  /** Fields with the frames that their references name. */
  finishedFields(frames: ReadonlyMap<string, PositionFrame>): Field[] {
    return this.fields.map(({ attributes, description, nullMark }) => {
      const words: FieldWords = {
        name: attributes.name ?? attributes.ID ?? "",
        datatype: attributes.datatype?.trim() ?? "",
        arraysize: attributes.arraysize ?? "",
        unit: attributes.unit ?? "",
        ucd: attributes.ucd ?? "",
        description,
        nullMark,
        frame: frames.get(attributes.ref ?? "") ?? null,
      };
      return fieldOf(words);
    });
  }
}

/** The frame that the columns share, else the only one of the document; null where they differ. */
const sharedFrame = (
  fields: readonly Field[],
  frames: ReadonlyMap<string, PositionFrame>,
  anonymous: readonly PositionFrame[],
): PositionFrame | null => {
  const used = new Set(fields.flatMap((field) => (field.frame ? [field.frame] : [])));
  const candidates = used.size > 0 ? [...used] : [...frames.values(), ...anonymous];
  return candidates.length === 1 ? (candidates[0] ?? null) : null;
};

export interface DocumentWords {
  readonly encoding: string;
  readonly variant: string;
  readonly description: string;
  readonly sources: readonly string[];
  readonly frames: ReadonlyMap<string, PositionFrame>;
  readonly anonymousFrames: readonly PositionFrame[];
}

export const headerOf = (table: TableDraft, fields: readonly Field[], words: DocumentWords): TableHeader => ({
  format: "votable",
  variant: words.variant,
  encoding: words.encoding,
  columns: columnsOf(fields),
  declaredRows: table.declaredRows,
  meta: {
    title: table.title || null,
    description: table.description || table.resource.description || words.description || null,
    sources: [...words.sources],
    frame: sharedFrame(fields, words.frames, words.anonymousFrames),
  },
});
