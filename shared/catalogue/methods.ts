/** How a value came about, by stored code; 0 stands beside a blank. Codes never change their meaning. */
export const METHODS = [
  { code: 1, key: "given", word: "as given by the preferred extract" },
  { code: 2, key: "sunlike-colour", word: "from BP − RP (Casagrande et al. 2021)" },
  { code: 3, key: "cool-colour", word: "from BP − RP (Mann et al. 2015), 52 K scatter" },
  { code: 4, key: "abs-ks", word: "M Ks relation" },
  { code: 5, key: "abs-ks-feh", word: "M Ks relation with [Fe/H]" },
  { code: 6, key: "light-and-temperature", word: "from luminosity and temperature (Stefan–Boltzmann)" },
  { code: 7, key: "spectrum", word: "from Teff, log g and [Fe/H] (Torres et al. 2010), 6.4 % scatter" },
  { code: 8, key: "correction-ks", word: "M Ks and its bolometric correction" },
  { code: 9, key: "correction-g", word: "M G and its bolometric correction (Andrae et al. 2018)" },
  { code: 10, key: "radius-and-temperature", word: "R² T⁴ (Stefan–Boltzmann)" },
] as const;

export type MethodKey = (typeof METHODS)[number]["key"];

const codes = new Map<string, number>(METHODS.map((method) => [method.key, method.code]));
const words = new Map<number, string>(METHODS.map((method) => [method.code, method.word]));

export const methodCode = (key: MethodKey): number => codes.get(key) ?? 0;

/** The words of a stored code; empty for a blank. */
export const methodWord = (code: number): string => words.get(code) ?? "";
