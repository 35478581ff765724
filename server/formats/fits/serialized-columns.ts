import { AppError } from "../../errors.ts";
import { entriesOf, readYaml, textIn } from "../ecsv/yaml.ts";
import type { TableColumn } from "../table.ts";

/** Marks of a block of comments in which a program keeps, as YAML, what the keywords have no place for. */
const BEGINS = /^--BEGIN-.*SERIALIZED-COLUMNS--$/;
const ENDS = /^--END-.*SERIALIZED-COLUMNS--$/;

/** Longer lines are cut there and marked by one character more. */
const LINE_LENGTH = 70;

export const isBlockBegin = (comment: string): boolean => BEGINS.test(comment.trim());
export const isBlockEnd = (comment: string): boolean => ENDS.test(comment.trim());

const blockOf = (comments: readonly string[]): string => {
  const begin = comments.findIndex(isBlockBegin);
  const end = comments.findIndex(isBlockEnd);
  if (begin < 0 || end < begin) return "";
  return comments
    .slice(begin + 1, end)
    .map((line) => (line.length === LINE_LENGTH + 1 ? line.slice(0, LINE_LENGTH) : `${line}\n`))
    .join("");
};

/** The words of a block that cannot be read are done without: the keywords say all that the values need. */
const readBlock = (block: string): unknown => {
  try {
    return readYaml(block);
  } catch (error) {
    if (error instanceof AppError) return null;
    throw error;
  }
};

type Words = Pick<TableColumn, "unit" | "ucd" | "description">;

const wordsOf = (column: ReadonlyMap<string, unknown>): Words => ({
  unit: textIn(column.get("unit")),
  ucd: textIn(entriesOf(column.get("meta")).get("ucd")),
  description: textIn(column.get("description")),
});

/** Columns with the unit, UCD and description that only a block of the header's comments has. */
export const withSerializedWords = (
  columns: readonly TableColumn[],
  comments: readonly string[],
): readonly TableColumn[] => {
  const block = blockOf(comments);
  if (block === "") return columns;
  const described = entriesOf(readBlock(block)).get("datatype");
  const byName = new Map<string, Words>();
  for (const node of Array.isArray(described) ? described : []) {
    const column = entriesOf(node);
    byName.set(textIn(column.get("name")), wordsOf(column));
  }
  return columns.map((column) => {
    const words = byName.get(column.name);
    if (!words) return column;
    return {
      ...column,
      unit: column.unit || words.unit,
      ucd: column.ucd || words.ucd,
      description: column.description || words.description,
    };
  });
};
