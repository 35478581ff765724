import { Lexer, parseDocument } from "yaml";
import { badHeader } from "./errors.ts";

/** Aliases may not unfold to more than this: a few lines could stand for millions of nodes. */
const MOST_ALIASES = 100;

/**
 * Depth of lists within lists, by brackets and by the place where a line begins: the parser calls itself for each, and
 * would end the process where the stack ends.
 */
const MOST_BRACKETS = 64;
const MOST_INDENT = 200;
/** Several thousand columns take half of it; what the parser makes of more would fill the memory. */
const MOST_LEXEMES = 400_000;

const isTooDeep = (text: string): boolean => {
  let [depth, count] = [0, 0];
  for (const lexeme of new Lexer().lex(text)) {
    if (lexeme === "[" || lexeme === "{") depth++;
    else if (lexeme === "]" || lexeme === "}") depth--;
    if (depth > MOST_BRACKETS || ++count > MOST_LEXEMES) return true;
  }
  return text.split("\n").some((line) => (/^ *(?:[-?:] +)*/.exec(line)?.[0].length ?? 0) > MOST_INDENT);
};

const OPTIONS = {
  schema: "failsafe",
  logLevel: "silent",
  // Each key would be compared with all before it: hostile headers have many.
  uniqueKeys: false,
} as const;

/**
 * The header's YAML as plain values. Every scalar stays the text that it is, so that a column named `1e3` or `no` keeps
 * its name; tags of one program (`!astropy.table.SerializedColumn`) count for nothing.
 */
export const readYaml = (text: string): unknown => {
  if (isTooDeep(text))
    throw badHeader("The header cannot be read as YAML: it holds too many lists within lists.");
  try {
    const document = parseDocument(text, OPTIONS);
    const [error] = document.errors;
    if (error) throw error;
    return document.toJS({ maxAliasCount: MOST_ALIASES });
  } catch (error) {
    const why = error instanceof Error ? error.message.split("\n")[0] : String(error);
    throw badHeader(`The header cannot be read as YAML: ${why}`, error);
  }
};

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value) && !(value instanceof Map);

/** The entries of a mapping, also where it is written as a list of mappings with one key each (`!!omap`). */
export const entriesOf = (node: unknown): ReadonlyMap<string, unknown> => {
  if (node instanceof Map) return new Map([...node].map(([key, value]) => [String(key), value]));
  if (Array.isArray(node)) return new Map(node.flatMap((item) => [...entriesOf(item)]));
  return new Map(isRecord(node) ? Object.entries(node) : []);
};

/** A scalar's text; empty for anything else and for the words that say "nothing". */
export const textIn = (node: unknown): string =>
  typeof node === "string" && node !== "null" && node !== "~" ? node.trim() : "";
