import type {
  ConditionalNode,
  ConstantNode,
  FunctionNode,
  MathNode,
  OperatorNode,
  ParenthesisNode,
  RelationalNode,
  SymbolNode,
} from "mathjs/number";
import { NUMERIC_UNITS, nearest } from "./names.ts";
import { Refused, refuse } from "./refusal.ts";
import {
  ARITHMETIC,
  type Arithmetic,
  COMPARISONS,
  type Comparison,
  type ConditionTree,
  FUNCTIONS,
  type FunctionName,
  isCondition,
  type NumberTree,
  type Tree,
} from "./tree.ts";

/** From mathjs's syntax tree to ours: every node is looked up in a closed list, anything else is refused. */

/** The parser keeps no places in its tree, so the first place where the word stands must serve. */
const positionOf = (word: string, text: string): number | null => {
  const escaped = word.replaceAll(/[.*+?^${}()|[\]\\]/g, "\\$&");
  const pattern = /^\w+$/.test(word) ? `(?<![\\w.])${escaped}(?!\\w)` : escaped;
  const index = text.search(new RegExp(pattern, "u"));
  return index < 0 ? null : index;
};

const HINTS: readonly [RegExp, string][] = [
  [/\d,\d/, "Use a point for decimals, for example 0.35."],
  [/&&/, "Write and instead of &&."],
  [/\|\|/, "Write or instead of ||."],
  [/<>/, "Write != for is not."],
];

/** What the parser stumbled over, in our words. */
export const readSyntaxError = (error: unknown, text: string): Refused => {
  const position = error instanceof Error && "char" in error ? Number(error.char) - 1 : null;
  const hint = HINTS.find(([pattern]) => pattern.test(text))?.[1];
  const place = position === null ? "" : text.slice(position, position + 12).trim();
  const message = place
    ? `The expression cannot be read from “${place}” on.`
    : "The expression ends before it is complete.";
  return new Refused({
    message,
    hint: hint ?? "Look for a missing bracket, operator or number there.",
    position: position === null ? null : Math.min(position, text.length),
  });
};

const asNumber = (tree: Tree, doing: string): NumberTree =>
  isCondition(tree)
    ? refuse(
        `${doing} needs numbers, and one side is a condition.`,
        "Set brackets, or join conditions by and, or.",
      )
    : tree;

const asCondition = (tree: Tree, doing: string): ConditionTree =>
  isCondition(tree)
    ? tree
    : refuse(
        `${doing} needs conditions, and one side is a number.`,
        "Compare it first, for example ruwe < 1.4.",
      );

const readConstant = (node: ConstantNode): Tree => {
  const value: unknown = node.value;
  if (typeof value !== "number")
    return refuse("Only numbers and columns can stand here.", "Write a number without quotes.");
  if (!Number.isFinite(value))
    return refuse("This number is too large to compute with.", "Write a number below 1e308.");
  return { kind: "number", value };
};

const readSymbol = (node: SymbolNode, text: string): Tree => {
  const { name } = node;
  if (NUMERIC_UNITS.has(name)) return { kind: "column", key: name };
  const near = nearest(name, NUMERIC_UNITS.keys());
  return refuse(
    `There is no column ${name}.`,
    near ? `Did you mean ${near}?` : "Choose a column from the list, for example teff or r_min.",
    positionOf(name, text),
  );
};

const readCall = (node: FunctionNode, text: string): Tree => {
  const { name } = node.fn as unknown as { name: string };
  if (!Object.hasOwn(FUNCTIONS, name)) {
    const near = nearest(name, Object.keys(FUNCTIONS));
    return refuse(
      `There is no function ${name}.`,
      near ? `Did you mean ${near}?` : `The functions are ${Object.keys(FUNCTIONS).join(", ")}.`,
      positionOf(name, text),
    );
  }
  const known = name as FunctionName;
  const [least, most] = FUNCTIONS[known];
  if (node.args.length < least || node.args.length > most)
    refuse(
      `${name} takes ${least === most ? least : `${least} to ${most}`} ${most === 1 ? "value" : "values"}, not ${node.args.length}.`,
      `Write for example ${name}(${["teff", "3900"].slice(0, least).join(", ")}).`,
      positionOf(name, text),
    );
  return { kind: "call", name: known, args: node.args.map((arg) => asNumber(toTree(arg, text), name)) };
};

const isArithmetic = (op: string): op is Arithmetic => (ARITHMETIC as readonly string[]).includes(op);
const isComparison = (op: string): op is Comparison => (COMPARISONS as readonly string[]).includes(op);

const readUnary = (op: string, of: Tree, text: string): Tree => {
  if (op === "not") return { kind: "not", of: asCondition(of, "not") };
  if (op === "-") {
    const number = asNumber(of, "A minus sign");
    return number.kind === "number"
      ? { kind: "number", value: -number.value }
      : { kind: "negate", of: number };
  }
  if (op === "+") return asNumber(of, "A plus sign");
  return refuse(
    `${op} is not used here.`,
    "Write + - * / ^, comparisons, and, or, not.",
    positionOf(op, text),
  );
};

const readOperator = (node: OperatorNode, text: string): Tree => {
  const op: string = node.op;
  const [left, right] = node.args.map((arg) => toTree(arg, text));
  if (!left) return refuse(`${op} stands alone.`, "Put a number or column beside it.", positionOf(op, text));
  if (!right) return readUnary(op, left, text);
  if (node.implicit)
    return refuse(
      "Two values stand side by side without a sign between them.",
      "Write * for a product, for example 2 * radius. Units are not written: each column has its own.",
    );
  if (isArithmetic(op))
    return { kind: "arithmetic", op, left: asNumber(left, op), right: asNumber(right, op) };
  if (isComparison(op)) return { kind: "compare", op, left: asNumber(left, op), right: asNumber(right, op) };
  if (op === "and" || op === "or")
    return {
      kind: op === "and" ? "both" : "either",
      left: asCondition(left, op),
      right: asCondition(right, op),
    };
  return refuse(
    `${op} is not used here.`,
    "Write + - * / ^, comparisons, and, or, not.",
    positionOf(op, text),
  );
};

const RELATIONS: Record<string, Comparison> = {
  smaller: "<",
  smallerEq: "<=",
  larger: ">",
  largerEq: ">=",
  equal: "==",
  unequal: "!=",
};

/** `2600 <= teff < 3900`: each neighbouring pair compared. */
const readChain = (node: RelationalNode, text: string): Tree => {
  const values = (node.params as MathNode[]).map((param) => asNumber(toTree(param, text), "A comparison"));
  const pairs = node.conditionals.map((name, i): ConditionTree => {
    const [op, left, right] = [RELATIONS[name], values[i], values[i + 1]];
    if (!op || !left || !right) return refuse("This comparison cannot be read.", "Join comparisons by and.");
    return { kind: "compare", op, left, right };
  });
  return pairs.reduce((left, right): ConditionTree => ({ kind: "both", left, right }));
};

const readChoice = (node: ConditionalNode, text: string): Tree => ({
  kind: "choice",
  when: asCondition(toTree(node.condition, text), "?"),
  yes: asNumber(toTree(node.trueExpr, text), "?"),
  no: asNumber(toTree(node.falseExpr, text), "?"),
});

export const toTree = (node: MathNode, text: string): Tree => {
  switch (node.type) {
    case "ConstantNode":
      return readConstant(node as ConstantNode);
    case "SymbolNode":
      return readSymbol(node as SymbolNode, text);
    case "ParenthesisNode":
      return toTree((node as ParenthesisNode).content, text);
    case "OperatorNode":
      return readOperator(node as OperatorNode, text);
    case "FunctionNode":
      return readCall(node as FunctionNode, text);
    case "RelationalNode":
      return readChain(node as RelationalNode, text);
    case "ConditionalNode":
      return readChoice(node as ConditionalNode, text);
    case "AssignmentNode":
    case "FunctionAssignmentNode":
      return refuse("A single = gives a name to something.", "Write == to compare.", positionOf("=", text));
    default:
      return refuse(
        "This form is not part of the language of cuts.",
        "Use columns, numbers, + - * / ^, comparisons, and, or, not.",
      );
  }
};
