/** The small language of cuts and merits, as a checked tree. Nothing else of what a person wrote goes any further. */

/** Least and most arguments of each function. */
export const FUNCTIONS = {
  abs: [1, 1],
  sqrt: [1, 1],
  log10: [1, 1],
  exp: [1, 1],
  min: [2, 10],
  max: [2, 10],
  pow: [2, 2],
} as const satisfies Record<string, readonly [number, number]>;
export type FunctionName = keyof typeof FUNCTIONS;

export const ARITHMETIC = ["+", "-", "*", "/", "^"] as const;
export type Arithmetic = (typeof ARITHMETIC)[number];
export const COMPARISONS = ["<", "<=", ">", ">=", "==", "!="] as const;
export type Comparison = (typeof COMPARISONS)[number];

/** A tree that stands for a number. */
export type NumberTree =
  | { readonly kind: "number"; readonly value: number }
  | { readonly kind: "column"; readonly key: string }
  | { readonly kind: "negate"; readonly of: NumberTree }
  | {
      readonly kind: "arithmetic";
      readonly op: Arithmetic;
      readonly left: NumberTree;
      readonly right: NumberTree;
    }
  | { readonly kind: "call"; readonly name: FunctionName; readonly args: readonly NumberTree[] }
  | {
      readonly kind: "choice";
      readonly when: ConditionTree;
      readonly yes: NumberTree;
      readonly no: NumberTree;
    };

/** A tree that holds, fails, or is blank. */
export type ConditionTree =
  | {
      readonly kind: "compare";
      readonly op: Comparison;
      readonly left: NumberTree;
      readonly right: NumberTree;
    }
  | {
      readonly kind: "both" | "either";
      readonly left: ConditionTree;
      readonly right: ConditionTree;
    }
  | { readonly kind: "not"; readonly of: ConditionTree };

export type Tree = NumberTree | ConditionTree;

export const isCondition = (tree: Tree): tree is ConditionTree =>
  tree.kind === "compare" || tree.kind === "both" || tree.kind === "either" || tree.kind === "not";

const parts = (tree: Tree): readonly Tree[] => {
  switch (tree.kind) {
    case "number":
    case "column":
      return [];
    case "negate":
    case "not":
      return [tree.of];
    case "call":
      return tree.args;
    case "choice":
      return [tree.when, tree.yes, tree.no];
    default:
      return [tree.left, tree.right];
  }
};

/** Keys of the columns a tree uses, each once, in the order in which they stand. */
export const columnsUsed = (tree: Tree): readonly string[] => {
  const keys = new Set<string>();
  const visit = (t: Tree): void => {
    if (t.kind === "column") keys.add(t.key);
    for (const part of parts(t)) visit(part);
  };
  visit(tree);
  return [...keys];
};

/** Operations within one another at the deepest place. */
export const depthOf = (tree: Tree): number => 1 + Math.max(0, ...parts(tree).map(depthOf));
