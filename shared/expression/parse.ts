import { type MathNode, parse as parseMath } from "mathjs/number";
import { LIMITS } from "../limits.ts";
import { readSyntaxError, toTree } from "./read-node.ts";
import { type Refusal, Refused, refuse, refuseDepth } from "./refusal.ts";
import { conditionToSql, numberToSql, Parameters } from "./to-sql.ts";
import { type ConditionTree, columnsUsed, depthOf, isCondition, type NumberTree, type Tree } from "./tree.ts";
import { checkUnits } from "./units.ts";

export type Parsed<T extends Tree> =
  | { readonly ok: true; readonly tree: T; readonly columns: readonly string[] }
  | ({ readonly ok: false } & Refusal);

/** Operations within one another. */
const DEEPEST = 100;

const nodeOf = (text: string): MathNode => {
  if (text.trim() === "") refuse("Nothing is written here.", "Write for example teff < 3900.", 0);
  if (text.length > LIMITS.expressionCharacters)
    refuse(
      `An expression has at most ${LIMITS.expressionCharacters} characters; this one has ${text.length}.`,
      "Split it into two cuts.",
      LIMITS.expressionCharacters,
    );
  try {
    // Line breaks would end an expression; a space of the same length keeps positions true.
    return parseMath(text.replaceAll(/\s/g, " "));
  } catch (error) {
    throw readSyntaxError(error, text);
  }
};

const parsed = <T extends Tree>(
  text: string,
  make: (tree: Tree) => T,
  sqlOf: (tree: T) => string,
): Parsed<T> => {
  try {
    const tree = make(toTree(nodeOf(text), text));
    if (depthOf(tree) > DEEPEST) refuseDepth();
    checkUnits(tree);
    sqlOf(tree);
    return { ok: true, tree, columns: columnsUsed(tree) };
  } catch (error) {
    if (error instanceof Refused) return { ok: false, ...error.refusal };
    throw error;
  }
};

/** Reads what a cut asks. */
export const parseCondition = (text: string): Parsed<ConditionTree> =>
  parsed(
    text,
    (tree) =>
      isCondition(tree)
        ? tree
        : refuse(
            "This is a number; a cut asks something.",
            "Compare it with something, for example teff < 3900.",
          ),
    (tree) => conditionToSql(tree, new Parameters()),
  );

/** Reads a number made of columns, as the terms of a figure of merit use. */
export const parseNumber = (text: string): Parsed<NumberTree> =>
  parsed(
    text,
    (tree) =>
      isCondition(tree)
        ? refuse(
            "This asks something; a number is needed here.",
            "Write a column such as r_min, or choose between two numbers: ruwe < 1.4 ? 1 : 0.",
          )
        : tree,
    (tree) => numberToSql(tree, new Parameters()),
  );
