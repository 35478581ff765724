import type { ConditionTree, FunctionName, NumberTree } from "./syntax.ts";

/**
 * The tree as DuckDB SQL. Names come from the registry and are quoted; constants are printed from parsed numbers. A
 * blank is NULL; arithmetic that has no finite result is a blank too, as where a single star is evaluated.
 */

const quote = (key: string): string => `"${key}"`;

const constant = (value: number): string => `CAST(${JSON.stringify(value)} AS DOUBLE)`;

/** NULL for what is not a finite number. */
const finite = (sql: string): string => `shortlight_finite(${sql})`;

const call = (name: FunctionName, values: readonly string[]): string => {
  const [x = "NULL"] = values;
  switch (name) {
    case "abs":
      return `abs(${x})`;
    case "sqrt":
      return `CASE WHEN ${x} >= 0 THEN sqrt(${x}) END`;
    case "log10":
      return `CASE WHEN ${x} > 0 THEN log10(${x}) END`;
    case "log":
      return `CASE WHEN ${x} > 0 THEN ln(${x}) END`;
    case "exp":
      return `exp(${x})`;
    case "min":
    case "max": {
      // least and greatest of DuckDB pass over NULL; a blank must not be passed over.
      const all = values.map((value) => `${value} IS NOT NULL`).join(" AND ");
      return `CASE WHEN ${all} THEN ${name === "min" ? "least" : "greatest"}(${values.join(", ")}) END`;
    }
  }
};

export const numberSql = (tree: NumberTree): string => {
  switch (tree.kind) {
    case "constant":
      return constant(tree.value);
    case "column":
      return quote(tree.key);
    case "negative":
      return `(-${numberSql(tree.of)})`;
    case "arithmetic": {
      const [left, right] = [numberSql(tree.left), numberSql(tree.right)];
      if (tree.operator === "^") return finite(`pow(${left}, ${right})`);
      if (tree.operator === "/") return finite(`(${left} / nullif(${right}, 0))`);
      return finite(`(${left} ${tree.operator} ${right})`);
    }
    case "call":
      return finite(call(tree.name, tree.arguments.map(numberSql)));
  }
};

const SQL_COMPARISON = { "<": "<", "<=": "<=", ">": ">", ">=": ">=", "==": "=", "!=": "<>" } as const;

/** TRUE, FALSE, or NULL where any part is blank. */
export const conditionSql = (tree: ConditionTree): string => {
  switch (tree.kind) {
    case "comparison":
      return `(${numberSql(tree.left)} ${SQL_COMPARISON[tree.operator]} ${numberSql(tree.right)})`;
    case "not":
      return `(NOT ${conditionSql(tree.of)})`;
    case "logic": {
      // SQL's own AND and OR let one side decide over a blank; here a blank on either side is a blank.
      const [left, right] = [conditionSql(tree.left), conditionSql(tree.right)];
      return `CASE WHEN ${left} IS NULL OR ${right} IS NULL THEN NULL ELSE ${left} ${tree.operator.toUpperCase()} ${right} END`;
    }
  }
};

/** Declares the macro that the SQL above uses; run once on each connection. */
export const FINITE_MACRO = "CREATE OR REPLACE TEMP MACRO shortlight_finite(x) AS CASE WHEN isfinite(x) THEN x END";
