import type { MethodKey } from "#shared/catalogue/methods.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import type { Scratch } from "./scratch.ts";
import type { SymbolKey } from "./symbols.ts";

/** A constant in a formula, with where its value comes from. */
export interface FormulaConstant {
  readonly symbol: string;
  readonly value: number;
  readonly unit: string;
  readonly source: string;
}

/** Where a relation holds: one of its inputs, from and to. */
export interface FormulaRange {
  readonly symbol: SymbolKey;
  readonly from: number;
  readonly to: number;
}

/**
 * How a quantity follows from others. The stage computes with `compute`, and the workings print `formula` with the
 * numbers put in: both stand here, and a test holds them together, so that what is explained is what was done.
 */
export interface Definition {
  /** Under which code a value says that it came about so; null where there is no other way. */
  readonly method: MethodKey | null;
  /** Over the symbols of `inputs` and `constants`, as the parser of expressions reads it. */
  readonly formula: string;
  /** Set where `formula` is an equation's left side, which the value makes zero, rather than the value itself. */
  readonly isRoot?: true;
  readonly inputs: readonly SymbolKey[];
  readonly constants?: readonly FormulaConstant[];
  readonly ranges?: (recipe: RecipeSettings) => readonly FormulaRange[];
  /** Scatter of the relation about real stars; empty where it is exact. */
  readonly scatter?: string;
  readonly reference: string;
  /** NaN where the relation does not hold. */
  readonly compute: (star: Scratch, recipe: RecipeSettings) => number;
}

/** The definition by which a star's quantity came about; undefined where it did not. */
export type DefinitionOf = (
  star: Scratch,
  recipe: RecipeSettings,
  method: MethodKey | undefined,
) => Definition | undefined;

/** There is one way. */
export const only =
  (definition: Definition): DefinitionOf =>
  () =>
    definition;

/** Where nothing held, the first that has a range says what it was held against. */
export const byMethod =
  (...definitions: readonly Definition[]): DefinitionOf =>
  (_star, _recipe, method) =>
    definitions.find((definition) =>
      method === undefined ? definition.ranges !== undefined : definition.method === method,
    );
