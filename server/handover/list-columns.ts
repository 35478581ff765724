import type { ListMember } from "#shared/api/lists.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { blankKey, COLUMNS, type Column, errorKey } from "#shared/catalogue/columns.ts";

/** One column of a file that leaves: its words for the header, and its text for a star. */
export interface FileColumn {
  readonly name: string;
  readonly datatype: "string" | "int64" | "float64";
  readonly unit: string;
  readonly ucd: string;
  readonly description: string;
  /** Its texts are identifiers, which no writer may change. */
  readonly isIdentifier?: true;
  /** Null is a blank. */
  readonly value: (member: ListMember) => string | number | null;
}

const text = (name: string, description: string, value: FileColumn["value"], ucd = ""): FileColumn => ({
  name,
  datatype: "string",
  unit: "",
  ucd,
  description,
  value,
});

const TEXT_VALUES: Readonly<Record<string, FileColumn["value"]>> = {
  designation: (member) => member.designation,
  source_id: (member) => member.sourceId,
  release: (member) => member.release,
};

const numeric = (c: Column): FileColumn[] => {
  const value: FileColumn = {
    name: c.key,
    datatype: c.kind === "integer" ? "int64" : "float64",
    unit: c.unit,
    ucd: c.ucd,
    description: c.description,
    value: (member) => member.values[c.key] ?? null,
  };
  const error: FileColumn = {
    ...value,
    name: errorKey(c.key),
    ucd: `stat.error;${c.ucd.split(";")[0]}`,
    description: `One-sigma error of ${c.key}`,
    value: (member) => member.values[errorKey(c.key)] ?? null,
  };
  const blank = text(
    blankKey(c.key),
    `Why ${c.key} is blank`,
    (member) => {
      const code = member.blanks[c.key];
      return code === undefined ? null : blankReason(code).key;
    },
    "meta.note",
  );
  return [value, ...(c.hasError ? [error] : []), ...(c.stage === "given" ? [] : [blank])];
};

const registryColumns = (COLUMNS as readonly Column[]).flatMap((c) => {
  const value = TEXT_VALUES[c.key];
  if (!value) return numeric(c);
  const column = text(c.key, c.description, value, c.ucd);
  return [c.key === "source_id" ? { ...column, isIdentifier: true as const } : column];
});

/** A name a column can have in every format: letters, digits and underscores. */
const columnName = (label: string): string =>
  label
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "_")
    .replace(/^_|_$/g, "");

/**
 * The columns of a list's file, in order; one share for each term of its figure of merit. Where the sky is invented
 * every row says so, for a format that has no place for it elsewhere.
 */
export const listColumns = (terms: readonly string[], isInvented: boolean): readonly FileColumn[] => [
  {
    name: "place",
    datatype: "int64",
    unit: "",
    ucd: "meta.number",
    description: "Place in the list, from 1",
    value: (member) => member.place,
  },
  text("state", "In, reserve, held or out", (member) => member.state),
  text("reason", "Why the star is not in", (member) => member.reason || null),
  text("came_in", "What brought the star into the list", (member) => member.cameIn),
  {
    name: "merit",
    datatype: "float64",
    unit: "",
    ucd: "stat.rank",
    description: "Figure of merit, 0 to 100",
    value: (member) => member.merit,
  },
  ...terms.map(
    (label, i): FileColumn => ({
      name: `share_${i + 1}_${columnName(label)}`,
      datatype: "float64",
      unit: "",
      ucd: "",
      description: `Share of the term "${label}" in the merit`,
      value: (member) => member.shares[i] ?? null,
    }),
  ),
  ...registryColumns,
  ...(isInvented ? [text("sky", "Invented: this star does not exist", () => "invented", "meta.note")] : []),
];
