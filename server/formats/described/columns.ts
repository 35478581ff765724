import { uniqueNames } from "../delimited/unique-names.ts";
import type { PositionFrame, TableColumn } from "../table.ts";
import type { DescribedField } from "./field.ts";
import { placesOf, type SexagesimalGroup, sexagesimalGroups } from "./sexagesimal.ts";

/** A column of the table as it is read: one field, or a position made of several. */
export interface DescribedColumn {
  readonly column: TableColumn;
  /** Place of its field, the first of several. */
  readonly place: number;
  /** Null where it is one field. */
  readonly group: SexagesimalGroup | null;
}

const SYSTEM = /\b(ICRS|FK[45])\b/i;
const EQUINOX = /\bequinox\s*[=:]?\s*([JB]?\d{4}(?:\.\d+)?)/i;
const EPOCH = /\bep(?:och)?\.?\s*[=:]?\s*([JB]?\d{4}(?:\.\d+)?)/i;
const BARE = /\(?\b([JB](?:1950|2000)(?:\.0)?)\b\)?/;

/** Frame, equinox and epoch that the words of a position name; a bare J2000 is the equinox, as the format has it. */
const frameOf = (words: string): PositionFrame | null => {
  const system = SYSTEM.exec(words)?.[1] ?? null;
  const epoch = EPOCH.exec(words)?.[1] ?? null;
  const rest = words.replace(EPOCH, "");
  const equinox = EQUINOX.exec(rest)?.[1] ?? BARE.exec(rest)?.[1] ?? null;
  return system === null && epoch === null && equinox === null ? null : { system, equinox, epoch };
};

const POSITION = /^(?:RA|DE)(?:deg|[hms-]|d|rad|)\w*$/;

const fieldColumn = (field: DescribedField, place: number): DescribedColumn => ({
  column: {
    name: field.label,
    type: field.type,
    unit: field.unit,
    ucd: "",
    description: field.limits === "" ? field.description : `${field.description} ${field.limits}`.trim(),
    nullMark: field.nullMark,
    frame: POSITION.test(field.label) ? frameOf(field.description) : null,
  },
  place,
  group: null,
});

const WORDS = {
  RA: { name: "RAdeg", what: "Right ascension in degrees, from the columns" },
  DE: { name: "DEdeg", what: "Declination in degrees, from the columns" },
} as const;

const groupColumn = (fields: readonly DescribedField[], group: SexagesimalGroup): DescribedColumn => {
  const places = placesOf(group);
  const labels = places.map((place) => fields[place]?.label ?? "");
  const words = fields[group.whole]?.description ?? "";
  const { name, what } = WORDS[group.kind];
  return {
    column: {
      name: `${name}${group.suffix}`,
      type: "float64",
      unit: "deg",
      ucd: "",
      description: `${what} ${labels.join(", ")}: ${words}`,
      nullMark: null,
      frame: frameOf(words),
    },
    place: places[0] ?? 0,
    group,
  };
};

/** The columns of a described table in its order; parts of a position become one column where the first of them stands. */
export const describedColumns = (
  fields: readonly DescribedField[],
): { columns: DescribedColumn[]; renamed: readonly string[] } => {
  const groups = sexagesimalGroups(fields);
  const taken = new Set(groups.flatMap(placesOf));
  const columns = [
    ...fields.flatMap((field, place) => (taken.has(place) ? [] : [fieldColumn(field, place)])),
    ...groups.map((group) => groupColumn(fields, group)),
  ].sort((a, b) => a.place - b.place);
  const { header, renamed } = uniqueNames(columns.map(({ column }) => column.name));
  return {
    columns: columns.map((c, at) => ({ ...c, column: { ...c.column, name: header[at] ?? c.column.name } })),
    renamed: renamed.map(({ to }) => to),
  };
};
