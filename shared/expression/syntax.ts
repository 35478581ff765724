/**
 * The small language of cuts and terms: mathjs syntax over the columns of the registry. A text is parsed by mathjs, then
 * copied into the tree below; what has no place in the tree is refused. Nothing a person wrote reaches SQL or JavaScript.
 */

export type Arithmetic = "+" | "-" | "*" | "/" | "^";
export type Comparison = "<" | "<=" | ">" | ">=" | "==" | "!=";
export type Logic = "and" | "or";
export const FUNCTIONS = ["abs", "sqrt", "log10", "log", "exp", "min", "max"] as const;
export type FunctionName = (typeof FUNCTIONS)[number];

export type NumberTree =
  | { readonly kind: "constant"; readonly value: number }
  | { readonly kind: "column"; readonly key: string }
  | { readonly kind: "negative"; readonly of: NumberTree }
  | { readonly kind: "arithmetic"; readonly operator: Arithmetic; readonly left: NumberTree; readonly right: NumberTree }
  | { readonly kind: "call"; readonly name: FunctionName; readonly arguments: readonly NumberTree[] };

export type ConditionTree =
  | { readonly kind: "comparison"; readonly operator: Comparison; readonly left: NumberTree; readonly right: NumberTree }
  | { readonly kind: "logic"; readonly operator: Logic; readonly left: ConditionTree; readonly right: ConditionTree }
  | { readonly kind: "not"; readonly of: ConditionTree };

/** Why a text is refused: what, where (from 0, where known) and what to do. */
export interface Refusal {
  readonly ok: false;
  readonly message: string;
  readonly hint: string;
  readonly position?: number;
}

export interface Parsed<T> {
  readonly ok: true;
  readonly tree: T;
  /** Columns it reads, each once, in the order they appear. */
  readonly columns: readonly string[];
}
