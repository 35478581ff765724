import type { Arithmetic, Comparison, ConditionTree, FunctionName, NumberTree } from "./syntax.ts";

/** Value of a column of the star at hand; NaN where it is blank. */
export type Lookup = (key: string) => number;

const arithmetic = (operator: Arithmetic, a: number, b: number): number => {
  switch (operator) {
    case "+":
      return a + b;
    case "-":
      return a - b;
    case "*":
      return a * b;
    case "/":
      return b === 0 ? Number.NaN : a / b;
    case "^":
      return a ** b;
  }
};

const apply = (name: FunctionName, values: readonly number[]): number => {
  const [x = Number.NaN] = values;
  switch (name) {
    case "abs":
      return Math.abs(x);
    case "sqrt":
      return Math.sqrt(x);
    case "log10":
      return x > 0 ? Math.log10(x) : Number.NaN;
    case "log":
      return x > 0 ? Math.log(x) : Number.NaN;
    case "exp":
      return Math.exp(x);
    case "min":
      return Math.min(...values);
    case "max":
      return Math.max(...values);
  }
};

/** A result that is not a finite number is a blank. */
const finite = (value: number): number => (Number.isFinite(value) ? value : Number.NaN);

export const evaluateNumber = (tree: NumberTree, lookup: Lookup): number => {
  switch (tree.kind) {
    case "constant":
      return tree.value;
    case "column":
      return lookup(tree.key);
    case "negative":
      return -evaluateNumber(tree.of, lookup);
    case "arithmetic":
      return finite(arithmetic(tree.operator, evaluateNumber(tree.left, lookup), evaluateNumber(tree.right, lookup)));
    case "call":
      return finite(
        apply(
          tree.name,
          tree.arguments.map((argument) => evaluateNumber(argument, lookup)),
        ),
      );
  }
};

const compare = (operator: Comparison, a: number, b: number): boolean => {
  switch (operator) {
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

/** Truth of a condition of which no part is blank; null where one is: a comparison with a blank is neither. */
export const evaluateCondition = (tree: ConditionTree, lookup: Lookup): boolean | null => {
  switch (tree.kind) {
    case "comparison": {
      const [a, b] = [evaluateNumber(tree.left, lookup), evaluateNumber(tree.right, lookup)];
      return Number.isNaN(a) || Number.isNaN(b) ? null : compare(tree.operator, a, b);
    }
    case "not": {
      const value = evaluateCondition(tree.of, lookup);
      return value === null ? null : !value;
    }
    case "logic": {
      const [a, b] = [evaluateCondition(tree.left, lookup), evaluateCondition(tree.right, lookup)];
      if (a === null || b === null) return null;
      return tree.operator === "and" ? a && b : a || b;
    }
  }
};
