import { type MathNode, parse, type SymbolNode } from "mathjs/number";

/** A number as it stands in a formula: in brackets where a sign would run into an operator. */
const inFormula = (value: number): string => (value < 0 ? `(${value})` : String(value));

/** The formula with the numbers in place of the symbols; a symbol without a number stays. */
export const substitute = (formula: string, numbers: ReadonlyMap<string, number>): string => {
  const symbols = new Set<string>();
  parse(formula).traverse((node: MathNode) => {
    if (node.type === "SymbolNode") symbols.add((node as SymbolNode).name);
  });
  let text = formula;
  for (const symbol of symbols) {
    const value = numbers.get(symbol);
    if (value !== undefined) text = text.replace(new RegExp(`\\b${symbol}\\b(?!\\()`, "g"), inFormula(value));
  }
  return text;
};
