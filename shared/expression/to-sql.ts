import { refuseDepth } from "./refusal.ts";
import { type Comparison, type ConditionTree, columnsUsed, type NumberTree, type Tree } from "./tree.ts";

/** Constants of one statement: each gets a place (`$1`, `$2` …), so that no text of a person's reaches the SQL. */
export class Parameters {
  readonly values: number[] = [];

  /** The place of a constant; doubles alone, as the columns are. */
  place(value: number): string {
    const known = this.values.indexOf(value);
    const index = known >= 0 ? known : this.values.push(value) - 1;
    return `CAST($${index + 1} AS DOUBLE)`;
  }
}

/** Quoted, though every key comes from the registry and is a plain word. */
const columnSql = (key: string): string => `"${key}"`;

const isAtom = (tree: NumberTree): boolean => tree.kind === "number" || tree.kind === "column";

/** `sql` where every one of those numbers is finite, else blank. Columns and constants always are. */
const whenFinite = (sql: string, trees: readonly NumberTree[], texts: readonly string[]): string => {
  const checks = texts.filter((_, i) => {
    const tree = trees[i];
    return tree && !isAtom(tree);
  });
  if (checks.length === 0) return sql;
  return `(CASE WHEN ${checks.map((text) => `isfinite(${text})`).join(" AND ")} THEN ${sql} END)`;
};

/** Guards repeat what they guard; this bounds what a short text can grow into, before it has grown. */
const LONGEST = 20_000;

const bounded = (sql: string): string => (sql.length > LONGEST ? refuseDepth() : sql);

const callSql = (tree: Extract<NumberTree, { kind: "call" }>, parameters: Parameters): string => {
  const args = tree.args.map((arg) => numberSql(arg, parameters));
  const list = args.join(", ");
  switch (tree.name) {
    case "abs":
    case "exp":
      return `${tree.name}(${list})`;
    case "sqrt":
      return `(CASE WHEN ${list} >= 0 THEN sqrt(${list}) END)`;
    case "log10":
      return `(CASE WHEN ${list} > 0 THEN log10(${list}) END)`;
    case "pow":
      return whenFinite(`pow(${list})`, tree.args, args);
    case "min":
      return whenFinite(`least(${list})`, tree.args, args);
    case "max":
      return whenFinite(`greatest(${list})`, tree.args, args);
  }
};

const numberSql = (tree: NumberTree, parameters: Parameters): string =>
  bounded(plainNumberSql(tree, parameters));

const plainNumberSql = (tree: NumberTree, parameters: Parameters): string => {
  switch (tree.kind) {
    case "number":
      return parameters.place(tree.value);
    case "column":
      return columnSql(tree.key);
    case "negate":
      return `(-${numberSql(tree.of, parameters)})`;
    case "call":
      return callSql(tree, parameters);
    case "choice": {
      const when = conditionSql(tree.when, parameters);
      const yes = numberSql(tree.yes, parameters);
      const no = numberSql(tree.no, parameters);
      return `(CASE WHEN ${when} THEN ${yes} WHEN NOT ${when} THEN ${no} END)`;
    }
    case "arithmetic": {
      const [a, b] = [numberSql(tree.left, parameters), numberSql(tree.right, parameters)];
      if (tree.op === "^") return whenFinite(`pow(${a}, ${b})`, [tree.left, tree.right], [a, b]);
      return `(${a} ${tree.op} ${b})`;
    }
  }
};

const SQL_COMPARISON: Record<Comparison, string> = {
  "<": "<",
  "<=": "<=",
  ">": ">",
  ">=": ">=",
  "==": "=",
  "!=": "<>",
};

const conditionSql = (tree: ConditionTree, parameters: Parameters): string =>
  bounded(plainConditionSql(tree, parameters));

const plainConditionSql = (tree: ConditionTree, parameters: Parameters): string => {
  switch (tree.kind) {
    case "compare": {
      const [a, b] = [numberSql(tree.left, parameters), numberSql(tree.right, parameters)];
      return whenFinite(`(${a} ${SQL_COMPARISON[tree.op]} ${b})`, [tree.left, tree.right], [a, b]);
    }
    case "both":
      return `(${conditionSql(tree.left, parameters)} AND ${conditionSql(tree.right, parameters)})`;
    case "either":
      return `(${conditionSql(tree.left, parameters)} OR ${conditionSql(tree.right, parameters)})`;
    case "not":
      return `(NOT ${conditionSql(tree.of, parameters)})`;
  }
};

const usesSame = (a: Tree, b: Tree): boolean => {
  const [left, right] = [columnsUsed(a), new Set(columnsUsed(b))];
  return left.length === right.size && left.every((key) => right.has(key));
};

/** Whether the SQL is null by itself as soon as one column is; then nothing needs to be said about it. */
const isStrict = (tree: Tree): boolean => {
  switch (tree.kind) {
    case "number":
    case "column":
      return true;
    case "negate":
    case "not":
      return isStrict(tree.of);
    case "call":
      return tree.name !== "min" && tree.name !== "max" && tree.args.every(isStrict);
    case "choice":
      return false;
    case "arithmetic":
    case "compare":
      return isStrict(tree.left) && isStrict(tree.right);
    case "both":
    case "either":
      return isStrict(tree.left) && isStrict(tree.right) && usesSame(tree.left, tree.right);
  }
};

/** Blank as soon as one column is, whatever the rest would say. */
const unlessBlank = (tree: Tree, sql: string): string => {
  const columns = columnsUsed(tree);
  if (columns.length === 0 || isStrict(tree)) return sql;
  const present = columns.map((key) => `${columnSql(key)} IS NOT NULL`).join(" AND ");
  return `(CASE WHEN ${present} THEN ${sql} END)`;
};

/** SQL of a condition over the scan index: true, false, or null where it is blank. */
export const conditionToSql = (tree: ConditionTree, parameters: Parameters): string =>
  unlessBlank(tree, conditionSql(tree, parameters));

/** SQL of a number over the scan index; null where it is blank. */
export const numberToSql = (tree: NumberTree, parameters: Parameters): string => {
  const sql = numberSql(tree, parameters);
  return unlessBlank(tree, whenFinite(sql, [tree], [sql]));
};
