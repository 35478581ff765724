import {
  type Arithmetic,
  type Comparison,
  type ConditionTree,
  columnsUsed,
  type NumberTree,
} from "./tree.ts";

/**
 * What an expression gives for one star. NaN, or null for a condition, is blank: a value it uses is missing, or
 * what it computes has no finite value. The SQL of `to-sql.ts` answers alike, star by star.
 */
export type Values = (key: string) => number;

const allFinite = (numbers: readonly number[]): boolean => numbers.every((n) => Number.isFinite(n));

const power = (a: number, b: number): number => (allFinite([a, b]) ? a ** b : Number.NaN);

const arithmetic = (op: Arithmetic, a: number, b: number): number => {
  switch (op) {
    case "+":
      return a + b;
    case "-":
      return a - b;
    case "*":
      return a * b;
    case "/":
      return a / b;
    case "^":
      return power(a, b);
  }
};

const call = (name: string, args: readonly number[]): number => {
  const [a = Number.NaN, b = Number.NaN] = args;
  switch (name) {
    case "abs":
      return Math.abs(a);
    case "sqrt":
      return Math.sqrt(a);
    case "log10":
      return a > 0 ? Math.log10(a) : Number.NaN;
    case "exp":
      return Math.exp(a);
    case "pow":
      return power(a, b);
    case "min":
      return allFinite(args) ? Math.min(...args) : Number.NaN;
    default:
      return allFinite(args) ? Math.max(...args) : Number.NaN;
  }
};

const numberOf = (tree: NumberTree, values: Values): number => {
  switch (tree.kind) {
    case "number":
      return tree.value;
    case "column":
      return values(tree.key);
    case "negate":
      return -numberOf(tree.of, values);
    case "arithmetic":
      return arithmetic(tree.op, numberOf(tree.left, values), numberOf(tree.right, values));
    case "call":
      return call(
        tree.name,
        tree.args.map((arg) => numberOf(arg, values)),
      );
    case "choice": {
      const holds = conditionOf(tree.when, values);
      if (holds === null) return Number.NaN;
      return numberOf(holds ? tree.yes : tree.no, values);
    }
  }
};

const compare = (op: Comparison, a: number, b: number): boolean => {
  switch (op) {
    case "<":
      return a < b;
    case "<=":
      return a <= b;
    case ">":
      return a > b;
    case ">=":
      return a >= b;
    case "==":
      return a === b;
    case "!=":
      return a !== b;
  }
};

const both = (a: boolean | null, b: boolean | null): boolean | null => {
  if (a === false || b === false) return false;
  return a === null || b === null ? null : true;
};

const negated = (a: boolean | null): boolean | null => (a === null ? null : !a);

const conditionOf = (tree: ConditionTree, values: Values): boolean | null => {
  switch (tree.kind) {
    case "compare": {
      const [a, b] = [numberOf(tree.left, values), numberOf(tree.right, values)];
      return allFinite([a, b]) ? compare(tree.op, a, b) : null;
    }
    case "both":
      return both(conditionOf(tree.left, values), conditionOf(tree.right, values));
    case "either": {
      const [a, b] = [conditionOf(tree.left, values), conditionOf(tree.right, values)];
      return negated(both(negated(a), negated(b)));
    }
    case "not":
      return negated(conditionOf(tree.of, values));
  }
};

const isBlank = (tree: NumberTree | ConditionTree, values: Values): boolean =>
  columnsUsed(tree).some((key) => !Number.isFinite(values(key)));

export const evaluateNumber = (tree: NumberTree, values: Values): number => {
  const value = isBlank(tree, values) ? Number.NaN : numberOf(tree, values);
  return Number.isFinite(value) ? value : Number.NaN;
};

/** Whether the star meets the condition; null where it cannot be said. */
export const evaluateCondition = (tree: ConditionTree, values: Values): boolean | null =>
  isBlank(tree, values) ? null : conditionOf(tree, values);
