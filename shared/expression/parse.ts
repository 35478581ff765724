import { type MathNode, parse as parseMath } from "mathjs/number";
import { LIMITS } from "../limits.ts";
import { EXPRESSION_NAMES, nearestName, unitOf } from "./names.ts";
import {
  type Arithmetic,
  type Comparison,
  type ConditionTree,
  FUNCTIONS,
  type FunctionName,
  type NumberTree,
  type Parsed,
  type Refusal,
} from "./syntax.ts";

/** A refusal on its way out of the tree. */
class Refused extends Error {
  constructor(
    message: string,
    readonly hint: string,
    readonly word?: string,
  ) {
    super(message);
  }
}

const ARITHMETIC: Readonly<Record<string, Arithmetic>> = { add: "+", subtract: "-", multiply: "*", divide: "/", pow: "^" };
const COMPARISON: Readonly<Record<string, Comparison>> = {
  smaller: "<",
  smallerEq: "<=",
  larger: ">",
  largerEq: ">=",
  equal: "==",
  unequal: "!=",
};

/** What mathjs hands over, seen as plain data: its kinds are checked here one by one. */
interface Node {
  readonly type: string;
  readonly fn?: unknown;
  readonly name?: string;
  readonly value?: unknown;
  readonly args?: readonly Node[];
  readonly content?: Node;
  readonly params?: readonly Node[];
  readonly conditionals?: readonly string[];
}

const functionName = (node: Node): string => {
  const fn = node.fn as { name?: string } | string | undefined;
  return typeof fn === "string" ? fn : (fn?.name ?? node.name ?? "");
};

const isFunction = (name: string): name is FunctionName => (FUNCTIONS as readonly string[]).includes(name);

const refuseKind = (node: Node): never => {
  throw new Refused(
    `${node.type.replace("Node", "").toLowerCase()}s have no place here.`,
    `Use columns, numbers, + − * / ^, comparisons, and, or, not, and ${FUNCTIONS.join(", ")}.`,
  );
};

const column = (name: string): NumberTree => {
  if (EXPRESSION_NAMES.has(name)) return { kind: "column", key: name };
  const near = nearestName(name);
  throw new Refused(
    `There is no column called ${name}.`,
    near ? `Did you mean ${near}?` : "Open the list of columns to see their names.",
    name,
  );
};

const constant = (value: unknown): NumberTree => {
  if (typeof value === "number" && Number.isFinite(value)) return { kind: "constant", value };
  throw new Refused("Only finite numbers can stand here.", "Write a number such as 3900 or 1.4.");
};

const call = (node: Node): NumberTree => {
  const name = functionName(node);
  const given = node.args ?? [];
  if (!isFunction(name))
    throw new Refused(`There is no function called ${name}.`, `The functions are ${FUNCTIONS.join(", ")}.`, name);
  const isOpen = name === "min" || name === "max";
  if (isOpen ? given.length < 2 : given.length !== 1)
    throw new Refused(`${name} takes ${isOpen ? "two values or more" : "one value"}.`, `Write ${name}(${isOpen ? "a, b" : "a"}).`, name);
  return { kind: "call", name, arguments: given.map(toNumber) };
};

const operation = (node: Node): NumberTree => {
  const name = functionName(node);
  const [left, right] = node.args ?? [];
  if (name === "unaryMinus" && left) return { kind: "negative", of: toNumber(left) };
  if (name === "unaryPlus" && left) return toNumber(left);
  const operator = ARITHMETIC[name];
  if (operator && left && right) return sameUnits(operator, toNumber(left), toNumber(right));
  throw new Refused("A condition stands where a number is needed.", "Compare numbers with <, <=, >, >= and join conditions with and, or.");
};

const toNumber = (node: Node): NumberTree => {
  switch (node.type) {
    case "ConstantNode":
      return constant(node.value);
    case "SymbolNode":
      return column(node.name ?? "");
    case "ParenthesisNode":
      return node.content ? toNumber(node.content) : refuseKind(node);
    case "FunctionNode":
      return call(node);
    case "OperatorNode":
      return operation(node);
    default:
      return refuseKind(node);
  }
};

/** Unit of a tree where it is plain to see: a column or sums of like columns; null where it is not (products, functions). */
const unitOfTree = (tree: NumberTree): string | null => {
  if (tree.kind === "column") return unitOf(tree.key);
  if (tree.kind === "negative") return unitOfTree(tree.of);
  if (tree.kind === "arithmetic" && (tree.operator === "+" || tree.operator === "-"))
    return unitOfTree(tree.left) ?? unitOfTree(tree.right);
  return null;
};

const requireSameUnit = (left: NumberTree, right: NumberTree, verb: string): void => {
  const [a, b] = [unitOfTree(left), unitOfTree(right)];
  if (a === null || b === null || a === b) return;
  const said = (unit: string): string => (unit === "" ? "a pure number" : unit);
  throw new Refused(`${said(a)} and ${said(b)} cannot be ${verb}.`, "Bring both to the same unit, or divide one by the other.");
};

const sameUnits = (operator: Arithmetic, left: NumberTree, right: NumberTree): NumberTree => {
  if (operator === "+" || operator === "-") requireSameUnit(left, right, operator === "+" ? "added" : "subtracted");
  return { kind: "arithmetic", operator, left, right };
};

const comparison = (operator: Comparison, left: NumberTree, right: NumberTree): ConditionTree => {
  requireSameUnit(left, right, "compared");
  return { kind: "comparison", operator, left, right };
};

/** `a <= x < b` as the comparisons it stands for. */
const chain = (node: Node): ConditionTree => {
  const values = (node.params ?? []).map(toNumber);
  const links = (node.conditionals ?? []).map((name, i): ConditionTree => {
    const [operator, left, right] = [COMPARISON[name], values[i], values[i + 1]];
    if (!operator || !left || !right) return refuseKind(node);
    return comparison(operator, left, right);
  });
  return links.reduce((left, right) => ({ kind: "logic", operator: "and", left, right }));
};

const toCondition = (node: Node): ConditionTree => {
  if (node.type === "ParenthesisNode" && node.content) return toCondition(node.content);
  if (node.type === "RelationalNode") return chain(node);
  if (node.type !== "OperatorNode") throw new Refused("This is a number, not a condition.", "Compare it with something, for example teff < 3900.");
  const name = functionName(node);
  const [left, right] = node.args ?? [];
  if (name === "not" && left) return { kind: "not", of: toCondition(left) };
  if ((name === "and" || name === "or") && left && right)
    return { kind: "logic", operator: name, left: toCondition(left), right: toCondition(right) };
  const operator = COMPARISON[name];
  if (operator && left && right) return comparison(operator, toNumber(left), toNumber(right));
  throw new Refused("This is a number, not a condition.", "Compare it with something, for example teff < 3900.");
};

const collect = (tree: ConditionTree | NumberTree, into: Set<string>): Set<string> => {
  switch (tree.kind) {
    case "column":
      into.add(tree.key);
      break;
    case "negative":
    case "not":
      collect(tree.of, into);
      break;
    case "call":
      for (const argument of tree.arguments) collect(argument, into);
      break;
    case "constant":
      break;
    default:
      collect(tree.left, into);
      collect(tree.right, into);
  }
  return into;
};

const refusal = (text: string, error: unknown): Refusal => {
  if (error instanceof Refused) {
    const at = error.word === undefined ? -1 : text.search(new RegExp(`\\b${error.word}\\b`));
    return { ok: false, message: error.message, hint: error.hint, ...(at >= 0 ? { position: at } : {}) };
  }
  const at = (error as { char?: number }).char;
  return {
    ok: false,
    message: "This cannot be read as an expression.",
    hint: at === undefined ? "Write, for example, 2600 <= teff < 3900." : `Look at character ${at}. Write, for example, 2600 <= teff < 3900.`,
    ...(at === undefined ? {} : { position: at - 1 }),
  };
};

const read = <T extends ConditionTree | NumberTree>(text: string, translate: (node: Node) => T): Parsed<T> | Refusal => {
  if (text.length > LIMITS.expressionCharacters)
    return { ok: false, message: `An expression has at most ${LIMITS.expressionCharacters} characters.`, hint: "Split it into two cuts." };
  try {
    const tree = translate(parseMath(text) as MathNode as unknown as Node);
    return { ok: true, tree, columns: [...collect(tree, new Set())] };
  } catch (error) {
    return refusal(text, error);
  }
};

/** Reads a condition, for example `2600 <= teff < 3900 and ruwe < 1.4`. */
export const parseCondition = (text: string): Parsed<ConditionTree> | Refusal => read(text, toCondition);

/** Reads a number, for example `bp_mag - rp_mag`. */
export const parseNumber = (text: string): Parsed<NumberTree> | Refusal => read(text, toNumber);
