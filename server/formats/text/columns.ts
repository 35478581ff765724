import { uniqueNames } from "../delimited/unique-names.ts";
import type { TableColumn, TableMeta } from "../table.ts";
import type { NamesFound } from "./names.ts";
import type { Preamble } from "./preamble.ts";

const MOST_SOURCES = 100;
const LONGEST_SOURCE = 300;

/** How archives describe a column in the comments: name, format and words between tabs, the UCD in brackets at the end. */
const COLUMN = /^Column\t([^\t]+)\t\([^\t]*\)\t([^\t]*)(?:\t\[ucd=([^\]]*)\])?/;

interface Said {
  readonly description: string;
  readonly ucd: string;
}

const saidOf = (comments: readonly string[]): ReadonlyMap<string, Said> =>
  new Map(
    comments.flatMap((comment) => {
      const parts = COLUMN.exec(comment);
      if (!parts) return [];
      const [, name = "", description = "", ucd = ""] = parts;
      return [[name.trim(), { description: description.trim(), ucd: ucd.trim() }] as const];
    }),
  );

/** Columns of text, each with a name of its own and with what the file says of it. */
export const textColumns = (
  found: NamesFound,
  comments: readonly string[],
): { columns: TableColumn[]; renamed: readonly string[] } => {
  const { header, renamed } = uniqueNames(found.names);
  const said = saidOf(comments);
  const columns = header.map(
    (name, at): TableColumn => ({
      name,
      type: "text",
      unit: found.units?.[at] ?? "",
      ucd: said.get(name)?.ucd ?? "",
      description: said.get(name)?.description ?? "",
      nullMark: null,
      frame: null,
    }),
  );
  return { columns, renamed: renamed.map(({ to }) => to) };
};

/** What the comments of a text say of it. */
export const textMeta = ({ comments, title }: Preamble): TableMeta => ({
  title,
  description: null,
  sources: comments
    .filter((comment) => comment.trim() !== "" && !COLUMN.test(comment))
    .slice(0, MOST_SOURCES)
    .map((comment) => comment.trim().slice(0, LONGEST_SOURCE)),
  frame: null,
});
