/** A number as a formula spells it: with every digit, and none that it does not have. */
const coefficient = (value: number): string => String(Math.abs(value));

const power = (symbol: string, exponent: number): string => {
  if (exponent === 0) return "";
  return exponent === 1 ? symbol : `${symbol}^${exponent}`;
};

/** One signed term, `- 0.352 * M_Ks`; empty for a coefficient of zero. */
export const term = (value: number, ...factors: readonly string[]): string =>
  value === 0
    ? ""
    : `${value < 0 ? "- " : "+ "}${[coefficient(value), ...factors.filter((f) => f !== "")].join(" * ")}`;

/** Terms as one sum; a plus in front is dropped. */
export const sum = (...terms: readonly string[]): string =>
  terms
    .filter((t) => t !== "")
    .join(" ")
    .replace(/^\+ /, "")
    .replace(/^- /, "-");

/** `1.9515 - 0.352 * M_Ks + 0.0168 * M_Ks^2`, from the coefficients that the relation itself uses. */
export const polynomial = (symbol: string, coefficients: readonly number[]): string =>
  sum(...coefficients.map((c, i) => term(c, power(symbol, i))));

/** `M_Ks - 7.5`, `T_eff - 5780`. */
export const shifted = (symbol: string, zeroPoint: number): string => `(${symbol} - ${zeroPoint})`;

/** A fraction in percent, without the digits that binary fractions add: `2.89 %`. */
export const percent = (fraction: number): string => `${Number((100 * fraction).toPrecision(6))} %`;
