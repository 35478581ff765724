import { NUMERIC_UNITS } from "./names.ts";
import { refuse } from "./refusal.ts";
import type { NumberTree, Tree } from "./tree.ts";

/**
 * A light check of units: it refuses adding or comparing quantities that cannot be alike, and lets constants adopt
 * what they stand beside. `literal` is a constant, `any` a result in which a constant may have carried a unit.
 */
type Unit = { readonly powers: ReadonlyMap<string, number> } | "literal" | "any";

/** `mas.yr-1` as powers of its parts; each unit name counts as a kind of its own. */
const parseUnit = (unit: string): ReadonlyMap<string, number> => {
  const powers = new Map<string, number>();
  for (const part of unit.split(/\.(?![^(]*\))/)) {
    const match = /^(.*?[^-\d])(-?\d+)?$/.exec(part);
    if (match?.[1]) powers.set(match[1], Number(match[2] ?? 1));
  }
  return powers;
};

const combine = (a: Unit, b: Unit, sign: 1 | -1): Unit => {
  if (a === "any" || b === "any") return "any";
  if (a === "literal" && b === "literal") return "literal";
  if (b === "literal") return a !== "literal" && a.powers.size > 0 && sign < 0 ? "any" : a;
  const powers = new Map(a === "literal" ? [] : a.powers);
  for (const [name, power] of b.powers) {
    const sum = (powers.get(name) ?? 0) + sign * power;
    if (sum === 0) powers.delete(name);
    else powers.set(name, sum);
  }
  return { powers };
};

const raised = (base: Unit, power: number): Unit =>
  base === "literal" || base === "any"
    ? base
    : { powers: new Map([...base.powers].map(([name, p]) => [name, p * power])) };

const isAlike = (a: Unit, b: Unit): boolean => {
  if (typeof a === "string" || typeof b === "string") return true;
  return a.powers.size === b.powers.size && [...a.powers].every(([name, p]) => b.powers.get(name) === p);
};

const inWords = (unit: Unit): string => {
  if (typeof unit === "string") return "a constant";
  if (unit.powers.size === 0) return "a pure number";
  return [...unit.powers].map(([name, p]) => (p === 1 ? name : `${name}${p}`)).join(".");
};

const agree = (a: Unit, b: Unit, doing: string): Unit => {
  if (!isAlike(a, b))
    refuse(
      `${doing} ${inWords(a)} and ${inWords(b)} has no meaning.`,
      "Use quantities of the same unit, or divide one by its own unit first.",
    );
  return a === "literal" ? b : a;
};

const unitOfCall = (tree: Extract<NumberTree, { kind: "call" }>): Unit => {
  const units = tree.args.map(unitOf);
  const first = units[0] ?? "any";
  switch (tree.name) {
    case "abs":
      return first;
    case "sqrt":
      return raised(first, 0.5);
    case "pow":
      return powerOf(first, tree.args[1]);
    case "min":
    case "max":
      return units.reduce((a, b) => agree(a, b, "Choosing between"));
    default:
      return "literal";
  }
};

const powerOf = (base: Unit, exponent: NumberTree | undefined): Unit =>
  exponent?.kind === "number" ? raised(base, exponent.value) : "any";

const unitOf = (tree: NumberTree): Unit => {
  switch (tree.kind) {
    case "number":
      return "literal";
    case "column":
      return { powers: parseUnit(NUMERIC_UNITS.get(tree.key) ?? "") };
    case "negate":
      return unitOf(tree.of);
    case "call":
      return unitOfCall(tree);
    case "choice":
      checkUnits(tree.when);
      return agree(unitOf(tree.yes), unitOf(tree.no), "Choosing between");
    case "arithmetic": {
      const [a, b] = [unitOf(tree.left), unitOf(tree.right)];
      if (tree.op === "+") return agree(a, b, "Adding");
      if (tree.op === "-") return agree(a, b, "Subtracting");
      if (tree.op === "^") return powerOf(a, tree.right);
      return combine(a, b, tree.op === "*" ? 1 : -1);
    }
  }
};

/** Refuses sums and comparisons of quantities whose units differ. */
export const checkUnits = (tree: Tree): void => {
  switch (tree.kind) {
    case "compare":
      agree(unitOf(tree.left), unitOf(tree.right), "Comparing");
      return;
    case "both":
    case "either":
      checkUnits(tree.left);
      checkUnits(tree.right);
      return;
    case "not":
      checkUnits(tree.of);
      return;
    default:
      unitOf(tree);
  }
};
